/** Facets under a filter: how many rows each choice would leave, and how numbers are spread; each facet without its own condition. */
import type { Knex } from 'knex'
import { classLabel, type GalaxyClass } from '../../core/classes.ts'
import { chosenValues, type Filter } from '../../core/filters/filter.ts'
import { METHODS } from '../../core/methods.ts'
import type { Facets } from '../../core/schema/catalogue.ts'
import { partsAt, type Fragment, type ReadRevision } from './at-revision.ts'
import { countRows } from './count.ts'
import { all, filterFragments, identifier, type ColumnFragment } from './filter-sql.ts'
import { kept } from './kept.ts'
import { namesOf } from './names-of.ts'

export const CHOICE_FACETS = ['host', 'class', 'status', 'host_relation', 'distance_method'] as const
export const HISTOGRAM_FACETS = ['distance', 'abs_v', 'abs_b', 'v_lg', 'tidal_index'] as const
const BINS = 40

interface ChoiceRow {
  facet: string
  value: string | null
  count: number
}

interface Ends {
  lo: number
  hi: number
}

interface BinRow extends Ends {
  facet: string
  bin: number | null
  count: number
}

/** Facets that are counted over the same rows, in one reading of the table. */
interface Group {
  facets: string[]
  where: Fragment
}

export async function facetsOf(knex: Knex, filter: Filter, revision: ReadRevision): Promise<Facets> {
  const fragments = await filterFragments(knex, filter, revision)
  const everything = all(fragments)
  return kept(knex, revision, ['facets', everything.sql, everything.bindings], async () => {
    const [total, choices, bins] = await Promise.all([
      countRows(knex, everything, revision),
      inTurn(groupsOf(CHOICE_FACETS, fragments), (group) => choiceRows(knex, group, revision)),
      inTurn(groupsOf(HISTOGRAM_FACETS, fragments), (group) => binRows(knex, group, revision)),
    ])
    const hosts = [...choices.filter((row) => row.facet === 'host').map((row) => row.value), ...chosenValues(filter, 'host')]
    const labels = await namesOf(knex, [...new Set(hosts.filter((slug) => slug !== null))], revision)
    return {
      revision: revision.number,
      total,
      choices: Object.fromEntries(CHOICE_FACETS.map((facet) => [facet, choicesOf(facet, choices, filter, labels)])),
      histograms: Object.fromEntries(HISTOGRAM_FACETS.flatMap((facet) => histogramOf(facet, bins))),
    }
  })
}

/** Facets without a condition of their own share all conditions; each of the others has all but its own. */
function groupsOf(facets: readonly string[], fragments: readonly ColumnFragment[]): Group[] {
  const own = facets.filter((facet) => fragments.some((f) => f.column === facet))
  const shared = facets.filter((facet) => !own.includes(facet))
  const groups: Group[] = own.map((facet) => ({ facets: [facet], where: all(fragments.filter((f) => f.column !== facet)) }))
  return shared.length > 0 ? [{ facets: shared, where: all(fragments) }, ...groups] : groups
}

async function inTurn<Row>(groups: readonly Group[], read: (group: Group) => Promise<Row[]>): Promise<Row[]> {
  const rows: Row[] = []
  for (const group of groups) rows.push(...(await read(group)))
  return rows
}

/** The group's columns of its rows at the revision. */
function rowsSql({ facets, where }: Group, revision: ReadRevision): Fragment {
  const columns = facets.map(identifier).join(', ')
  const parts = partsAt(revision).map((part) => all([part, where]))
  return { sql: parts.map((part) => `SELECT ${columns} FROM catalogue_rows WHERE ${part.sql}`).join(' UNION ALL '), bindings: parts.flatMap((part) => part.bindings) }
}

async function choiceRows(knex: Knex, group: Group, revision: ReadRevision): Promise<ChoiceRow[]> {
  const rows = rowsSql(group, revision)
  const columns = group.facets.map(identifier)
  const answer = await knex.raw<{ rows: (Record<string, string | null> & { which: number; count: number })[] }>(
    `SELECT GROUPING(${columns.join(', ')})::int AS which, ${columns.join(', ')}, count(*)::int AS count FROM (${rows.sql}) AS rows
     GROUP BY GROUPING SETS (${columns.map((column) => `(${column})`).join(', ')})`,
    [...rows.bindings],
  )
  return answer.rows.map((row) => {
    const facet = facetOf(group.facets, row.which)
    return { facet, value: row[facet] ?? null, count: row.count }
  })
}

/** GROUPING sets a bit for every column that a row is not grouped by, the last column's bit lowest. */
function facetOf(facets: readonly string[], which: number): string {
  return facets.find((_, i) => (which & (1 << (facets.length - 1 - i))) === 0) ?? ''
}

/** Equal bins over [lowest, highest]; the highest value belongs to the last bin. A bin without number counts the missing values. */
async function binRows(knex: Knex, group: Group, revision: ReadRevision): Promise<BinRow[]> {
  const rows = rowsSql(group, revision)
  const ends = await knex.raw<{ rows: Record<string, number | null>[] }>(
    `SELECT ${group.facets.map((f) => `min(${identifier(f)}) AS "lo ${f}", max(${identifier(f)}) AS "hi ${f}"`).join(', ')} FROM (${rows.sql}) AS rows`,
    [...rows.bindings],
  )
  const found = new Map<string, Ends>()
  for (const facet of group.facets) {
    const [lo, hi] = [ends.rows[0]?.[`lo ${facet}`] ?? null, ends.rows[0]?.[`hi ${facet}`] ?? null]
    if (lo !== null && hi !== null) found.set(facet, { lo, hi })
  }
  const facets = [...found.keys()]
  if (facets.length === 0) return []
  const bins = facets.map((facet, i) => ({ facet, name: `b${i}`, ...binSql(facet, found.get(facet) ?? { lo: 0, hi: 0 }) }))
  const names = bins.map((bin) => bin.name)
  const answer = await knex.raw<{ rows: (Record<string, number | null> & { which: number; count: number })[] }>(
    `SELECT GROUPING(${names.join(', ')})::int AS which, ${names.join(', ')}, count(*)::int AS count
     FROM (SELECT ${bins.map((bin) => `${bin.sql} AS ${bin.name}`).join(', ')} FROM (${rows.sql}) AS rows) AS binned
     GROUP BY GROUPING SETS (${names.map((name) => `(${name})`).join(', ')})`,
    [...bins.flatMap((bin) => bin.bindings), ...rows.bindings],
  )
  return answer.rows.flatMap((row) => {
    const bin = bins.find((b) => b.name === facetOf(names, row.which))
    const range = bin && found.get(bin.facet)
    return bin && range ? [{ facet: bin.facet, ...range, bin: row[bin.name] ?? null, count: row.count }] : []
  })
}

function binSql(facet: string, { lo, hi }: Ends): Fragment {
  const column = identifier(facet)
  if (lo === hi) return { sql: `CASE WHEN ${column} IS NOT NULL THEN 1 END`, bindings: [] }
  return { sql: `least(width_bucket(${column}, ?::float8, ?::float8, ${BINS}), CASE WHEN ${column} IS NOT NULL THEN ${BINS} END)`, bindings: [lo, hi] }
}

function choicesOf(facet: string, rows: readonly ChoiceRow[], filter: Filter, hosts: ReadonlyMap<string, string>): Facets['choices'][string] {
  const found = rows.filter((row) => row.facet === facet)
  // A chosen value stays visible when nothing is left of it, so that it can be let go.
  const gone = chosenValues(filter, facet).filter((value) => !found.some((row) => row.value === value))
  return [...found, ...gone.map((value) => ({ value, count: 0 }))]
    .map(({ value, count }) => ({ value, label: labelOf(facet, value, hosts), count }))
    .sort((a, b) => Number(a.value === null) - Number(b.value === null) || b.count - a.count || (a.label < b.label ? -1 : 1))
}

const NONE: Readonly<Record<string, string>> = { host: 'No host', distance_method: 'No distance' }
const RELATIONS: Readonly<Record<string, string>> = { host: 'Host of satellites', satellite: 'Satellite', field: 'In the field' }

function labelOf(facet: string, value: string | null, hosts: ReadonlyMap<string, string>): string {
  if (value === null) return NONE[facet] ?? 'None'
  if (facet === 'host') return hosts.get(value) ?? value
  if (facet === 'class') return classLabel(value as GalaxyClass)
  if (facet === 'host_relation') return RELATIONS[value] ?? value
  if (facet === 'distance_method') return METHODS.find((m) => m.key === value)?.label ?? value
  return value
}

function histogramOf(facet: string, rows: readonly BinRow[]): [string, Facets['histograms'][string]][] {
  const found = rows.filter((row) => row.facet === facet)
  const [first] = found
  if (!first) return []
  const counts = Array.from({ length: BINS }, (_, i) => found.find((row) => row.bin === i + 1)?.count ?? 0)
  return [[facet, { lo: first.lo, hi: first.hi, counts, missing: found.find((row) => row.bin === null)?.count ?? 0 }]]
}
