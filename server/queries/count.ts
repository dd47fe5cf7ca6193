/** How many rows a filter lets through. */
import type { Knex } from 'knex'
import { partsAt, type Fragment, type ReadRevision } from './at-revision.ts'
import { all } from './filter-sql.ts'

const MOST_KEPT = 2000

/**
 * Counts already made, by database, filter and revision: what was counted at a revision stays so for ever. A process that starts afresh counts
 * again; nothing depends on it.
 */
const kept = new WeakMap<object, Map<string, number>>()

export async function countRows(knex: Knex, where: Fragment, revision: ReadRevision): Promise<number> {
  const counts = countsOf(knex)
  const key = JSON.stringify([revision.number, where.sql, where.bindings])
  const known = counts.get(key)
  if (known !== undefined) {
    // Asked for again: among the last to be forgotten.
    counts.delete(key)
    counts.set(key, known)
    return known
  }
  const parts = partsAt(revision).map((part) => all([part, where]))
  const answer = await knex.raw<{ rows: { total: number; newest: number | null }[] }>(
    `SELECT (${parts.map((part) => `(SELECT count(*) FROM catalogue_rows WHERE ${part.sql})`).join(' + ')})::int AS total,
            (SELECT max(number) FROM revisions) AS newest`,
    parts.flatMap((part) => part.bindings),
  )
  const { total = 0, newest = null } = answer.rows[0] ?? {}
  // The catalogue may have moved on between the reading of the revision and this: then the count is another one's.
  const exact = !revision.current || (newest ?? 0) === revision.number
  if (exact) {
    if (counts.size >= MOST_KEPT) counts.delete(counts.keys().next().value ?? '')
    counts.set(key, total)
  }
  return total
}

function countsOf(knex: Knex): Map<string, number> {
  const database: object = (knex.client as { pool?: object }).pool ?? knex
  let counts = kept.get(database)
  if (!counts) {
    counts = new Map()
    kept.set(database, counts)
  }
  return counts
}
