/** Facets under a filter: how many rows each choice would leave, and how numbers are spread; each facet without its own condition. */
import type { Knex } from 'knex'
import { classLabel, type GalaxyClass } from '../../core/classes.ts'
import { chosenValues, type Filter } from '../../core/filters/filter.ts'
import { METHODS } from '../../core/methods.ts'
import type { Facets } from '../../core/schema/catalogue.ts'
import { holdsAt, partsAt, type Fragment, type ReadRevision } from './at-revision.ts'
import { all, filterFragments, identifier, type ColumnFragment } from './filter-sql.ts'

export const CHOICE_FACETS = ['host', 'class', 'status', 'host_relation', 'distance_method'] as const
export const HISTOGRAM_FACETS = ['distance', 'abs_v', 'abs_b', 'v_lg', 'tidal_index'] as const
const BINS = 40

interface ChoiceRow {
  facet: string
  value: string | null
  count: number
}

interface BinRow {
  facet: string
  lo: number
  hi: number
  bin: number | null
  count: number
}

export async function facetsOf(knex: Knex, filter: Filter, revision: ReadRevision): Promise<Facets> {
  const base = baseSql(await filterFragments(knex, filter, revision), revision)
  const [choices, bins] = await Promise.all([
    knex.raw<{ rows: ChoiceRow[] }>(`${base.sql} ${choicesSql()}`, base.bindings),
    knex.raw<{ rows: BinRow[] }>(`${base.sql} ${binsSql()}`, base.bindings),
  ])
  const total = choices.rows.find((row) => row.facet === '')?.count ?? 0
  const labels = await hostLabels(knex, [...choices.rows.filter((row) => row.facet === 'host').map((row) => row.value), ...chosenValues(filter, 'host')], revision)
  return {
    revision: revision.number,
    total,
    choices: Object.fromEntries(CHOICE_FACETS.map((facet) => [facet, choicesOf(facet, choices.rows, filter, labels)])),
    histograms: Object.fromEntries(HISTOGRAM_FACETS.flatMap((facet) => histogramOf(facet, bins.rows))),
  }
}

/**
 * The rows that all other conditions let through, with one flag a facet for that facet's own condition. Each facet then counts the rows whose
 * other flags are all up: one reading of the table serves all of them.
 */
function baseSql(fragments: readonly ColumnFragment[], revision: ReadRevision): Fragment {
  const facets = [...CHOICE_FACETS, ...HISTOGRAM_FACETS]
  const own = (facet: string): Fragment => all(fragments.filter((f) => f.column === facet))
  const others = fragments.filter((f) => f.column === null || !(facets as string[]).includes(f.column))
  const flags = facets.map((facet) => ({ facet, ...own(facet) }))
  const columns = facets.map(identifier).join(', ')
  const selects = partsAt(revision).map((part) => {
    const where = all([part, ...others])
    return {
      sql: `SELECT ${columns}, ${flags.map((f) => `(${f.sql}) AS "is_${f.facet}"`).join(', ')} FROM catalogue_rows WHERE ${where.sql}`,
      bindings: [...flags.flatMap((f) => f.bindings), ...where.bindings],
    }
  })
  return { sql: `WITH base AS MATERIALIZED (${selects.map((s) => s.sql).join(' UNION ALL ')})`, bindings: selects.flatMap((s) => s.bindings) }
}

/** True for rows that every facet's condition but this one's lets through. */
function otherFlags(facet: string): string {
  return [...CHOICE_FACETS, ...HISTOGRAM_FACETS].filter((other) => other !== facet).map((other) => `"is_${other}"`).join(' AND ')
}

function choicesSql(): string {
  const counts = CHOICE_FACETS.map((facet) => `SELECT '${facet}' AS facet, ${identifier(facet)} AS value, count(*)::int AS count FROM base WHERE ${otherFlags(facet)} GROUP BY 2`)
  return [...counts, `SELECT '', NULL, count(*)::int FROM base WHERE ${otherFlags('')}`].join(' UNION ALL ')
}

/** Bins over [lowest, highest]; the highest value belongs to the last bin. A bin without number counts the missing values. */
function binsSql(): string {
  return HISTOGRAM_FACETS.map((facet) => {
    const column = identifier(facet)
    return `(WITH rows AS (SELECT ${column} AS value FROM base WHERE ${otherFlags(facet)}),
      ends AS (SELECT min(value) AS lo, max(value) AS hi FROM rows)
      SELECT '${facet}' AS facet, ends.lo, ends.hi,
        CASE WHEN rows.value IS NULL THEN NULL WHEN ends.lo = ends.hi THEN 1 ELSE least(width_bucket(rows.value, ends.lo, ends.hi, ${BINS}), ${BINS}) END AS bin,
        count(*)::int AS count
      FROM rows CROSS JOIN ends WHERE ends.lo IS NOT NULL GROUP BY 2, 3, 4)`
  }).join(' UNION ALL ')
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

async function hostLabels(knex: Knex, slugs: readonly (string | null)[], revision: ReadRevision): Promise<Map<string, string>> {
  const wanted = [...new Set(slugs.filter((slug) => slug !== null))]
  if (wanted.length === 0) return new Map()
  return namesOf(knex, wanted, revision)
}

/** Names by slug at a revision. */
export async function namesOf(knex: Knex, slugs: readonly string[], revision: ReadRevision): Promise<Map<string, string>> {
  const holds = holdsAt(revision)
  const answer = await knex.raw<{ rows: { slug: string; name: string }[] }>(
    `SELECT slug, name FROM catalogue_rows WHERE slug = ANY (?::text[]) AND ${holds.sql()}`,
    [slugs as unknown as Knex.RawBinding, ...holds.bindings],
  )
  return new Map(answer.rows.map((row) => [row.slug, row.name]))
}
