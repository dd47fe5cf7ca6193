/** A filter as a WHERE clause over catalogue_rows: every value is a parameter, every identifier comes from the column registry. */
import type { Knex } from 'knex'
import { unitVector } from '../../core/astro/sphere.ts'
import { radians } from '../../core/astro/units.ts'
import { columnOf } from '../../core/columns.ts'
import type { Condition, Filter, Range } from '../../core/filters/filter.ts'
import { nameKey } from '../../core/names.ts'
import { BadInput } from '../http/errors.ts'
import { holdsAt, type Fragment, type ReadRevision } from './at-revision.ts'
import { nearSlugs } from './near-names.ts'

/** A condition, and the column it is about; null for one about no single column. */
export interface ColumnFragment extends Fragment {
  column: string | null
}

/** Withdrawn galaxies are left out unless a filter speaks of the status. */
const NOT_WITHDRAWN: Condition = { kind: 'list', values: ['withdrawn'], exclude: true }

/**
 * The conditions of a filter, all of which must hold.
 *
 * @throws BadInput when the centre of `within` is no galaxy with a distance
 */
export async function filterFragments(knex: Knex, filter: Filter, revision: ReadRevision): Promise<ColumnFragment[]> {
  const conditions = { status: NOT_WITHDRAWN, ...filter.conditions }
  const fragments: ColumnFragment[] = Object.entries(conditions).map(([column, condition]) => ({ column, ...conditionSql(column, condition) }))
  for (const column of filter.has) fragments.push({ column: null, sql: `${identifier(column)} IS NOT NULL`, bindings: [] })
  for (const column of filter.lacks) fragments.push({ column: null, sql: `${identifier(column)} IS NULL`, bindings: [] })
  if (filter.q !== null) fragments.push({ column: null, ...(await wordsSql(knex, filter.q, revision)) })
  if (filter.cone) fragments.push({ column: null, ...coneSql(filter.cone) })
  if (filter.within) fragments.push({ column: null, ...(await withinSql(knex, filter.within, revision)) })
  return fragments
}

/** Joins conditions by AND; true when there are none. */
export function all(fragments: readonly Fragment[]): Fragment {
  if (fragments.length === 0) return { sql: 'true', bindings: [] }
  return { sql: fragments.map((f) => `(${f.sql})`).join(' AND '), bindings: fragments.flatMap((f) => f.bindings) }
}

/** A column's name in SQL. @throws RangeError for what is no column of the registry */
export function identifier(column: string): string {
  if (!columnOf(column)) throw new RangeError(`there is no column "${column}"`)
  return `"${column}"`
}

function conditionSql(key: string, condition: Condition): Fragment {
  const column = identifier(key)
  const any = alternatives(column, condition)
  // Without a value nothing matches, so such a row stays when the matching ones are left out.
  return condition.exclude ? { sql: `(${any.sql}) IS NOT TRUE`, bindings: any.bindings } : any
}

function alternatives(column: string, condition: Condition): Fragment {
  if (condition.kind === 'list') return { sql: `${column} IN (${condition.values.map(() => '?').join(', ')})`, bindings: [...condition.values] }
  const parts = condition.kind === 'numbers' ? condition.ranges.map((r) => numberRange(column, r)) : condition.ranges.map((r) => timeRange(column, r))
  return { sql: parts.map((p) => `(${p.sql})`).join(' OR '), bindings: parts.flatMap((p) => p.bindings) }
}

function numberRange(column: string, { lo, hi }: Range<number>): Fragment {
  const parts: Fragment[] = []
  if (lo !== null) parts.push({ sql: `${column} >= ?::float8`, bindings: [lo] })
  if (hi !== null) parts.push({ sql: `${column} <= ?::float8`, bindings: [hi] })
  return { sql: parts.map((p) => p.sql).join(' AND '), bindings: parts.flatMap((p) => p.bindings) }
}

function timeRange(column: string, { lo, hi }: Range<string>): Fragment {
  const parts: Fragment[] = []
  if (lo !== null) parts.push({ sql: `${column} >= ?::timestamptz`, bindings: [instant(lo)] })
  if (hi !== null) {
    const wholeDay = hi.length === 10
    parts.push({ sql: wholeDay ? `${column} < ?::timestamptz + interval '1 day'` : `${column} <= ?::timestamptz`, bindings: [instant(hi)] })
  }
  return { sql: parts.map((p) => p.sql).join(' AND '), bindings: parts.flatMap((p) => p.bindings) }
}

function instant(time: string): string {
  return time.length === 10 ? `${time}T00:00:00Z` : time
}

/** As many galaxies as are named one by one in a condition, rather than searched for again. */
const FEW = 500

/**
 * Any name, also one that is not preferred, that holds the words. Keys are letters and digits, so nothing needs escaping. Where only a few
 * galaxies have such a name they are looked up first: the planner then knows how few they are.
 */
async function wordsSql(knex: Knex, words: string, revision: ReadRevision): Promise<Fragment> {
  const holds = holdsAt(revision)
  const named = { sql: `SELECT n.galaxy FROM galaxy_names n WHERE n.name_key LIKE ? AND ${holds.sql('n')}`, bindings: [`%${nameKey(words)}%`, ...holds.bindings] }
  const found = await knex.raw<{ rows: { galaxy: number }[] }>(`${named.sql} LIMIT ${FEW + 1}`, named.bindings)
  if (found.rows.length > FEW) return { sql: `galaxy IN (${named.sql})`, bindings: named.bindings }
  const galaxies = [...new Set(found.rows.map((row) => row.galaxy))].sort((a, b) => a - b)
  return { sql: `galaxy IN (${galaxies.join(', ') || 'NULL'})`, bindings: [] }
}

/** A circle on the sky by the chord between unit vectors: the cube index finds the box, the distance decides. */
function coneSql({ ra, dec, radius }: NonNullable<Filter['cone']>): Fragment {
  const centre = `(${unitVector(ra, dec).join(',')})`
  // A trifle more than the chord, so that a galaxy exactly on the rim is not lost to rounding.
  const chord = 2 * Math.sin(radians(radius) / 2) + 1e-12
  return { sql: 'unit_vector <@ cube_enlarge(?::cube, ?::float8, 3) AND unit_vector <-> ?::cube <= ?::float8', bindings: [centre, chord, centre, chord] }
}

const KPC_PER_MPC = 1000

async function withinSql(knex: Knex, { host, radius }: NonNullable<Filter['within']>, revision: ReadRevision): Promise<Fragment> {
  const holds = holdsAt(revision)
  const found = await knex.raw<{ rows: { centre: string | null }[] }>(
    `SELECT sg_position::text AS centre FROM catalogue_rows WHERE slug = ? AND ${holds.sql()}`,
    [host, ...holds.bindings],
  )
  const row = found.rows[0]
  if (!row) {
    const message = `No galaxy has the identifier "${host}".${await nearSlugs(knex, host, revision)}`
    throw new BadInput(message, [{ path: 'within', message }])
  }
  if (row.centre === null) {
    const message = `${host} has no distance in this catalogue, so nothing can be said to lie within a sphere about it.`
    throw new BadInput(message, [{ path: 'within', message }])
  }
  const reach = radius / KPC_PER_MPC
  return {
    sql: 'sg_position <@ cube_enlarge(?::cube, ?::float8, 3) AND sg_position <-> ?::cube <= ?::float8',
    bindings: [row.centre, reach, row.centre, reach],
  }
}
