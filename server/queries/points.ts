/** All matching galaxies as columns of numbers, for maps: JSON made by PostgreSQL, passed through as it is. */
import type { Knex } from 'knex'
import type { Filter } from '../../core/filters/filter.ts'
import { partsAt, type ReadRevision } from './at-revision.ts'
import { all, filterFragments } from './filter-sql.ts'

/** Keys of the answer and their columns. */
const POINT_COLUMNS = {
  id: 'galaxy', slug: 'slug', name: 'name', class: 'class', ra: 'ra', dec: 'dec', distance: 'distance', distanceLo: 'distance_lo', distanceHi: 'distance_hi',
  sgx: 'sgx', sgy: 'sgy', sgz: 'sgz', absV: 'abs_v', host: 'host', relation: 'host_relation',
} as const

/** The answer of `GET /api/galaxies/points` as JSON text; galaxies in the order of their numbers. @throws BadInput */
export async function pointsText(knex: Knex, filter: Filter, revision: ReadRevision): Promise<string> {
  const fragments = await filterFragments(knex, filter, revision)
  const columns = Object.values(POINT_COLUMNS).map((column) => `"${column}"`).join(', ')
  const parts = partsAt(revision).map((part) => all([part, ...fragments]))
  const rows = parts.map((part) => `SELECT ${columns} FROM catalogue_rows WHERE ${part.sql}`).join(' UNION ALL ')
  const lists = Object.entries(POINT_COLUMNS).map(([key, column]) => `'${key}', coalesce(json_agg("${column}"), '[]')`)
  const answer = await knex.raw<{ rows: { text: string }[] }>(
    `SELECT json_build_object('revision', ?::integer, ${lists.join(', ')})::text AS text FROM (SELECT * FROM (${rows}) AS found ORDER BY galaxy) AS rows`,
    [revision.number, ...parts.flatMap((part) => part.bindings)],
  )
  const [row] = answer.rows
  if (!row) throw new Error('the points query gave no row')
  return row.text
}
