/** One galaxy as it stood at a revision: its row, its names, its adopted values with their reasons, its place among hosts. */
import type { Knex } from 'knex'
import { COLUMNS } from '../../core/columns.ts'
import { NotFound } from '../http/errors.ts'
import { holdsAt, type ReadRevision } from './at-revision.ts'
import { timeText } from './list.ts'
import { nearSlugs } from './near-names.ts'

/**
 * The number of the galaxy that has this identifier, or had it in some earlier revision.
 *
 * @throws NotFound with identifiers like it
 */
export async function galaxyNumber(knex: Knex, slug: string, revision: ReadRevision): Promise<number> {
  const holds = holdsAt(revision)
  const found = await knex.raw<{ rows: { galaxy: number }[] }>(
    `SELECT galaxy FROM (
       SELECT 0 AS age, galaxy, rev_from FROM catalogue_rows WHERE slug = ? AND ${holds.sql()}
       UNION ALL
       SELECT 1, v.galaxy, v.rev_from FROM galaxy_versions v
       WHERE v.slug = ? AND v.rev_from <= ? AND EXISTS (SELECT FROM catalogue_rows c WHERE c.galaxy = v.galaxy AND ${holds.sql('c')})
     ) AS found ORDER BY age, rev_from DESC LIMIT 1`,
    [slug, ...holds.bindings, slug, revision.number, ...holds.bindings],
  )
  const [row] = found.rows
  if (row) return row.galaxy
  throw new NotFound(`No galaxy of this catalogue has the identifier "${slug.slice(0, 80)}".${await nearSlugs(knex, slug, revision)}`)
}

/** The answer of `GET /api/galaxies/:slug` as JSON text. @throws NotFound */
export async function galaxyText(knex: Knex, slug: string, revision: ReadRevision): Promise<string> {
  const galaxy = await galaxyNumber(knex, slug, revision)
  const holds = holdsAt(revision)
  const columns = COLUMNS.map(({ key, type }) => (type === 'time' ? `${timeText(`c."${key}"`)} AS "${key}"` : `c."${key}"`)).join(', ')
  const place = (column: string): string =>
    `(SELECT json_build_object('slug', h.slug, 'name', h.name) FROM catalogue_rows h WHERE h.slug = c.${column} AND ${holds.sql('h')})`
  const answer = await knex.raw<{ rows: { text: string }[] }>(
    `SELECT json_build_object(
       'id', c.galaxy, 'versionId', v.id, 'slug', v.slug, 'designation', v.designation, 'status', v.status, 'class', v.class, 'ra', v.ra, 'dec', v.dec, 'note', v.note,
       'names', (SELECT coalesce(json_agg(json_build_object('name', n.name, 'preferred', n.preferred, 'source', s.label) ORDER BY n.preferred DESC, n.name COLLATE "C"), '[]')
         FROM galaxy_names n LEFT JOIN sources s ON s.id = n.source WHERE n.galaxy = c.galaxy AND ${holds.sql('n')}),
       'row', (SELECT row_to_json(r) FROM (SELECT ${columns}) AS r),
       'adopted', (SELECT coalesce(json_agg(json_build_object('quantity', a.quantity, 'value', a.value, 'textValue', a.text_value, 'errPlus', a.err_plus, 'errMinus', a.err_minus,
           'errSys', a.err_sys, 'nUsed', a.n_used, 'nAll', a.n_all, 'chi2', a.chi2, 'dof', a.dof, 'scatter', a.scatter, 'method', a.method, 'sentence', a.sentence,
           'reasons', a.reasons, 'override', a.override_reason) ORDER BY a.quantity), '[]')
         FROM adopted_values a WHERE a.galaxy = c.galaxy AND ${holds.sql('a')}),
       'host', ${place('host')}, 'mainDisturber', ${place('main_disturber')},
       'possibleHosts', (SELECT coalesce(json_agg(json_build_object('slug', h.slug, 'name', h.name, 'probability', p.p) ORDER BY p.p DESC, h.slug), '[]')
         FROM json_to_recordset(c.possible_hosts) AS p (host text, p float8) JOIN catalogue_rows h ON h.slug = p.host AND ${holds.sql('h')}),
       'hostOverride', (SELECT o.reason FROM overrides o WHERE o.galaxy = c.galaxy AND o.about = 'host' AND ${holds.sql('o')}),
       'satellites', (SELECT count(*)::int FROM catalogue_rows m WHERE m.host = c.slug AND m.status <> 'withdrawn' AND ${holds.sql('m')}),
       'revision', ?::integer)::text AS text
     FROM catalogue_rows c JOIN galaxy_versions v ON v.galaxy = c.galaxy AND ${holds.sql('v')}
     WHERE c.galaxy = ? AND ${holds.sql('c')}`,
    [
      ...holds.bindings, ...holds.bindings, ...holds.bindings, ...holds.bindings, ...holds.bindings, ...holds.bindings, ...holds.bindings, revision.number, ...holds.bindings, galaxy, ...holds.bindings,
    ],
  )
  const [row] = answer.rows
  if (!row) throw new NotFound('This galaxy is not in the catalogue at that revision.')
  return row.text
}
