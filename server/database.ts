import knexModule from 'knex'
import type { Knex } from 'knex'
import { knexSnakeCaseMappers } from 'objection'
import pg from 'pg'

// PostgreSQL sends these as text. Counts and revisions stay far below 2^53; a numeric column here is a measured value, which
// core/ computes with as a double anyway; a date is a day and not an instant, so it stays text (YYYY-MM-DD).
pg.types.setTypeParser(pg.types.builtins.INT8, Number)
pg.types.setTypeParser(pg.types.builtins.NUMERIC, Number)
pg.types.setTypeParser(pg.types.builtins.DATE, (text) => text)

/** How long things may take, by who asks: the pages of the site, or migration, seeding and other upkeep. */
const TIMEOUTS_MS = {
  web: { statement: 15_000, lock: 5_000, idleInTransaction: 30_000 },
  upkeep: { statement: 0, lock: 0, idleInTransaction: 0 },
} as const

export interface DatabaseOptions {
  readonly databaseUrl: string
  /** `web` (the default) has statement and lock timeouts, `upkeep` has none. */
  readonly purpose?: keyof typeof TIMEOUTS_MS
  /** Most connections at a time. */
  readonly connections?: number
}

/**
 * A pool of connections. Identifiers are snake_case in the database and camelCase in code, mapped here and nowhere else (rows of
 * `knex.raw` arrive as the database names them).
 */
export function openDatabase({ databaseUrl, purpose = 'web', connections = 10 }: DatabaseOptions): Knex {
  const limits = TIMEOUTS_MS[purpose]
  return knexModule.default({
    client: 'pg',
    connection: {
      connectionString: databaseUrl,
      application_name: `vicinage ${purpose}`,
      statement_timeout: limits.statement,
      idle_in_transaction_session_timeout: limits.idleInTransaction,
      options: `-c timezone=UTC -c lock_timeout=${limits.lock}`,
      keepAlive: true,
    },
    pool: { min: 0, max: connections },
    acquireConnectionTimeout: 10_000,
    ...knexSnakeCaseMappers(),
  })
}
