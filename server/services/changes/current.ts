/** What changes speak of, as it holds now: galaxies, measurements, names, sources, anchors. */
import type { Knex } from 'knex'
import type { Galaxy, Measurement } from '../../../core/catalogue/types.ts'
import type { QuantityKey } from '../../../core/quantities.ts'

/** Who moved a version, and in which revision. */
export interface Mover {
  by: string | null
  revision: number
}

export type HeldGalaxy = Galaxy & { revFrom: number }
export type HeldMeasurement = Measurement & { revFrom: number }

const GALAXY_COLUMNS = ['galaxy as id', 'id as versionId', 'slug', 'designation', 'status', 'class', 'ra', 'dec', 'note', 'revFrom']

/** Galaxies as they stand now, by id. */
export async function galaxiesById(knex: Knex, ids: Iterable<number>): Promise<Map<number, HeldGalaxy>> {
  const wanted = [...new Set(ids)]
  if (wanted.length === 0) return new Map()
  const rows = (await knex('galaxyVersions').select(GALAXY_COLUMNS).whereRaw('galaxy = ANY(?)', [wanted]).whereNull('revTo')) as HeldGalaxy[]
  return new Map(rows.map((g) => [g.id, g]))
}

/** Galaxies as they stand now, by slug. */
export async function galaxiesBySlug(knex: Knex, slugs: Iterable<string>): Promise<Map<string, HeldGalaxy>> {
  const wanted = [...new Set(slugs)]
  if (wanted.length === 0) return new Map()
  const rows = (await knex('galaxyVersions').select(GALAXY_COLUMNS).whereRaw('slug = ANY(?)', [wanted]).whereNull('revTo')) as HeldGalaxy[]
  return new Map(rows.map((g) => [g.slug, g]))
}

const MEASUREMENT_COLUMNS = [
  'm.lineage as id', 'm.id as versionId', 'm.galaxy as galaxyId', 'm.quantity', 'm.value', 'm.errPlus', 'm.errMinus', 'm.errSys', 'm.textValue',
  'm.limitFlag', 'm.method', 'm.anchor', 'm.anchorValueAssumed', 'm.convention', 'm.published', 'm.source as sourceId', 's.label as sourceLabel',
  's.year as sourceYear', 'm.locator', 'm.note', 'm.excludedReason', 'm.supersedes', 'm.revFrom',
]

/** Measurements as they stand now, by their lasting id. */
export async function measurementsById(knex: Knex, ids: Iterable<number>): Promise<Map<number, HeldMeasurement>> {
  const wanted = [...new Set(ids)]
  if (wanted.length === 0) return new Map()
  const rows = (await knex('measurements as m')
    .join('sources as s', 's.id', 'm.source')
    .select(MEASUREMENT_COLUMNS)
    .whereRaw('m.lineage = ANY(?)', [wanted])
    .whereNull('m.revTo')) as HeldMeasurement[]
  return new Map(rows.map((m) => [m.id, m]))
}

/** All measurements held now of these galaxies. */
export async function measurementsOfGalaxies(knex: Knex, galaxies: Iterable<number>, quantities?: readonly QuantityKey[]): Promise<HeldMeasurement[]> {
  const wanted = [...new Set(galaxies)]
  if (wanted.length === 0) return []
  const query = knex('measurements as m')
    .join('sources as s', 's.id', 'm.source')
    .select(MEASUREMENT_COLUMNS)
    .whereRaw('m.galaxy = ANY(?)', [wanted])
    .whereNull('m.revTo')
    .orderBy('m.lineage')
  if (quantities) void query.whereRaw('m.quantity = ANY(?)', [[...quantities]])
  return (await query) as HeldMeasurement[]
}

export interface HeldName {
  id: number
  galaxy: number
  name: string
  nameKey: string
  preferred: boolean
  source: number | null
  revFrom: number
}

/** Names held now under these keys (core/names.ts), of any galaxy. */
export async function namesByKey(knex: Knex, keys: Iterable<string>): Promise<HeldName[]> {
  const wanted = [...new Set(keys)]
  if (wanted.length === 0) return []
  return (await knex('galaxyNames')
    .select('id', 'galaxy', 'name', 'nameKey', 'preferred', 'source', 'revFrom')
    .whereRaw('name_key = ANY(?)', [wanted])
    .whereNull('revTo')) as HeldName[]
}

export interface KnownSource {
  id: number
  label: string
  year: number
}

/** Sources by id. */
export async function sourcesById(knex: Knex, ids: Iterable<number>): Promise<Map<number, KnownSource>> {
  const wanted = [...new Set(ids)]
  if (wanted.length === 0) return new Map()
  const rows = (await knex('sources').select('id', 'label', 'year').whereRaw('id = ANY(?)', [wanted])) as KnownSource[]
  return new Map(rows.map((s) => [s.id, s]))
}

/** By whom each of these revisions was made: the author of the submission, or who approved it where there was none. */
export async function movers(knex: Knex, revisions: Iterable<number>): Promise<Map<number, Mover>> {
  const wanted = [...new Set(revisions)]
  if (wanted.length === 0) return new Map()
  const rows = (await knex('revisions as r')
    .leftJoin('submissions as s', 's.id', 'r.submission')
    .leftJoin('users as a', 'a.id', 's.author')
    .leftJoin('users as p', 'p.id', 'r.approvedBy')
    .select('r.number as revision', knex.raw('coalesce(a.name, p.name) as by'))
    .whereRaw('r.number = ANY(?)', [wanted])) as Mover[]
  return new Map(rows.map((m) => [m.revision, m]))
}

/** The catalogue's newest revision; 0 before the first. */
export async function currentRevision(knex: Knex): Promise<number> {
  const row = (await knex('revisions').max('number as number').first()) as { number: number | null } | undefined
  return row?.number ?? 0
}
