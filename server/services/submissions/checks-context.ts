/** Gathers what the automatic checks need of the catalogue, and asks them about each change. */
import type { Knex } from 'knex'
import { checkMeasurement, checkNewGalaxy } from '../../../core/checks/run.ts'
import { nameKey } from '../../../core/names.ts'
import type { Check } from '../../../core/schema/submissions.ts'
import { galaxiesById, measurementsOfGalaxies, namesByKey } from '../changes/current.ts'
import type { HeldMeasurement } from '../changes/current.ts'
import { galaxiesNear } from '../changes/near.ts'
import type { Vocabulary } from '../changes/present.ts'
import { changesOf } from '../changes/types.ts'
import type { StoredChange, StoredChangeOf } from '../changes/types.ts'
import { loadScale } from '../revision/load.ts'

/** A new galaxy so near another one may be the same, deg. */
const NEAR_DEG = 3 / 60
const MOST_NEAR = 3

/** What the checks find, by change. */
export async function checksOf(knex: Knex, changes: readonly StoredChange[], vocabulary: Vocabulary): Promise<Map<number, Check[]>> {
  const additions = changesOf(changes, 'galaxy.add')
  const measurements = [...changesOf(changes, 'measurement.add'), ...changesOf(changes, 'measurement.replace')]
  return new Map([...(await ofGalaxies(knex, additions)), ...(await ofMeasurements(knex, measurements, vocabulary))])
}

/** The findings that forbid going on, each with the change's subject before it. */
export function stopsIn(changes: readonly StoredChange[], checks: ReadonlyMap<number, readonly Check[]>, subjects: ReadonlyMap<number, string>): { change: number; subject: string; sentence: string }[] {
  return changes.flatMap((c) =>
    (checks.get(c.id) ?? []).filter((check) => check.level === 'stop').map((check) => ({ change: c.id, subject: subjects.get(c.id) ?? '', sentence: check.sentence })),
  )
}

async function ofGalaxies(knex: Knex, additions: readonly StoredChangeOf<'galaxy.add'>[]): Promise<[number, Check[]][]> {
  if (additions.length === 0) return []
  const near = await galaxiesNear(knex, new Map(additions.map((c) => [String(c.id), c.payload])), NEAR_DEG, MOST_NEAR)
  const held = new Map((await namesByKey(knex, additions.flatMap((c) => [c.payload.designation, ...c.payload.names].map(nameKey)))).map((n) => [n.nameKey, n]))
  const owners = await galaxiesById(knex, [...held.values()].map((n) => n.galaxy))
  return additions.map((c) => {
    const borne = [c.payload.designation, ...c.payload.names].flatMap((name) => {
      const owner = held.get(nameKey(name))
      return owner ? [{ name, galaxy: owners.get(owner.galaxy)?.designation ?? owner.name }] : []
    })
    return [c.id, checkNewGalaxy(c.payload, { near: near.get(String(c.id)) ?? [], borne })]
  })
}

type MeasurementChange = StoredChangeOf<'measurement.add'> | StoredChangeOf<'measurement.replace'>

async function ofMeasurements(knex: Knex, changes: readonly MeasurementChange[], vocabulary: Vocabulary): Promise<[number, Check[]][]> {
  if (changes.length === 0) return []
  const scale = await loadScale(knex)
  const held = new Map<number, HeldMeasurement[]>()
  for (const m of await measurementsOfGalaxies(knex, changes.flatMap((c) => c.galaxy ?? []))) {
    const list = held.get(m.galaxyId)
    if (list) list.push(m)
    else held.set(m.galaxyId, [m])
  }
  return changes.map((c) => {
    const { measurement } = c.payload
    const galaxy = c.galaxy === null ? nameOfAdded(c, vocabulary) : (vocabulary.galaxies.get(c.galaxy)?.designation ?? 'The galaxy')
    const surroundings = {
      galaxy, scale,
      held: c.galaxy === null ? [] : (held.get(c.galaxy) ?? []),
      sourceLabel: vocabulary.sources.get(measurement.sourceId)?.label ?? 'this source',
    }
    return [c.id, checkMeasurement({ measurement, replaces: c.action === 'measurement.replace' ? c.payload.measurementId : null }, surroundings)]
  })
}

function nameOfAdded(c: MeasurementChange, vocabulary: Vocabulary): string {
  const ref = c.action === 'measurement.add' ? c.payload.galaxy : null
  return (ref && 'change' in ref ? vocabulary.added.get(ref.change) : undefined) ?? 'The galaxy'
}
