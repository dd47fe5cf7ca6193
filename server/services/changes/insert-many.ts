/** Rows into a table in a few statements, whatever their number. */
import type { Knex } from 'knex'

/** PostgreSQL takes 65,535 bound values a statement. */
const MOST_BINDINGS = 30_000

/**
 * Inserts rows that all have the same keys.
 *
 * @returns the column asked for, of each row in the order given; empty without one
 */
export async function insertMany<T>(knex: Knex, table: string, rows: readonly Record<string, unknown>[], returning?: string): Promise<T[]> {
  const first = rows[0]
  if (!first) return []
  const chunk = Math.max(1, Math.floor(MOST_BINDINGS / Object.keys(first).length))
  const answers: T[] = []
  for (let at = 0; at < rows.length; at += chunk) {
    const query = knex(table).insert(rows.slice(at, at + chunk))
    if (returning === undefined) await query
    else answers.push(...((await query.returning(returning)) as Record<string, T>[]).map((row) => row[returning] as T))
  }
  return answers
}
