/** Measurements added, mended, excluded and restored: checked against the catalogue as it stands. */
import type { Knex } from 'knex'
import { overrideSubjectWords } from '../../../core/schema/changes.ts'
import type { ChangeInput, ChangePayload } from '../../../core/schema/changes.ts'
import type { MeasurementInput } from '../../../core/schema/measurement.ts'
import { measurementsById, sourcesById } from './current.ts'
import type { HeldMeasurement } from './current.ts'
import { overrideKey, overridesNow } from './current-scale.ts'
import { heldFields } from './fields.ts'
import { NO_GROUND } from './ground.ts'
import type { Ground, Say } from './ground.ts'
import { referredGalaxy } from './resolve-galaxies.ts'
import type { StoredChange } from './types.ts'

export async function resolveNewMeasurement(knex: Knex, payload: ChangePayload<'measurement.add'>, siblings: readonly StoredChange[], say: Say): Promise<Ground> {
  const galaxy = await referredGalaxy(knex, payload.galaxy, siblings, say)
  await checkMeasurement(knex, payload.measurement, galaxy, say)
  if (siblings.some((c) => c.action === 'measurement.add' && sameMeasurement(c.payload, payload))) {
    say('payload.measurement.value', 'This submission already adds that measurement.')
  }
  return { ...NO_GROUND, galaxy }
}

/** One published value of one galaxy from one source, whatever is noted beside it. */
function sameMeasurement(a: ChangePayload<'measurement.add'>, b: ChangePayload<'measurement.add'>): boolean {
  const told = ({ galaxy, measurement: m }: typeof a): string => JSON.stringify([galaxy, m.quantity, m.sourceId, m.value, m.textValue, m.unit, m.method, m.limitFlag])
  return told(a) === told(b)
}

type Touching = Extract<ChangeInput, { action: 'measurement.replace' | 'measurement.exclude' | 'measurement.restore' }>

/** Whether a change moves a measurement that is held. */
function touches(c: ChangeInput): c is Touching {
  return c.action === 'measurement.replace' || c.action === 'measurement.exclude' || c.action === 'measurement.restore'
}

export async function resolveTouched(knex: Knex, input: Touching, siblings: readonly StoredChange[], say: Say): Promise<Ground> {
  const id = input.payload.measurementId
  const held = (await measurementsById(knex, [id])).get(id)
  if (!held) say('payload.measurementId', `The catalogue holds no measurement ${id}.`)
  if (siblings.some((c) => touches(c) && c.payload.measurementId === id)) {
    say('payload.measurementId', 'This submission already changes that measurement. Change that entry instead.')
  }
  if (!held) return NO_GROUND
  switch (input.action) {
    case 'measurement.exclude':
      if (held.excludedReason !== null) say('payload.measurementId', `This measurement is excluded already: ${held.excludedReason}`)
      await checkOverride(knex, held, siblings, say)
      break
    case 'measurement.restore':
      if (held.excludedReason === null) say('payload.measurementId', 'This measurement is not excluded, so there is nothing to restore.')
      break
    case 'measurement.replace': {
      const { measurement } = input.payload
      if (measurement.quantity !== held.quantity) {
        say('payload.measurement.quantity', 'A slip in the quantity cannot be mended in place. Exclude this entry and add the right one.')
      }
      await checkMeasurement(knex, measurement, held.galaxyId, say, held)
    }
  }
  return { base: { versionId: held.versionId, fields: heldFields(held) }, galaxy: held.galaxyId }
}

/** What an override adopts cannot be excluded, unless this submission decides anew about that override too. */
async function checkOverride(knex: Knex, held: HeldMeasurement, siblings: readonly StoredChange[], say: Say): Promise<void> {
  const sibling = siblings.find((c) => (c.action === 'override.set' || c.action === 'override.clear') && c.galaxy === held.galaxyId && c.payload.about === held.quantity)
  const choice =
    sibling?.action === 'override.set' ? sibling.payload.choice
    : sibling ? null
    : ((await overridesNow(knex, [held.galaxyId])).get(overrideKey(held.galaxyId, held.quantity))?.choice ?? null)
  if (choice === null || !('measurements' in choice) || !choice.measurements.includes(held.id)) return
  say('payload.measurementId', `An override adopts the ${overrideSubjectWords(held.quantity)} from this measurement. Clear or change that override first.`)
}

async function checkMeasurement(knex: Knex, m: MeasurementInput, galaxy: number | null, say: Say, replaced?: HeldMeasurement): Promise<void> {
  if (!(await sourcesById(knex, [m.sourceId])).has(m.sourceId)) {
    say('payload.measurement.sourceId', 'There is no such source. Choose one from the list, or enter it first.')
  }
  if (m.anchor !== null && m.anchor !== replaced?.anchor) {
    const known = (await knex('anchors').select('key').where({ key: m.anchor }).whereNull('revTo').first()) as { key: string } | undefined
    if (!known) say('payload.measurement.anchor', `The scale has no anchor "${m.anchor}".`)
  }
  if (m.supersedes !== null) {
    const older = (await measurementsById(knex, [m.supersedes])).get(m.supersedes)
    if (!older || older.galaxyId !== galaxy) say('payload.measurement.supersedes', 'This galaxy holds no such measurement.')
    else if (older.quantity !== m.quantity) say('payload.measurement.supersedes', 'A measurement can only supersede one of the same quantity.')
    else if (older.id === replaced?.id) say('payload.measurement.supersedes', 'A measurement cannot supersede itself.')
  }
}
