/** What the computation reads: the versioned tables as they stand inside a transaction. */
import type { Knex } from 'knex'
import type { Chosen, Scale } from '../../../core/adoption/adopted.ts'
import type { Anchor, Galaxy, Measurement } from '../../../core/catalogue/types.ts'
import { sourcesById } from '../changes/current.ts'
import { policySchema } from '../../../core/scale/policy.ts'

/** The adopted anchors and the policy. @throws Error when the catalogue has no policy yet */
export async function loadScale(trx: Knex): Promise<Scale> {
  const anchors = (await trx('anchors').whereNull('revTo').select('key', 'label', 'kind', 'methods', 'value', 'err', 'source')) as Anchor[]
  const policy = (await trx('policies').whereNull('revTo').first('document')) as { document: unknown } | undefined
  if (!policy) throw new Error('the catalogue has no adoption policy; it was never laid')
  return { anchors, policy: policySchema.parse(policy.document) }
}

/** Ids of all galaxies that hold now, in strips of declination: whoever is near in the sky is mostly near in the list. */
export async function galaxiesAcrossTheSky(trx: Knex): Promise<number[]> {
  const { rows } = (await trx.raw('select galaxy from galaxy_versions where rev_to is null order by floor((dec + 90) / 6), ra, galaxy')) as { rows: { galaxy: number }[] }
  return rows.map((row) => row.galaxy)
}

export async function loadGalaxies(trx: Knex, ids: readonly number[]): Promise<Galaxy[]> {
  const rows = (await trx('galaxyVersions')
    .whereNull('revTo')
    .whereRaw('galaxy = any(?)', [[...ids]])
    .select('galaxy', 'id', 'slug', 'designation', 'status', 'class', 'ra', 'dec', 'note')) as (Omit<Galaxy, 'id' | 'versionId'> & { galaxy: number; id: number })[]
  return rows.map(({ galaxy, id, ...rest }) => ({ ...rest, id: galaxy, versionId: id }))
}

/** Fields that adoption asks for, in the order in which they are read: a million rows are, so they come as bare lists. */
type MeasurementFields = [
  id: number, versionId: number, galaxyId: number, quantity: Measurement['quantity'], value: number | null, errPlus: number | null, errMinus: number | null, errSys: number | null,
  textValue: string | null, limitFlag: Measurement['limitFlag'], method: Measurement['method'], anchor: string | null, anchorValueAssumed: number | null,
  convention: Measurement['convention'], sourceId: number, excludedReason: string | null, supersedes: number | null,
]

/** All measurements held of these galaxies, with what their sources are called; without what only people read (as published, where, notes). */
export async function loadMeasurements(trx: Knex, galaxyIds: readonly number[]): Promise<Measurement[]> {
  const { rows } = (await trx
    .raw(
      `select lineage, id, galaxy, quantity, value, err_plus, err_minus, err_sys, text_value, limit_flag, method, anchor, anchor_value_assumed, convention, source,
              excluded_reason, supersedes
         from measurements where rev_to is null and galaxy = any(?)`,
      [[...galaxyIds]],
    )
    .options({ rowMode: 'array' })) as { rows: MeasurementFields[] }
  const sources = await sourcesById(trx, rows.map((row) => row[14]))
  return rows.map(([id, versionId, galaxyId, quantity, value, errPlus, errMinus, errSys, textValue, limitFlag, method, anchor, anchorValueAssumed, convention, sourceId, excludedReason, supersedes]) => {
    const source = sources.get(sourceId)
    return {
      id, versionId, galaxyId, quantity, value, errPlus, errMinus, errSys, textValue, limitFlag, method, anchor, anchorValueAssumed, convention, sourceId, excludedReason, supersedes,
      sourceLabel: source?.label ?? '', sourceYear: source?.year ?? 0, published: null, locator: null, note: null,
    }
  })
}

/** Overrides by galaxy and quantity: `"12 distance_modulus"`. */
export async function loadOverrides(trx: Knex, galaxyIds: readonly number[]): Promise<Map<string, Chosen>> {
  const rows = (await trx('overrides').whereNull('revTo').whereRaw('galaxy = any(?)', [[...galaxyIds]]).select('galaxy', 'about', 'choice', 'reason')) as {
    galaxy: number
    about: string
    choice: { measurements?: number[] }
    reason: string
  }[]
  return new Map(rows.flatMap((r) => (r.choice.measurements ? [[`${r.galaxy} ${r.about}`, { measurements: r.choice.measurements, reason: r.reason }] as const] : [])))
}

/** Hosts that people decided on: the host (id), or null for none, by galaxy. A choice is kept by slug, which a galaxy may have given up since. */
export async function loadHostOverrides(trx: Knex): Promise<Map<number, number | null>> {
  const { rows } = (await trx.raw(
    `select o.galaxy, o.choice ->> 'host' is null as none,
            (select v.galaxy from galaxy_versions v where v.slug = o.choice ->> 'host' order by v.rev_to is null desc, v.rev_from desc limit 1) as host
       from overrides o where o.rev_to is null and o.about = 'host'`,
  )) as { rows: { galaxy: number; none: boolean; host: number | null }[] }
  return new Map(rows.flatMap((r) => (r.none || r.host !== null ? [[r.galaxy, r.none ? null : r.host] as const] : [])))
}
