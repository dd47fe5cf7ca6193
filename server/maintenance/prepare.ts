import { hash, verify } from '@node-rs/argon2'
import type { Knex } from 'knex'
import { pino } from 'pino'
import { DEMONSTRATION_ACCOUNTS } from '../../seeds/accounts.ts'
import { seedWhenEmpty } from '../../seeds/index.ts'
import { ConfigError, loadConfig } from '../config.ts'
import { openDatabase } from '../database.ts'
import { migrateToLatest } from './migrate.ts'

/** What a start script needs to know to greet its reader. Printed as one line of JSON. */
export interface Prepared {
  readonly migrated: readonly string[]
  readonly seeded: boolean
  /** E-mail addresses of the demonstration accounts that can sign in with DEMO_PASSWORD. */
  readonly accounts: readonly string[]
}

/**
 * The demonstration accounts get the password that is about to be printed, should theirs be another (a database that was filled
 * from another checkout, or a changed DEMO_PASSWORD). Everybody else's account is left alone.
 */
async function settleDemonstrationAccounts(knex: Knex, password: string): Promise<string[]> {
  const accounts: { id: number; email: string; passwordHash: string }[] = await knex('users')
    .select('id', 'email', 'passwordHash')
    .whereIn(
      'email',
      DEMONSTRATION_ACCOUNTS.map(({ email }) => email),
    )
    .where({ state: 'active' })
    .orderBy('id')
  for (const { id, passwordHash } of accounts) {
    if (!(await verify(passwordHash, password)))
      await knex('users')
        .where({ id })
        .update({ passwordHash: await hash(password) })
  }
  return accounts.map(({ email }) => email)
}

async function prepare(): Promise<Prepared> {
  const config = loadConfig()
  // For a person at a terminal: sentences on standard error, not JSON.
  const log = pino(
    { level: config.logLevel },
    { write: (line: string) => process.stderr.write(`${(JSON.parse(line) as { msg: string }).msg}\n`) },
  )
  const knex = openDatabase({ databaseUrl: config.databaseUrl, purpose: 'upkeep', connections: 4 })
  try {
    const migrated = await migrateToLatest(knex)
    const { seeded } = await seedWhenEmpty({ knex, config, log })
    const accounts = config.demoPassword ? await settleDemonstrationAccounts(knex, config.demoPassword) : []
    return { migrated, seeded, accounts }
  } finally {
    await knex.destroy()
  }
}

try {
  process.stdout.write(`${JSON.stringify(await prepare())}\n`)
} catch (error) {
  if (!(error instanceof ConfigError)) throw error
  process.stderr.write(`${error.message}\n`)
  process.exitCode = 1
}
