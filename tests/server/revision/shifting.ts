/**
 * A small crowded catalogue that changes at random, one revision after the other, straight in the versioned tables: everything that can move
 * a derived value moves here.
 */
import type { Knex } from 'knex'
import { nameKey, slugOf } from '../../../core/names.ts'
import type { Random } from '../../../core/random.ts'
import { DEFAULT_POLICY } from '../../../core/scale/policy.ts'
import { layTheScale } from '../../../seeds/genesis.ts'
import { computeRevision, type RevisionPlan } from '../../../server/services/revision/compute.ts'
import { rebuildCatalogue } from '../../../server/services/revision/rebuild.ts'
import { writeRevision } from '../../../server/services/revision/write.ts'

export interface Moved {
  touched: number[]
}

export type Change = (trx: Knex.Transaction, revision: number, draw: Random) => Promise<Moved>

/** The scale as revision 1, and one source. */
export async function laySources(knex: Knex): Promise<void> {
  await knex.transaction((trx) => layTheScale(trx, null, new Date('2026-01-01T00:00:00Z')))
  await knex('sources').insert([2001, 2012, 2024].map((year) => ({ label: `Ansel ${year}`, title: 'Invented', authors: '[]', year, kind: 'demonstration' })))
}

export async function currentRevision(knex: Knex): Promise<number> {
  const row = (await knex('revisions').max('number as number').first()) as { number: number }
  return row.number
}

/** One revision, as an approval makes it. */
export async function approve(knex: Knex, draw: Random, change: Change): Promise<RevisionPlan> {
  return knex.transaction(async (trx) => {
    const plan = await propose(trx, draw, change)
    if (change === changeScale) await rebuildCatalogue(trx, plan.revision)
    else await writeRevision(trx, plan)
    await trx('revisions').insert({ number: plan.revision, summary: 'A change' })
    return plan
  })
}

/** The same up to what is written, as a preview does before it rolls back. */
export async function propose(trx: Knex.Transaction, draw: Random, change: Change): Promise<RevisionPlan> {
  const revision = (await currentRevision(trx)) + 1
  const moved = await change(trx, revision, draw)
  return computeRevision(trx, { revision, ...moved })
}

let made = 0

/** A galaxy somewhere in a crowd of about one Mpc, with or without light, with or without a distance. */
export const addGalaxy: Change = async (trx, revision, draw) => {
  const designation = `Drift ${++made}`
  const [galaxy] = (await trx('galaxies').insert({}).returning('id')) as { id: number }[]
  const id = galaxy?.id ?? 0
  await trx('galaxyVersions').insert({
    galaxy: id, designation, slug: slugOf(designation), status: 'confirmed', class: 'dwarf-irregular', ra: 100 + 8 * draw.uniform(), dec: 20 + 8 * draw.uniform(), revFrom: revision,
  })
  await trx('galaxyNames').insert({ galaxy: id, name: designation, nameKey: nameKey(designation), preferred: true, revFrom: revision })
  if (draw.uniform() < 0.9) await measure(trx, revision, draw, id, 'distance_modulus')
  if (draw.uniform() < 0.8) await measure(trx, revision, draw, id, 'v_mag')
  if (draw.uniform() < 0.5) await measure(trx, revision, draw, id, 'velocity')
  return { touched: [id] }
}

const QUANTITIES = ['distance_modulus', 'distance_modulus', 'distance_modulus', 'v_mag', 'velocity', 'ebv', 'r_half', 'axis_ratio', 'log_mstar'] as const

export const addMeasurement: Change = async (trx, revision, draw) => {
  const id = await anyGalaxy(trx, draw)
  await measure(trx, revision, draw, id, draw.pick(QUANTITIES))
  return { touched: [id] }
}

async function measure(trx: Knex, revision: number, draw: Random, galaxy: number, quantity: (typeof QUANTITIES)[number]): Promise<void> {
  const values = {
    distance_modulus: 27.5 + 0.5 * draw.uniform(), v_mag: 7 + 12 * draw.uniform(), velocity: 200 + 100 * draw.normal(), ebv: 0.1 * draw.uniform(), r_half: 0.2 + draw.uniform(),
    axis_ratio: 0.4 + 0.5 * draw.uniform(), log_mstar: 6 + 5 * draw.uniform(),
  }
  const isDistance = quantity === 'distance_modulus'
  const error = draw.uniform() < 0.15 ? null : 0.02 + 0.1 * draw.uniform()
  const anchored = isDistance && draw.uniform() < 0.6
  await trx('measurements').insert({
    galaxy, quantity, value: values[quantity], errPlus: error, errMinus: error, method: isDistance ? draw.pick(['trgb', 'trgb', 'tully-fisher']) : null,
    anchor: anchored ? 'trgb-absolute-i' : null, anchorValueAssumed: anchored ? -4.01 : null, convention: quantity === 'ebv' ? draw.pick(['true', 'sfd']) : null, source: 1 + draw.integer(3), revFrom: revision,
  })
}

export const replaceMeasurement: Change = async (trx, revision, draw) => {
  const held = await anyMeasurement(trx, draw)
  if (!held) return { touched: [] }
  await end(trx, 'measurements', held.id, revision)
  const { id: _, ...rest } = held
  await trx('measurements').insert({ ...rest, value: held.value === null ? null : Math.max(0.01, held.value + 0.2 * draw.normal()), revFrom: revision })
  return { touched: [held.galaxy] }
}

export const excludeMeasurement: Change = async (trx, revision, draw) => {
  const held = await anyMeasurement(trx, draw)
  if (!held) return { touched: [] }
  await end(trx, 'measurements', held.id, revision)
  const { id: _, ...rest } = held
  await trx('measurements').insert({ ...rest, excludedReason: held.excludedReason === null ? 'blended' : null, revFrom: revision })
  return { touched: [held.galaxy] }
}

interface Version {
  id: number
  galaxy: number
  ra: number
  dec: number
  status: string
  designation: string
  slug: string
}

/** Moves it on the sky, withdraws it or takes that back, or gives it another name and address. */
export const amendGalaxy: Change = async (trx, revision, draw) => {
  const galaxy = await anyGalaxy(trx, draw)
  const { id, ...rest } = (await trx('galaxyVersions').where({ galaxy }).whereNull('revTo').first('id', 'galaxy', 'designation', 'slug', 'status', 'ra', 'dec', 'class', 'note')) as Version
  await end(trx, 'galaxyVersions', id, revision)
  const designation = `Drift ${++made}`
  const set = draw.pick([
    { dec: rest.dec + 0.3 * draw.normal() },
    { status: rest.status === 'withdrawn' ? 'confirmed' : 'withdrawn' },
    { designation, slug: slugOf(designation) },
  ])
  await trx('galaxyVersions').insert({ ...rest, ...set, revFrom: revision })
  return { touched: [galaxy] }
}

export const setOverride: Change = async (trx, revision, draw) => {
  const galaxy = await anyGalaxy(trx, draw)
  const held = (await trx('measurements').where({ galaxy, quantity: 'distance_modulus' }).whereNull('revTo').select('lineage')) as { lineage: number }[]
  const standing = (await trx('overrides').where({ galaxy, about: 'distance_modulus' }).whereNull('revTo').first('id')) as { id: number } | undefined
  if (standing) await end(trx, 'overrides', standing.id, revision)
  else if (held.length > 0) {
    await trx('overrides').insert({ galaxy, about: 'distance_modulus', choice: JSON.stringify({ measurements: [draw.pick(held).lineage] }), reason: 'the tip is contaminated', revFrom: revision })
  }
  return { touched: [galaxy] }
}

/** Gives a galaxy another host than the rule would, or none, or takes that back. */
export const setHost: Change = async (trx, revision, draw) => {
  const galaxy = await anyGalaxy(trx, draw)
  const standing = (await trx('overrides').where({ galaxy, about: 'host' }).whereNull('revTo').first('id')) as { id: number } | undefined
  if (standing) await end(trx, 'overrides', standing.id, revision)
  else {
    const host = await anyGalaxy(trx, draw)
    const { slug } = (await trx('galaxyVersions').where({ galaxy: host }).whereNull('revTo').first('slug')) as { slug: string }
    await trx('overrides').insert({ galaxy, about: 'host', choice: JSON.stringify({ host: host === galaxy || draw.uniform() < 0.3 ? null : slug }), reason: 'a stream leads there', revFrom: revision })
  }
  return { touched: [galaxy] }
}

/** Another value of an anchor, or another rule for hosts. */
export const changeScale: Change = async (trx, revision, draw) => {
  if (draw.uniform() < 0.5) {
    const { id, ...rest } = (await trx('anchors').where({ key: 'trgb-absolute-i' }).whereNull('revTo').first('id', 'key', 'label', 'kind', 'methods', 'value', 'err', 'source')) as { id: number }
    await end(trx, 'anchors', id, revision)
    await trx('anchors').insert({ ...rest, value: -4.05 + 0.05 * draw.normal(), revFrom: revision })
  } else {
    const { id } = (await trx('policies').whereNull('revTo').first('id')) as { id: number }
    await end(trx, 'policies', id, revision)
    await trx('policies').insert({ document: JSON.stringify({ ...DEFAULT_POLICY, host: { ...DEFAULT_POLICY.host, draws: 200, sphere: 1 + draw.uniform(), massRatio: 1 + draw.integer(6) } }), revFrom: revision })
  }
  return { touched: [] }
}

/** Two touched at once, as an import does. */
export const several: Change = async (trx, revision, draw) => {
  const first = await addMeasurement(trx, revision, draw)
  const second = await addGalaxy(trx, revision, draw)
  const third = await replaceMeasurement(trx, revision, draw)
  return { touched: [...first.touched, ...second.touched, ...third.touched] }
}

async function end(trx: Knex, table: string, id: number, revision: number): Promise<void> {
  // What begins and ends in one revision never was.
  const begun = await trx(table).where({ id, revFrom: revision }).delete()
  if (begun === 0) await trx(table).where({ id }).update({ revTo: revision })
}

async function anyGalaxy(trx: Knex, draw: Random): Promise<number> {
  const rows = (await trx('galaxyVersions').whereNull('revTo').orderBy('galaxy').select('galaxy')) as { galaxy: number }[]
  return draw.pick(rows).galaxy
}

interface Held {
  id: number
  galaxy: number
  value: number | null
  excludedReason: string | null
}

async function anyMeasurement(trx: Knex, draw: Random): Promise<Held | undefined> {
  const rows = (await trx('measurements')
    .whereNull('revTo')
    .orderBy('id')
    .select('id', 'lineage', 'galaxy', 'quantity', 'value', 'errPlus', 'errMinus', 'method', 'anchor', 'anchorValueAssumed', 'convention', 'source', 'excludedReason')) as Held[]
  return rows.length === 0 ? undefined : draw.pick(rows)
}
