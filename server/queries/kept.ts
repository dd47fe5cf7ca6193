/** Answers kept in memory, since what was computed at a revision stays so for ever. A process that starts afresh computes again; nothing depends on it. */
import type { Knex } from 'knex'
import type { ReadRevision } from './at-revision.ts'
import { preparedRows } from './prepared.ts'

const MOST_KEPT = 2000

/** By the pool of connections, so that two databases in one process do not mix. */
const byDatabase = new WeakMap<object, Map<string, unknown>>()

/** The value for this question at this revision: kept from before, or computed now. @param question - what it depends on but the revision */
export async function kept<Value>(knex: Knex, revision: ReadRevision, question: readonly unknown[], compute: () => Promise<Value>): Promise<Value> {
  const values = valuesOf(knex)
  const key = JSON.stringify([revision.number, ...question])
  const known = values.get(key)
  if (known !== undefined) {
    // Asked for again: among the last to be forgotten.
    values.delete(key)
    values.set(key, known)
    return known as Value
  }
  const value = await compute()
  if (await stillHolds(knex, revision)) {
    if (values.size >= MOST_KEPT) values.delete(values.keys().next().value ?? '')
    values.set(key, value)
  }
  return value
}

/** The catalogue may have moved on between the reading of the revision and the computing: then the value is another one's. */
async function stillHolds(knex: Knex, revision: ReadRevision): Promise<boolean> {
  if (!revision.current) return true
  const [row] = await preparedRows<{ newest: number | null }>(knex, 'SELECT max(number) AS newest FROM revisions', [])
  return (row?.newest ?? 0) === revision.number
}

function valuesOf(knex: Knex): Map<string, unknown> {
  const database: object = (knex.client as { pool?: object }).pool ?? knex
  let values = byDatabase.get(database)
  if (!values) {
    values = new Map()
    byDatabase.set(database, values)
  }
  return values
}
