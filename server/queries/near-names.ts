/** What a mistyped address may have meant. */
import type { Knex } from 'knex'
import { nameKey } from '../../core/names.ts'
import { holdsAt, type ReadRevision } from './at-revision.ts'

const MOST = 3

/** ` Did you mean ostrel or ostrel-ii?`, with the blank before it; empty when no name is near. */
export async function nearSlugs(knex: Knex, slug: string, revision: ReadRevision): Promise<string> {
  const key = nameKey(slug.slice(0, 80).replaceAll('-', ' '))
  if (key === '') return ''
  const holds = holdsAt(revision)
  const found = await knex.raw<{ rows: { slug: string }[] }>(
    `SELECT c.slug FROM galaxy_names n JOIN catalogue_rows c ON c.galaxy = n.galaxy
     WHERE n.name_key % ? AND ${holds.sql('n')} AND ${holds.sql('c')}
     GROUP BY c.slug ORDER BY max(similarity(n.name_key, ?)) DESC, c.slug LIMIT ${MOST}`,
    [key, ...holds.bindings, ...holds.bindings, key],
  )
  const slugs = found.rows.map((row) => row.slug)
  if (slugs.length === 0) return ''
  return ` Did you mean ${slugs.length === 1 ? slugs[0] : `${slugs.slice(0, -1).join(', ')} or ${slugs.at(-1)}`}?`
}
