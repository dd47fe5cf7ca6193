import { randomBytes } from 'node:crypto'
import type { Knex } from 'knex'
import { afterAll, beforeAll } from 'vitest'
import { openDatabase } from '../../../server/database.ts'
import { administer, clusterBase, databaseName } from './cluster.ts'

/** A database of one test file: migrated, without rows. */
export interface TestDatabase {
  readonly url: string
  readonly knex: Knex
  /** Closes `knex` and drops the database. */
  drop(): Promise<void>
}

/**
 * A fresh copy of a template database, the migrated empty one unless told otherwise.
 * @param template name of a database that nobody is connected to
 */
export async function createTestDatabase(template = process.env.TEST_DATABASE_TEMPLATE): Promise<TestDatabase> {
  const name = databaseName(randomBytes(5).toString('hex'))
  await administer((client) => client.query(`create database ${name} template ${template}`))
  const url = `${clusterBase()}/${name}`
  const knex = openDatabase({ databaseUrl: url, connections: 8 })
  return {
    url,
    knex,
    drop: async () => {
      await knex.destroy()
      await administer((client) => client.query(`drop database if exists ${name} with (force)`))
    },
  }
}

/**
 * For the top of a test file: makes a database before its tests and drops it after them.
 * @returns a function that gives the database once the tests run
 */
export function useTestDatabase(): () => TestDatabase {
  let database: TestDatabase | undefined
  beforeAll(async () => {
    database = await createTestDatabase()
  })
  afterAll(async () => {
    await database?.drop()
  })
  return () => {
    if (!database) throw new Error('the test database exists only while tests run')
    return database
  }
}
