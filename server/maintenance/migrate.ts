import type { Knex } from 'knex'
import { migrations } from '../../migrations/index.ts'
import type { Migration } from '../../migrations/index.ts'

/** Any number will do, so long as nothing else in this database locks it. */
const MIGRATION_LOCK = 7_118_203_001

const migrationSource: Knex.MigrationSource<string> = {
  getMigrations: () => Promise.resolve(Object.keys(migrations).sort()),
  getMigrationName: (name) => name,
  getMigration: (name) => {
    const migration: Migration | undefined = migrations[name]
    if (!migration) throw new Error(`no migration is called ${name}`)
    return Promise.resolve(migration)
  },
}

const settings: Knex.MigratorConfig = { migrationSource, tableName: 'knex_migrations' }

/**
 * Brings the schema up to date, each migration in a transaction of its own. Two processes may do so at once: the second waits.
 * @returns the names of the migrations that ran
 */
export async function migrateToLatest(knex: Knex): Promise<string[]> {
  return holdingTheLock(knex, async () => {
    const [, names] = (await knex.migrate.latest(settings)) as [number, string[]]
    return names
  })
}

/** Undoes every migration, newest first; for tests of the migrations themselves. */
export async function rollBackAll(knex: Knex): Promise<string[]> {
  return holdingTheLock(knex, async () => {
    const [, names] = (await knex.migrate.rollback(settings, true)) as [number, string[]]
    return names
  })
}

/**
 * Knex's own lock is a committed row, which a killed process leaves behind for ever. Ours belongs to a connection and ends with
 * it; whoever holds it may therefore clear a leftover row.
 */
async function holdingTheLock<T>(knex: Knex, work: () => Promise<T>): Promise<T> {
  return knex.transaction(async (lock) => {
    await lock.raw('select pg_advisory_xact_lock(?)', [MIGRATION_LOCK])
    if (await knex.schema.hasTable('knex_migrations_lock')) await knex.migrate.forceFreeMigrationsLock(settings)
    return work()
  })
}

/** Names of the migrations that the database lacks. */
export async function pendingMigrations(knex: Knex): Promise<string[]> {
  const [, pending] = (await knex.migrate.list(settings)) as [unknown, string[]]
  return pending
}
