/** A small catalogue for the tests of the desk: the scale, a source or two, and what tests propose. */
import type { Knex } from 'knex'
import type { ChangeForm } from '../../../core/schema/changes.ts'
import type { MeasurementForm } from '../../../core/schema/measurement.ts'
import { layTheScale } from '../../../seeds/genesis.ts'

export interface Ground {
  source: number
  otherSource: number
}

/** The scale as revision 1, and two sources. */
export async function layGround(knex: Knex): Promise<Ground> {
  await knex.transaction((trx) => layTheScale(trx, null, new Date('2026-01-01T00:00:00Z')))
  const made = (await knex('sources')
    .insert(
      ['Ansel et al. 2021', 'Berk & Ito 2023'].map((label) => ({
        label, title: `Distances of ${label}`, authors: JSON.stringify(['Ansel, B.']), year: 2021, kind: 'demonstration', venue: 'Demonstration 1 1',
      })),
    )
    .returning('id')) as { id: number }[]
  return { source: made[0]?.id ?? 0, otherSource: made[1]?.id ?? 0 }
}

export const galaxyAdd = (designation: string, ra = 10, dec = 20): ChangeForm => ({
  action: 'galaxy.add', payload: { designation, ra, dec, class: 'dwarf-irregular', status: 'confirmed' },
})

export const modulus = (sourceId: number, value = 27.5, more: Partial<MeasurementForm> = {}): MeasurementForm => ({
  quantity: 'distance_modulus', value, errPlus: 0.1, errMinus: 0.1, unit: 'mag', method: 'trgb', sourceId, ...more,
})

export const measurementAdd = (galaxy: { slug: string } | { change: number }, measurement: MeasurementForm): ChangeForm => ({
  action: 'measurement.add', payload: { galaxy, measurement },
})

/** How many rows every table of the catalogue and the desk has: "nothing was changed" is this staying the same. */
export async function footprint(knex: Knex): Promise<string> {
  const tables = ['galaxies', 'galaxy_versions', 'galaxy_names', 'measurements', 'adopted_values', 'catalogue_rows', 'revisions', 'submissions', 'changes', 'submission_versions', 'reviews', 'remarks', 'sources', 'imports', 'import_rows']
  const { rows } = (await knex.raw(
    tables.map((t) => `SELECT '${t}' AS of, count(*)::int AS rows, coalesce(md5(string_agg(x::text, '|' ORDER BY x::text)), '') AS content FROM ${t} AS x`).join(' UNION ALL ') + ' ORDER BY 1',
  )) as { rows: unknown[] }
  return JSON.stringify(rows)
}
