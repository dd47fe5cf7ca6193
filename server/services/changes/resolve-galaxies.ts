/** New galaxies, amended ones, and names: checked against the catalogue as it stands. */
import type { Knex } from 'knex'
import { nameKey } from '../../../core/names.ts'
import type { ChangePayload } from '../../../core/schema/changes.ts'
import { galaxiesById, galaxiesBySlug, namesByKey, sourcesById } from './current.ts'
import type { HeldGalaxy } from './current.ts'
import { galaxyFields } from './fields.ts'
import type { GalaxyField } from './fields.ts'
import { NO_GROUND } from './ground.ts'
import type { Ground, Say } from './ground.ts'
import type { Base, StoredChange } from './types.ts'

/** The galaxy with this slug, which a change may speak of. */
export async function heldGalaxy(knex: Knex, slug: string, say: Say, path = 'payload.galaxy.slug'): Promise<HeldGalaxy | undefined> {
  const held = (await galaxiesBySlug(knex, [slug])).get(slug)
  if (!held) say(path, `The catalogue has no galaxy "${slug}".`)
  return held
}

/** The galaxy referred to, or null when another change of the submission adds it. */
export async function referredGalaxy(knex: Knex, ref: { slug: string } | { change: number }, siblings: readonly StoredChange[], say: Say): Promise<number | null> {
  if ('slug' in ref) return (await heldGalaxy(knex, ref.slug, say))?.id ?? null
  if (!siblings.some((c) => c.id === ref.change && c.action === 'galaxy.add')) {
    say('payload.galaxy.change', 'No change of this submission with that number adds a galaxy.')
  }
  return null
}

export async function resolveNewGalaxy(payload: ChangePayload<'galaxy.add'>, say: Say): Promise<Ground> {
  if (nameKey(payload.designation) === '') say('payload.designation', 'A designation needs at least one letter or digit.')
  payload.names.forEach((name, i) => {
    if (nameKey(name) === '') say(`payload.names.${i}`, 'A name needs at least one letter or digit.')
    if (name === payload.designation || payload.names.indexOf(name) !== i) say(`payload.names.${i}`, `"${name}" stands here twice.`)
  })
  return Promise.resolve(NO_GROUND)
}

export async function resolveAmendment(knex: Knex, payload: ChangePayload<'galaxy.amend'>, siblings: readonly StoredChange[], say: Say): Promise<Ground> {
  const held = await heldGalaxy(knex, payload.galaxy.slug, say)
  if (!held) return NO_GROUND
  if (siblings.some((c) => c.action === 'galaxy.amend' && c.galaxy === held.id)) {
    say('payload.galaxy.slug', `This submission already amends ${held.designation}. Change that entry instead.`)
  }
  const now = galaxyFields(held)
  const moved = Object.entries(payload.set).filter(([, value]) => value !== undefined)
  const fields: Base['fields'] = Object.fromEntries(moved.map(([field]) => [field, now[field as GalaxyField]]))
  if (moved.every(([field, value]) => value === now[field as GalaxyField])) say('payload.set', `${held.designation} holds these values already.`)
  if (payload.set.designation !== undefined) await checkDesignation(knex, payload.set.designation, held.id, say)
  return { base: { versionId: held.versionId, fields }, galaxy: held.id }
}

async function checkDesignation(knex: Knex, name: string, galaxy: number, say: Say): Promise<void> {
  if (nameKey(name) === '') return say('payload.set.designation', 'A designation needs at least one letter or digit.')
  const other = (await namesByKey(knex, [nameKey(name)])).find((n) => n.galaxy !== galaxy)
  const owner = other && (await galaxiesById(knex, [other.galaxy])).get(other.galaxy)
  if (other) say('payload.set.designation', `"${name}" already names ${owner?.designation ?? 'another galaxy'}, and one name cannot mean two galaxies.`)
}

export async function resolveNewName(knex: Knex, payload: ChangePayload<'name.add'>, siblings: readonly StoredChange[], say: Say): Promise<Ground> {
  const galaxy = await referredGalaxy(knex, payload.galaxy, siblings, say)
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
  return { ...NO_GROUND, galaxy }
}
