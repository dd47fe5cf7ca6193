/** Whether the ground has moved under a change: field by field, what it was made from, what holds now, what it proposes, and who moved it. */
import type { Knex } from 'knex'
import { nameKey } from '../../../core/names.ts'
import type { Conflict } from '../../../core/problem.ts'
import type { Clash } from './clash.ts'
import { clashesOfOverrides } from './conflicts-overrides.ts'
import { clashesOfScale } from './conflicts-scale.ts'
import { galaxiesById, measurementsById, movers, namesByKey } from './current.ts'
import type { HeldName } from './current.ts'
import { fieldLabel, fieldWords, galaxyFields, heldFields, MEASUREMENT_FIELDS, statedFields } from './fields.ts'
import type { GalaxyField, MeasurementFields, Wording } from './fields.ts'
import { changesOf } from './types.ts'
import type { Plain, StoredChange, StoredChangeOf } from './types.ts'

/**
 * The conflicts of these changes with the catalogue as it stands, those of one change together. A field that somebody else moved to the very
 * value proposed is none, nor is a field that the change leaves alone.
 *
 * @param subjects - what each change is about, in words, by its id
 */
export async function conflictsOf(knex: Knex, changes: readonly StoredChange[], subjects: ReadonlyMap<number, string>, wording: Wording): Promise<Conflict[]> {
  const clashes = [
    ...(await ofGalaxies(knex, changes)),
    ...(await ofMeasurements(knex, changes, wording)),
    ...(await ofNames(knex, changes)),
    ...(await clashesOfOverrides(knex, changes)),
    ...(await clashesOfScale(knex, changes)),
  ]
  const by = await movers(knex, clashes.flatMap((c) => c.revision ?? []))
  return clashes.map((c) => ({
    change: c.change,
    subject: subjects.get(c.change) ?? '',
    field: fieldLabel(c.field),
    base: c.base,
    theirs: c.theirs,
    yours: c.yours,
    by: c.revision === null ? null : (by.get(c.revision)?.by ?? null),
    revision: c.revision,
  }))
}

async function ofGalaxies(knex: Knex, changes: readonly StoredChange[]): Promise<Clash[]> {
  const amended = changesOf(changes, 'galaxy.amend')
  const held = await galaxiesById(knex, amended.flatMap((c) => c.galaxy ?? []))
  return amended.flatMap((c) => {
    const now = c.galaxy === null ? undefined : held.get(c.galaxy)
    if (!now || !c.base || now.versionId === c.base.versionId) return []
    const fields = galaxyFields(now)
    const { base } = c
    return Object.entries(c.payload.set).flatMap(([field, yours]): Clash[] => {
      const theirs = fields[field as GalaxyField]
      if (yours === undefined || theirs === base.fields[field] || theirs === yours) return []
      return [{ change: c.id, field, base: base.fields[field] ?? null, theirs, yours, revision: now.revFrom }]
    })
  })
}

async function ofMeasurements(knex: Knex, changes: readonly StoredChange[], wording: Wording): Promise<Clash[]> {
  const touching = changes.filter(isTouching)
  const held = await measurementsById(knex, touching.map((c) => c.payload.measurementId))
  return touching.flatMap((c): Clash[] => {
    const now = held.get(c.payload.measurementId)
    const { base } = c
    if (!now) return [{ change: c.id, field: 'value', base: 'held', theirs: 'no longer held', yours: 'changed', revision: null }]
    if (!base || now.versionId === base.versionId) return []
    const fields = heldFields(now)
    const yours = proposedFields(c)
    return MEASUREMENT_FIELDS.flatMap((field): Clash[] => {
      const was = base.fields[field] ?? null
      if (fields[field] === was || (yours !== null && fields[field] === yours[field])) return []
      const words = (value: Plain): string | null => fieldWords(field, value, { ...wording, quantity: now.quantity })
      const proposed = c.action === 'measurement.replace' && yours !== null ? words(yours[field]) : c.action === 'measurement.restore' ? 'restored' : 'excluded'
      return [{ change: c.id, field, base: words(was), theirs: words(fields[field]), yours: proposed, revision: now.revFrom }]
    })
  })
}

type Touching = StoredChangeOf<'measurement.replace'> | StoredChangeOf<'measurement.exclude'> | StoredChangeOf<'measurement.restore'>

function isTouching(c: StoredChange): c is Touching {
  return c.action === 'measurement.replace' || c.action === 'measurement.exclude' || c.action === 'measurement.restore'
}

/** What a measurement would hold; null where nothing that others moved could agree with it. */
function proposedFields(c: Touching): MeasurementFields | null {
  const base = c.base?.fields as MeasurementFields | undefined
  if (!base || c.action === 'measurement.exclude') return null
  return c.action === 'measurement.restore' ? { ...base, excludedReason: null } : statedFields(c.payload.measurement, base.excludedReason as string | null)
}

/** A name that somebody gave to another galaxy (or to this one) since the change was made. */
async function ofNames(knex: Knex, changes: readonly StoredChange[]): Promise<Clash[]> {
  const wanted: { change: StoredChange; field: 'designation' | 'name'; name: string; galaxy: number | null }[] = [
    ...changesOf(changes, 'galaxy.add').flatMap((c) =>
      [c.payload.designation, ...c.payload.names].map((name, i) => ({ change: c, field: i === 0 ? ('designation' as const) : ('name' as const), name, galaxy: null })),
    ),
    ...changesOf(changes, 'name.add').map((c) => ({ change: c, field: 'name' as const, name: c.payload.name, galaxy: c.galaxy })),
  ]
  const held = new Map<string, HeldName[]>()
  for (const n of await namesByKey(knex, wanted.map((w) => nameKey(w.name)))) held.set(n.nameKey, [...(held.get(n.nameKey) ?? []), n])
  const owners = await galaxiesById(knex, [...held.values()].flat().map((n) => n.galaxy))
  return wanted.flatMap(({ change, field, name, galaxy }): Clash[] => {
    const since = change.base?.atRevision ?? 0
    const taken = held.get(nameKey(name))?.find((n) => n.revFrom > since && (n.galaxy !== galaxy || n.name === name))
    if (!taken) return []
    const owner = owners.get(taken.galaxy)?.designation ?? 'another galaxy'
    return [{ change: change.id, field, base: null, theirs: `${taken.name}, which now names ${owner}`, yours: name, revision: taken.revFrom }]
  })
}
