/** Checks a proposed change against the catalogue as it stands and records the version it is made from. */
import type { Knex } from 'knex'
import { nameKey } from '../../../core/names.ts'
import type { ChangeInput, ChangePayload } from '../../../core/schema/changes.ts'
import type { MeasurementInput } from '../../../core/schema/measurement.ts'
import { BadInput } from '../../http/errors.ts'
import type { FieldError } from '../../http/errors.ts'
import { currentRevision, galaxiesById, galaxiesBySlug, measurementsById, namesByKey, sourcesById } from './current.ts'
import type { HeldGalaxy, HeldMeasurement } from './current.ts'
import { galaxyFields, heldFields } from './fields.ts'
import type { GalaxyField } from './fields.ts'
import type { Base, ResolvedChange, StoredChange } from './types.ts'

const REFUSED = 'The change was not kept, and nothing else was touched. Mend the field named here and send it again.'

/**
 * @param siblings - the other changes of the same submission
 * @throws BadInput naming each field that cannot stand
 */
export async function resolveChange(knex: Knex, input: ChangeInput, siblings: readonly StoredChange[]): Promise<ResolvedChange> {
  const errors: FieldError[] = []
  const say = (path: string, message: string): void => void errors.push({ path, message })
  const base: Base = { atRevision: await currentRevision(knex), versionId: null, fields: {} }
  let galaxy: number | null = null

  switch (input.action) {
    case 'measurement.add': {
      galaxy = await referredGalaxy(knex, input.payload.galaxy, siblings, say)
      await checkMeasurement(knex, input.payload.measurement, galaxy, say)
      if (siblings.some((c) => c.action === 'measurement.add' && sameMeasurement(c.payload, input.payload))) {
        say('payload.measurement.value', 'This submission already adds that measurement.')
      }
      break
    }
    case 'measurement.replace':
    case 'measurement.exclude': {
      const held = await heldMeasurement(knex, input.payload.measurementId, siblings, say)
      if (!held) break
      galaxy = held.galaxyId
      base.versionId = held.versionId
      base.fields = heldFields(held)
      if (input.action === 'measurement.exclude') {
        if (held.excludedReason !== null) say('payload.measurementId', `This measurement is excluded already: ${held.excludedReason}`)
      } else {
        const { measurement } = input.payload
        if (measurement.quantity !== held.quantity) {
          say('payload.measurement.quantity', 'A slip in the quantity cannot be mended in place. Exclude this entry and add the right one.')
        }
        await checkMeasurement(knex, measurement, galaxy, say, held)
      }
      break
    }
    case 'galaxy.add': {
      checkNewNames(input.payload, say)
      break
    }
    case 'galaxy.amend': {
      const held = await heldGalaxy(knex, input.payload.galaxy.slug, say)
      if (!held) break
      if (siblings.some((c) => c.action === 'galaxy.amend' && c.galaxy === held.id)) {
        say('payload.galaxy.slug', `This submission already amends ${held.designation}. Change that entry instead.`)
      }
      galaxy = held.id
      base.versionId = held.versionId
      const now = galaxyFields(held)
      const moved = Object.entries(input.payload.set).filter(([, value]) => value !== undefined)
      for (const [field] of moved) base.fields[field] = now[field as GalaxyField]
      if (moved.every(([field, value]) => value === now[field as GalaxyField])) say('payload.set', `${held.designation} holds these values already.`)
      if (input.payload.set.designation !== undefined) await checkDesignation(knex, input.payload.set.designation, held.id, say)
      break
    }
    case 'name.add': {
      galaxy = await referredGalaxy(knex, input.payload.galaxy, siblings, say)
      await checkName(knex, input.payload, galaxy, siblings, say)
      break
    }
  }
  if (errors.length > 0) throw new BadInput(REFUSED, errors)
  return { input, base, galaxy }
}

type Say = (path: string, message: string) => void

async function heldGalaxy(knex: Knex, slug: string, say: Say): Promise<HeldGalaxy | undefined> {
  const held = (await galaxiesBySlug(knex, [slug])).get(slug)
  if (!held) say('payload.galaxy.slug', `The catalogue has no galaxy "${slug}".`)
  return held
}

/** The galaxy referred to, or null when another change of the submission adds it. */
async function referredGalaxy(knex: Knex, ref: { slug: string } | { change: number }, siblings: readonly StoredChange[], say: Say): Promise<number | null> {
  if ('slug' in ref) return (await heldGalaxy(knex, ref.slug, say))?.id ?? null
  if (!siblings.some((c) => c.id === ref.change && c.action === 'galaxy.add')) {
    say('payload.galaxy.change', 'No change of this submission with that number adds a galaxy.')
  }
  return null
}

async function heldMeasurement(knex: Knex, id: number, siblings: readonly StoredChange[], say: Say): Promise<HeldMeasurement | undefined> {
  const held = (await measurementsById(knex, [id])).get(id)
  if (!held) say('payload.measurementId', `The catalogue holds no measurement ${id}.`)
  const twice = siblings.some(
    (c) => (c.action === 'measurement.replace' || c.action === 'measurement.exclude') && c.payload.measurementId === id,
  )
  if (twice) say('payload.measurementId', 'This submission already changes that measurement. Change that entry instead.')
  return held
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

/** One published value of one galaxy from one source, whatever is noted beside it. */
function sameMeasurement(a: ChangePayload<'measurement.add'>, b: ChangePayload<'measurement.add'>): boolean {
  const told = ({ galaxy, measurement: m }: typeof a): string => JSON.stringify([galaxy, m.quantity, m.sourceId, m.value, m.textValue, m.unit, m.method, m.limitFlag])
  return told(a) === told(b)
}

async function checkDesignation(knex: Knex, name: string, galaxy: number, say: Say): Promise<void> {
  if (nameKey(name) === '') return say('payload.set.designation', 'A designation needs at least one letter or digit.')
  const other = (await namesByKey(knex, [nameKey(name)])).find((n) => n.galaxy !== galaxy)
  const owner = other && (await galaxiesById(knex, [other.galaxy])).get(other.galaxy)
  if (other) say('payload.set.designation', `"${name}" already names ${owner?.designation ?? 'another galaxy'}, and one name cannot mean two galaxies.`)
}

function checkNewNames(payload: { designation: string; names: readonly string[] }, say: Say): void {
  if (nameKey(payload.designation) === '') say('payload.designation', 'A designation needs at least one letter or digit.')
  payload.names.forEach((name, i) => {
    if (nameKey(name) === '') say(`payload.names.${i}`, 'A name needs at least one letter or digit.')
    if (name === payload.designation || payload.names.indexOf(name) !== i) say(`payload.names.${i}`, `"${name}" stands here twice.`)
  })
}

async function checkName(
  knex: Knex,
  payload: { galaxy: { slug: string } | { change: number }; name: string; sourceId: number | null },
  galaxy: number | null,
  siblings: readonly StoredChange[],
  say: Say,
): Promise<void> {
  const key = nameKey(payload.name)
  if (key === '') say('payload.name', 'A name needs at least one letter or digit.')
  if (payload.sourceId !== null && !(await sourcesById(knex, [payload.sourceId])).has(payload.sourceId)) {
    say('payload.sourceId', 'There is no such source. Choose one from the list, or leave it empty.')
  }
  const same = JSON.stringify(payload.galaxy)
  const again = siblings.some((c) => c.action === 'name.add' && c.payload.name === payload.name && JSON.stringify(c.payload.galaxy) === same)
  if (again) say('payload.name', 'This submission already adds that name.')
  if ('change' in payload.galaxy) {
    const { change } = payload.galaxy
    const added = siblings.find((c) => c.id === change)
    if (added?.action === 'galaxy.add' && [added.payload.designation, ...added.payload.names].includes(payload.name)) {
      say('payload.name', 'The change that adds this galaxy gives it that name already.')
    }
  }
  const held = await namesByKey(knex, [key])
  if (galaxy !== null && held.some((n) => n.galaxy === galaxy && n.name === payload.name)) say('payload.name', 'This galaxy has that name already.')
  const other = held.find((n) => n.galaxy !== galaxy)
  if (other) {
    const owner = (await galaxiesById(knex, [other.galaxy])).get(other.galaxy)
    say('payload.name', `"${payload.name}" already names ${owner?.designation ?? 'another galaxy'}, and one name cannot mean two galaxies.`)
  }
}
