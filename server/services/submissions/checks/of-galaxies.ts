/** What the checks of galaxies need of the catalogue: who is near, whose names they are, how large they are. */
import type { Knex } from 'knex'
import { checkAmendment, checkNewGalaxy } from '../../../../core/checks/run.ts'
import { nameKey } from '../../../../core/names.ts'
import type { Check } from '../../../../core/schema/submissions.ts'
import { galaxiesById, namesByKey } from '../../changes/current.ts'
import { galaxiesNear } from '../../changes/near.ts'
import type { Vocabulary } from '../../changes/present.ts'
import { changesOf } from '../../changes/types.ts'
import type { StoredChange, StoredChangeOf } from '../../changes/types.ts'

/** No galaxy but our own is so large on the sky that its half-light ellipse reaches farther, deg. */
const NEAR_DEG = 3
const MOST_NEAR = 25

export async function checksOfGalaxies(knex: Knex, changes: readonly StoredChange[], vocabulary: Vocabulary): Promise<[number, Check[]][]> {
  return [...(await ofAdditions(knex, changes)), ...(await ofAmendments(knex, changes, vocabulary))]
}

async function ofAdditions(knex: Knex, changes: readonly StoredChange[]): Promise<[number, Check[]][]> {
  const additions = changesOf(changes, 'galaxy.add')
  if (additions.length === 0) return []
  const near = await galaxiesNear(knex, new Map(additions.map((c) => [String(c.id), c.payload])), NEAR_DEG, MOST_NEAR)
  const sizes = await halfLightRadii(knex, [...near.values()].flat().map((g) => g.galaxy))
  const held = new Map((await namesByKey(knex, additions.flatMap((c) => [c.payload.designation, ...c.payload.names].map(nameKey)))).map((n) => [n.nameKey, n]))
  const owners = await galaxiesById(knex, [...held.values()].map((n) => n.galaxy))
  return additions.map((c) => {
    const borne = [c.payload.designation, ...c.payload.names].flatMap((name) => {
      const owner = held.get(nameKey(name))
      return owner ? [{ name, galaxy: owners.get(owner.galaxy)?.designation ?? owner.name }] : []
    })
    const measurements = changesOf(changes, 'measurement.add').filter((m) => 'change' in m.payload.galaxy && m.payload.galaxy.change === c.id).length
    const around = (near.get(String(c.id)) ?? []).map((g) => ({ ...g, halfLightArcmin: sizes.get(g.galaxy) ?? null }))
    return [c.id, checkNewGalaxy(c.payload, { near: around, borne, measurements })]
  })
}

async function ofAmendments(knex: Knex, changes: readonly StoredChange[], vocabulary: Vocabulary): Promise<[number, Check[]][]> {
  const amended = [...changesOf(changes, 'galaxy.amend'), ...changesOf(changes, 'name.add')].filter((c) => c.galaxy !== null)
  if (amended.length === 0) return []
  const sizes = await halfLightRadii(knex, amended.flatMap((c) => c.galaxy ?? []))
  return amended.flatMap((c): [number, Check[]][] => {
    const held = vocabulary.galaxies.get(c.galaxy ?? 0)
    if (!held) return []
    const position = { ra: held.ra, dec: held.dec }
    return [[c.id, checkAmendment({ galaxy: held.designation, position, moved: { ...position, ...positionSet(c) }, names: namesGiven(c), halfLightArcmin: sizes.get(held.id) ?? null })]]
  })
}

type Amendment = StoredChangeOf<'galaxy.amend'> | StoredChangeOf<'name.add'>

function positionSet(c: Amendment): { ra?: number; dec?: number } {
  if (c.action === 'name.add') return {}
  const { ra, dec } = c.payload.set
  return { ...(ra === undefined ? {} : { ra }), ...(dec === undefined ? {} : { dec }) }
}

function namesGiven(c: Amendment): string[] {
  if (c.action === 'name.add') return [c.payload.name]
  return c.payload.set.designation === undefined ? [] : [c.payload.set.designation]
}

/** Semi-major half-light radii, arcmin, of the galaxies that have one, by id. */
async function halfLightRadii(knex: Knex, ids: readonly number[]): Promise<Map<number, number>> {
  if (ids.length === 0) return new Map()
  const rows = (await knex('catalogueRows').whereNull('revTo').whereNotNull('rHalf').whereRaw('galaxy = ANY(?)', [[...new Set(ids)]]).select('galaxy', 'rHalf')) as { galaxy: number; rHalf: number }[]
  return new Map(rows.map((r) => [r.galaxy, r.rHalf]))
}
