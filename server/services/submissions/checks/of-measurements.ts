/** What the checks of measurements need of the catalogue: what is held, who else has the value, the source, who would change host. */
import type { Knex } from 'knex'
import { canonicalOf } from '../../../../core/checks/canonical.ts'
import { checkExclusion, checkMeasurement } from '../../../../core/checks/run.ts'
import type { Check } from '../../../../core/schema/submissions.ts'
import { measurementsOfGalaxies } from '../../changes/current.ts'
import type { HeldMeasurement } from '../../changes/current.ts'
import type { Vocabulary } from '../../changes/present.ts'
import { changesOf } from '../../changes/types.ts'
import type { StoredChange, StoredChangeOf } from '../../changes/types.ts'
import { loadScale } from '../../revision/load.ts'
import { elsewhereOf } from './elsewhere.ts'
import { outlooksOf } from './outlook.ts'
import { sourcesLack } from './sources-lack.ts'

export type MeasurementChange = StoredChangeOf<'measurement.add'> | StoredChangeOf<'measurement.replace'>

/** Proposed as the checks take it. */
export function proposedBy(c: MeasurementChange): { measurement: MeasurementChange['payload']['measurement']; replaces: number | null } {
  return { measurement: c.payload.measurement, replaces: c.action === 'measurement.replace' ? c.payload.measurementId : null }
}

export async function checksOfMeasurements(knex: Knex, changes: readonly StoredChange[], vocabulary: Vocabulary): Promise<[number, Check[]][]> {
  const stated: MeasurementChange[] = [...changesOf(changes, 'measurement.add'), ...changesOf(changes, 'measurement.replace')]
  const excluded = changesOf(changes, 'measurement.exclude')
  if (stated.length + excluded.length === 0) return []
  const scale = await loadScale(knex)
  const held = byGalaxy(await measurementsOfGalaxies(knex, [...stated, ...excluded].flatMap((c) => c.galaxy ?? [])))
  const heldOf = (galaxy: number | null): readonly HeldMeasurement[] => (galaxy === null ? [] : (held.get(galaxy) ?? []))
  const values = new Map(stated.map((c) => [c.id, canonicalOf(proposedBy(c))]))
  const name = (c: MeasurementChange): string => nameIn(c, vocabulary)
  const [elsewhere, lacks, outlooks] = [
    await elsewhereOf(knex, stated, values, name), await sourcesLack(knex, stated.map((c) => c.payload.measurement.sourceId)), await outlooksOf(knex, stated, heldOf, scale),
  ]
  const ofStated = stated.map((c): [number, Check[]] => {
    const { sourceId } = c.payload.measurement
    const surroundings = {
      galaxy: name(c), position: positionIn(c, changes, vocabulary), held: heldOf(c.galaxy), scale, sourceLabel: vocabulary.sources.get(sourceId)?.label ?? 'this source',
      sourceLacks: lacks.get(sourceId) ?? [], elsewhere: elsewhere.get(c.id) ?? [], outlook: outlooks.get(c.id) ?? null,
    }
    return [c.id, checkMeasurement(proposedBy(c), surroundings)]
  })
  const ofExcluded = excluded.map((c): [number, Check[]] => {
    const own = heldOf(c.galaxy).find((m) => m.id === c.payload.measurementId)
    const found = own && checkExclusion(own, heldOf(c.galaxy), scale)
    return [c.id, found ? [found] : []]
  })
  return [...ofStated, ...ofExcluded]
}

function byGalaxy(list: readonly HeldMeasurement[]): Map<number, HeldMeasurement[]> {
  const held = new Map<number, HeldMeasurement[]>()
  for (const m of list) {
    const own = held.get(m.galaxyId)
    if (own) own.push(m)
    else held.set(m.galaxyId, [m])
  }
  return held
}

function nameIn(c: MeasurementChange, vocabulary: Vocabulary): string {
  if (c.galaxy !== null) return vocabulary.galaxies.get(c.galaxy)?.designation ?? 'The galaxy'
  const ref = c.action === 'measurement.add' ? c.payload.galaxy : null
  return (ref && 'change' in ref ? vocabulary.added.get(ref.change) : undefined) ?? 'The galaxy'
}

function positionIn(c: MeasurementChange, changes: readonly StoredChange[], vocabulary: Vocabulary): { ra: number; dec: number } | null {
  const held = c.galaxy === null ? undefined : vocabulary.galaxies.get(c.galaxy)
  if (held) return { ra: held.ra, dec: held.dec }
  const ref = c.action === 'measurement.add' ? c.payload.galaxy : null
  const added = ref && 'change' in ref ? changesOf(changes, 'galaxy.add').find((a) => a.id === ref.change) : undefined
  return added ? { ra: added.payload.ra, dec: added.payload.dec } : null
}
