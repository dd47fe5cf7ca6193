/** Overrides set and cleared: checked against the catalogue as it stands. */
import type { Knex } from 'knex'
import { canonicalWords } from '../../../core/formats/measure-words.ts'
import { overrideSubjectWords } from '../../../core/schema/changes.ts'
import type { ChangeInput, OverrideSubject } from '../../../core/schema/changes.ts'
import { galaxiesBySlug, measurementsById } from './current.ts'
import type { HeldGalaxy } from './current.ts'
import { overrideKey, overridesNow } from './current-scale.ts'
import type { HeldOverride } from './current-scale.ts'
import { choiceText, choiceWords, choiceWordsOf } from './override-words.ts'
import { NO_GROUND } from './ground.ts'
import type { Ground, Say } from './ground.ts'
import { heldGalaxy } from './resolve-galaxies.ts'
import type { StoredChange } from './types.ts'

type OverrideInput = Extract<ChangeInput, { action: 'override.set' | 'override.clear' }>

export async function resolveOverride(knex: Knex, input: OverrideInput, siblings: readonly StoredChange[], say: Say): Promise<Ground> {
  const galaxy = await heldGalaxy(knex, input.payload.galaxy.slug, say)
  if (!galaxy) return NO_GROUND
  const { about } = input.payload
  const subject = overrideSubjectWords(about)
  if (siblings.some((c) => (c.action === 'override.set' || c.action === 'override.clear') && c.galaxy === galaxy.id && c.payload.about === about)) {
    say('payload.about', `This submission already decides about the ${subject} of ${galaxy.designation}. Change that entry instead.`)
  }
  const held = (await overridesNow(knex, [galaxy.id])).get(overrideKey(galaxy.id, about))
  if (input.action === 'override.clear') {
    if (!held) say('payload.about', `No override decides about the ${subject} of ${galaxy.designation}, so there is none to clear.`)
  } else {
    const { choice } = input.payload
    if (held && choiceText(held.choice) === choiceText(choice) && held.reason === input.payload.reason) say('payload.choice', 'An override says this already.')
    if ('measurements' in choice) await checkMeasurements(knex, galaxy, about, choice.measurements, siblings, say)
    else await checkHost(knex, galaxy, choice.host, siblings, say)
  }
  return {
    base: { versionId: held?.versionId ?? null, fields: { choice: held ? choiceText(held.choice) : null, reason: held?.reason ?? null, stands: await standing(knex, galaxy, about, held) } },
    galaxy: galaxy.id,
  }
}

async function checkMeasurements(knex: Knex, galaxy: HeldGalaxy, about: OverrideSubject, ids: readonly number[], siblings: readonly StoredChange[], say: Say): Promise<void> {
  const held = await measurementsById(knex, ids)
  ids.forEach((id, i) => {
    const m = held.get(id)
    const path = `payload.choice.measurements.${i}`
    if (!m || m.galaxyId !== galaxy.id) return say(path, `${galaxy.designation} holds no measurement ${id}.`)
    if (m.quantity !== about) return say(path, `Measurement ${id}, of ${m.sourceLabel}, is none of the ${overrideSubjectWords(about)}.`)
    const restored = siblings.some((c) => c.action === 'measurement.restore' && c.payload.measurementId === id)
    if (m.excludedReason !== null && !restored) return say(path, `The measurement of ${m.sourceLabel} is excluded: ${m.excludedReason} Restore it first.`)
    if (siblings.some((c) => c.action === 'measurement.exclude' && c.payload.measurementId === id)) return say(path, `This submission excludes the measurement of ${m.sourceLabel}.`)
    if (m.limitFlag !== null) say(path, `${m.sourceLabel} gives a limit, which says what the value is not. Choose a measured value.`)
  })
}

async function checkHost(knex: Knex, galaxy: HeldGalaxy, slug: string | null, siblings: readonly StoredChange[], say: Say): Promise<void> {
  const path = 'payload.choice.host'
  const placed = await placesOf(knex, slug === null ? [galaxy.slug] : [galaxy.slug, slug])
  if (!placed.has(galaxy.slug)) say('payload.galaxy.slug', `${galaxy.designation} has no distance, so it cannot be placed among hosts. Add a distance first.`)
  if (slug === null) return
  if (slug === galaxy.slug) return say(path, 'A galaxy cannot be its own host.')
  const host = await heldGalaxy(knex, slug, say, path)
  if (!host) return
  if (host.status === 'withdrawn') return say(path, `${host.designation} is withdrawn. Choose another host, or none.`)
  if (!placed.has(slug)) return say(path, `${host.designation} has no distance, so nothing can be placed about it. Choose another host, or none.`)
  if (await leadsBackTo(knex, slug, galaxy.slug, siblings)) say(path, `${host.designation} is itself a satellite within the system of ${galaxy.designation}: two galaxies cannot host each other.`)
}

/** Which of these galaxies have a distance. */
async function placesOf(knex: Knex, slugs: readonly string[]): Promise<Set<string>> {
  const rows = (await knex('catalogueRows').select('slug').whereRaw('slug = ANY(?)', [[...slugs]]).whereNull('revTo').whereNotNull('distance')) as { slug: string }[]
  return new Set(rows.map((r) => r.slug))
}

/** Whether the hosts of a galaxy, one above the other, lead to another one. */
async function leadsBackTo(knex: Knex, from: string, to: string, siblings: readonly StoredChange[]): Promise<boolean> {
  const proposed = new Map(siblings.flatMap((c) => (c.action === 'override.set' && 'host' in c.payload.choice ? [[c.payload.galaxy.slug, c.payload.choice.host] as const] : [])))
  const seen = new Set<string>()
  for (let at: string | null = from; at !== null && !seen.has(at); ) {
    if (at === to) return true
    seen.add(at)
    const next: string | null | undefined = proposed.get(at)
    if (next !== undefined) at = next
    else at = ((await knex('catalogueRows').select('host').where({ slug: at }).whereNull('revTo').first()) as { host: string | null } | undefined)?.host ?? null
  }
  return false
}

/** What holds before the override, in words: what another one chose, or what the policy or the rule gives. */
async function standing(knex: Knex, galaxy: HeldGalaxy, about: OverrideSubject, held: HeldOverride | undefined): Promise<string> {
  if (held) return choiceWords(held.choice, await choiceWordsOf(knex, [held.choice]))
  if (about === 'host') {
    const row = (await knex('catalogueRows').select('host').where({ galaxy: galaxy.id }).whereNull('revTo').first()) as { host: string | null } | undefined
    const host = row?.host == null ? undefined : (await galaxiesBySlug(knex, [row.host])).get(row.host)
    return `${host?.designation ?? 'none'}, by the rule`
  }
  const adopted = (await knex('adoptedValues').select('value', 'textValue', 'errPlus', 'errMinus', 'errSys').where({ galaxy: galaxy.id, quantity: about }).whereNull('revTo').first()) as
    | Parameters<typeof canonicalWords>[1]
    | undefined
  return adopted ? `${canonicalWords(about, adopted)}, by the policy` : 'nothing adopted'
}
