import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { affectedBy } from '../../../core/derive/affected.ts'
import { neighbourhoodOf, withChanges, type Neighbour, type Neighbourhood, type Place } from '../../../core/derive/neighbourhood.ts'
import { placeIn, placesAfter, placesOf, type Places } from '../../../core/derive/places.ts'
import { relationsOf } from '../../../core/derive/relation.ts'
import { random } from '../../../core/random.ts'
import { DEFAULT_POLICY } from '../../../core/scale/policy.ts'
import { crowd, moved, neighbour } from './neighbours.ts'

const POLICY = { ...DEFAULT_POLICY, host: { ...DEFAULT_POLICY.host, draws: 100 } }

function relations(n: Neighbourhood): Map<number, Place & { columns: unknown }> {
  return relationsOf(n, n.ids, POLICY)
}

/** Some galaxies moved, made heavier or lighter, taken away, added. */
function changesOf(list: readonly Neighbour[], seed: number): Map<number, Neighbour | null> {
  const draw = random(seed)
  const changes = new Map<number, Neighbour | null>()
  for (let k = 0; k < 1 + draw.integer(3); k++) {
    const g = draw.pick(list)
    const change = draw.pick(['move', 'mass', 'name', 'leave', 'come'] as const)
    if (change === 'move') changes.set(g.id, moved(g, g.modulus + 0.3 * draw.normal()))
    if (change === 'mass') changes.set(g.id, { ...g, mass: draw.pick([0, g.mass * 30, g.mass / 30]) })
    if (change === 'name') changes.set(g.id, { ...g, slug: `renamed-${g.id}` })
    if (change === 'leave') changes.set(g.id, null)
    if (change === 'come') changes.set(5000 + k, neighbour(5000 + k, [g.x + 0.05, g.y, g.z], 10 ** (6 + 5 * draw.uniform())))
  }
  return changes
}

const anyChange = fc.tuple(fc.nat(1e6), fc.integer({ min: 2, max: 50 }), fc.nat(1e6)).map(([seed, size, how]) => {
  const list = crowd(seed, size)
  return { before: neighbourhoodOf(list), changes: changesOf(list, how) }
})

describe('affectedBy', () => {
  it.each([['one mover after the other', 10_000], ['a search for everybody', 0]])('names everybody whose relation differs, by %s', (_way, manyMovers) => {
    fc.assert(
      fc.property(anyChange, ({ before, changes }) => {
        const was = relations(before)
        const after = withChanges(before, changes)
        const is = relations(after)
        const affected = affectedBy(before, placesOf(before, was), after, new Set(changes.keys()), POLICY.host, manyMovers)
        for (const [id, relation] of is) if (!affected.has(id)) expect(relation).toEqual(was.get(id))
      }),
      { numRuns: 300 },
    )
  })

  it('leaves alone who is far from what changed', () => {
    const near = neighbour(2, [4.1, 0, 0], 1e8)
    const before = neighbourhoodOf([neighbour(1, [4, 0, 0], 5e10), near, neighbour(3, [-4, 0, 0], 5e10), neighbour(4, [-4.1, 0, 0], 1e8)])
    const places = placesOf(before, relations(before))
    const after = withChanges(before, new Map([[2, moved(near, near.modulus + 0.02)]]))
    expect([...affectedBy(before, places, after, new Set([2]), POLICY.host)].sort()).toEqual([1, 2])
  })

  it('is empty when nothing changed', () => {
    const before = neighbourhoodOf(crowd(1, 20))
    expect(affectedBy(before, placesOf(before, relations(before)), before, new Set(), POLICY.host).size).toBe(0)
  })
})

describe('placesAfter', () => {
  it('follows a change to what reading everything anew would give', () => {
    fc.assert(
      fc.property(anyChange, ({ before, changes }) => {
        const was = relations(before)
        const after = withChanges(before, changes)
        const is = relations(after)
        const differing = new Map([...is].filter(([id, r]) => JSON.stringify(r) !== JSON.stringify(was.get(id))))
        const followed = placesAfter(before, placesOf(before, was), after, changes.keys(), differing)
        expect(plain(followed)).toEqual(plain(placesOf(after, is)))
        for (const [id, place] of is) expect(placeIn(after, followed, id)).toEqual({ indexDisturber: place.indexDisturber, mainDisturber: place.mainDisturber, isSatellite: place.isSatellite })
      }),
      { numRuns: 200 },
    )
  })
})

function plain(places: Places): number[][] {
  return [[...places.indexDisturber], [...places.mainDisturber], [...places.indexPull], [...places.mainPull], [...places.satellite]]
}

describe('withChanges', () => {
  it('gives the neighbourhood that the changed galaxies would make', () => {
    fc.assert(
      fc.property(anyChange, ({ before, changes }) => {
        const after = withChanges(before, changes)
        const expected = neighbourhoodOf([...before.galaxies.filter((g) => !changes.has(g.id)), ...[...changes.values()].filter((g): g is Neighbour => g !== null)])
        expect([after.galaxies, after.ids, after.x, after.y, after.z, after.mass]).toEqual([expected.galaxies, expected.ids, expected.x, expected.y, expected.z, expected.mass])
        for (const g of expected.galaxies) expect(after.galaxies[after.indexOf.get(g.id) ?? -1]).toBe(g)
      }),
    )
  })
})
