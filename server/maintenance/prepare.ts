import { hash, verify } from '@node-rs/argon2'
import type { Knex } from 'knex'
import { pino } from 'pino'
import { DEMONSTRATION_ACCOUNTS } from '../../seeds/accounts.ts'
import { seedWhenEmpty } from '../../seeds/index.ts'
import { ConfigError, loadConfig } from '../config.ts'
import { openDatabase } from '../database.ts'
import { migrateToLatest } from './migrate.ts'
import { recomputeWhenOlder } from './recompute.ts'

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
  const log = pino({ level: 'info' }, { write: (line: string) => process.stderr.write(`${(JSON.parse(line) as { msg: string }).msg}\n`) })
  const knex = openDatabase({ databaseUrl: config.databaseUrl, purpose: 'upkeep', connections: 4 })
  try {
    const migrated = await migrateToLatest(knex)
    const { seeded } = await seedWhenEmpty({ knex, config, log })
    await recomputeWhenOlder(knex, config, (sentence) => log.info(sentence))
    const accounts = config.demoPassword ? await settleDemonstrationAccounts(knex, config.demoPassword) : []
    return { migrated, seeded, accounts }
  } finally {
    await knex.destroy()
  }
}

/** Faults that are in the settings or in the database's keeping, not in this program: a sentence for each, by PostgreSQL's or the system's code. */
const SENTENCES: Readonly<Record<string, string>> = {
  ECONNREFUSED: 'no server listens at its address; start it, or correct the address',
  ENOTFOUND: 'its host name is not known; correct the address',
  ETIMEDOUT: 'its address does not answer; check the network and the address',
  '28P01': 'it refused the password; correct the address',
  '28000': 'it refused this user; correct the address or let the user in',
  '3D000': 'the server has no database of that name; create it first',
  '42501': 'the role may not do something it must; make it the owner of the database',
  '53300': 'it has no connection left; free some or allow more',
}

function sentenceFor(error: unknown): string | null {
  if (error instanceof ConfigError) return error.message
  const code = error instanceof Error && 'code' in error ? String(error.code) : ''
  const reason = SENTENCES[code]
  return reason === undefined
    ? null
    : `The database of DATABASE_URL cannot be used: ${reason}. (${error instanceof Error && error.message ? error.message : code})`
}

/** The exit status that means: a sentence has been printed, and nothing more needs to be said. */
const EXPLAINED = 2

try {
  process.stdout.write(`${JSON.stringify(await prepare())}\n`)
} catch (error) {
  const sentence = sentenceFor(error)
  if (sentence === null) throw error
  process.stderr.write(`${sentence}\n`)
  process.exitCode = EXPLAINED
}
