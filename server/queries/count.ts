/** How many rows a filter lets through. */
import type { Knex } from 'knex'
import { partsAt, type Fragment, type ReadRevision } from './at-revision.ts'
import { all } from './filter-sql.ts'
import { kept } from './kept.ts'

/** Counted once a filter and revision. */
export function countRows(knex: Knex, where: Fragment, revision: ReadRevision): Promise<number> {
  return kept(knex, revision, ['count', where.sql, where.bindings], async () => {
    const parts = partsAt(revision).map((part) => all([part, where]))
    const answer = await knex.raw<{ rows: { total: number }[] }>(
      `SELECT (${parts.map((part) => `(SELECT count(*) FROM catalogue_rows WHERE ${part.sql})`).join(' + ')})::int AS total`,
      parts.flatMap((part) => part.bindings),
    )
    return answer.rows[0]?.total ?? 0
  })
}
