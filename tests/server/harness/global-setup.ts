import { startThrowaway } from '../../../scripts/postgres/throwaway.mjs'
import { openDatabase } from '../../../server/database.ts'
import { migrateToLatest } from '../../../server/maintenance/migrate.ts'
import { administer, databaseName, isLeftover } from './cluster.ts'

/**
 * Once a run, before the first database or browser test: a throwaway cluster (or the one TEST_DATABASE_URL_BASE names) and in it
 * a migrated template that every test file copies. Told to the workers through the environment, so that the projects share one.
 */
export default async function setup(): Promise<(() => Promise<void>) | undefined> {
  if (process.env.TEST_DATABASE_TEMPLATE) return undefined
  const throwaway = process.env.TEST_DATABASE_URL_BASE ? null : await startThrowaway()
  if (throwaway) process.env.TEST_DATABASE_URL_BASE = throwaway.base
  await dropDatabases(isLeftover)
  const template = databaseName('template')
  await administer((client) => client.query(`create database ${template}`))
  const knex = openDatabase({ databaseUrl: `${process.env.TEST_DATABASE_URL_BASE}/${template}`, purpose: 'upkeep', connections: 2 })
  await migrateToLatest(knex).finally(() => knex.destroy())
  process.env.TEST_DATABASE_TEMPLATE = template

  return async () => {
    if (throwaway) await throwaway.stop()
    else await dropDatabases((name) => name.startsWith(databaseName('')))
  }
}

async function dropDatabases(which: (name: string) => boolean): Promise<void> {
  await administer(async (client) => {
    const { rows } = await client.query<{ datname: string }>('select datname from pg_database')
    for (const { datname } of rows.filter((row) => which(row.datname)))
      await client.query(`drop database if exists ${datname} with (force)`)
  })
}
