/** The names behind identifiers. */
import type { Knex } from 'knex'
import { holdsAt, type ReadRevision } from './at-revision.ts'

/** Names by slug at a revision. */
export async function namesOf(knex: Knex, slugs: readonly string[], revision: ReadRevision): Promise<Map<string, string>> {
  if (slugs.length === 0) return new Map()
  const holds = holdsAt(revision)
  const answer = await knex.raw<{ rows: { slug: string; name: string }[] }>(
    `SELECT slug, name FROM catalogue_rows WHERE slug = ANY (?::text[]) AND ${holds.sql()}`,
    [slugs as unknown as Knex.RawBinding, ...holds.bindings],
  )
  return new Map(answer.rows.map((row) => [row.slug, row.name]))
}
