/** The one lock under which the catalogue moves: one approval at a time, so that each revision sees the one before it whole. */
import type { Knex } from 'knex'

/** Any number will do, so long as nothing else in this database locks it. */
const CATALOGUE_LOCK = 7_118_203_002

/** Held until the transaction ends. Waits longer than single rows are waited for: a large approval may be before us. */
export async function lockCatalogue(trx: Knex.Transaction): Promise<void> {
  await trx.raw(`SET LOCAL lock_timeout = '14s'`)
  await trx.raw('SELECT pg_advisory_xact_lock(?)', [CATALOGUE_LOCK])
}
