import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { virialRadius } from '../../../core/astro/environment.ts'
import { membershipOf, reachOf, sphereOf } from '../../../core/derive/membership.ts'
import { quantilesInPlace } from '../../../core/derive/quantile.ts'
import { neighbourhoodOf } from '../../../core/derive/neighbourhood.ts'
import { relationOf, relationsOf } from '../../../core/derive/relation.ts'
import { DEFAULT_POLICY } from '../../../core/scale/policy.ts'
import { crowd, neighbour } from './neighbours.ts'

const policy = DEFAULT_POLICY.host
const host = neighbour(1, [3.6, 0, 0], 5e10)
/** As far away as the host, beside it. */
const beside = (kpc: number, more = {}) => neighbour(2, [3.6, kpc / 1000, 0], 1e7, { modulus: host.modulus, ...more })

describe('the sphere of a host', () => {
  it('is 1.5 R200 of 21.4 times its stellar mass', () => {
    expect(sphereOf(5e10, policy)).toBeCloseTo(1.5 * virialRadius(21.4 * 5e10, 67.4), 12)
    expect(sphereOf(5e10, policy)).toBeCloseTo(0.3246, 3)
  })

  it('never reaches beyond where the tidal index falls below 0', () => {
    // Published worked value: 5e10 Msun has index 0 at 0.81844595 Mpc.
    expect(reachOf(5e10, { ...policy, sphere: 4 })).toBeCloseTo(0.81844595, 7)
    expect(reachOf(5e10, policy)).toBe(sphereOf(5e10, policy))
  })
})

describe('membershipOf', () => {
  it('is sure where the distances are', () => {
    const sure = { statistical: 1e-6, systematic: 0.05 }
    expect(membershipOf(beside(100, sure), { ...host, ...sure }, [], policy)).toMatchObject({ isSatellite: true, probability: 1 })
    expect(membershipOf(beside(500, sure), { ...host, ...sure }, [], policy)).toMatchObject({ isSatellite: false, probability: 1 })
  })

  it('does not let the error of the scale part a galaxy from its host: it moves both alike', () => {
    const exact = { statistical: 1e-9, systematic: 0.1 }
    const found = membershipOf(beside(200, exact), { ...host, ...exact }, [], policy)
    expect(found.probability).toBe(1)
    // The separation itself scales with the distance: by 5 % a standard deviation.
    expect(found.separationHi / found.separation).toBeCloseTo(10 ** (0.1 / 5), 2)
  })

  it('agrees with the closed form where the line of sight decides', () => {
    // Behind one another, separation is the difference of the distances: near normal, with sqrt(2) of the single errors.
    const behind = neighbour(2, [3.75, 0, 0], 1e7, { statistical: 0.05 })
    const found = membershipOf(behind, { ...host, statistical: 0.05 }, [], { ...policy, draws: 20_000 })
    const sigma = 0.4605 * 0.05 * Math.hypot(3.75, 3.6)
    const reach = reachOf(host.mass, policy)
    const expected = normalShare((reach - 0.15) / sigma) - normalShare((-reach - 0.15) / sigma)
    expect(Math.abs(found.probability - expected)).toBeLessThan(0.015)
  })

  it('repeats itself, whatever else is computed and in whatever order', () => {
    const first = membershipOf(beside(250), host, [], policy)
    membershipOf(neighbour(9, [5, 1, 0], 1e7), host, [], policy)
    expect(membershipOf(beside(250), host, [], policy)).toEqual(first)
    expect(membershipOf(beside(250), host, [], { ...policy, seed: policy.seed + 1 }).separationLo).not.toBe(first.separationLo)
  })

  it('takes the policy’s error for a distance that has none', () => {
    const narrow = membershipOf(beside(100, { statistical: 0.01, systematic: null }), host, [], policy)
    const unknown = membershipOf(beside(100, { statistical: null, systematic: null }), host, [], policy)
    expect(unknown.separationHi).toBeGreaterThan(2 * narrow.separationHi)
  })
})

describe('relationsOf', () => {
  it('is relationOf for everybody', () => {
    const n = neighbourhoodOf(crowd(17, 200))
    const small = { ...DEFAULT_POLICY, host: { ...policy, draws: 100 } }
    const ids = [...n.ids, 99_999]
    const all = relationsOf(n, ids, small)
    expect([...all.keys()]).toEqual(ids)
    for (const id of ids) expect(all.get(id)).toEqual(relationOf(n, id, small))
  })
})

describe('quantilesInPlace', () => {
  it('is that of the sorted list whatever the numbers are', () => {
    const number = fc.oneof(fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e9, max: 1e9 }), fc.constantFrom(0, 1, 1 + 2e-16, 1e-300, 5e8))
    fc.assert(
      fc.property(fc.array(number, { minLength: 1, maxLength: 300 }), fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 6 }), (list, unsorted) => {
        const shares = unsorted.sort((a, b) => a - b)
        const sorted = Float64Array.from(list).sort()
        const expected = shares.map((share) => {
          const position = (list.length - 1) * share
          const below = Math.floor(position)
          const low = sorted[below] ?? NaN
          return position === below ? low : low + (position - below) * ((sorted[below + 1] ?? NaN) - low)
        })
        expect(quantilesInPlace(Float64Array.from(list), shares)).toEqual(expected.map((q): unknown => expect.closeTo(q, 12)))
      }),
    )
  })

  it('is the quantile of the sorted list, linear between neighbours', () => {
    // R: quantile(c(15, 20, 35, 40, 50), c(.05, .3, .4, .5, 1)) gives 16 23 29 35 50 (type 7).
    expect(quantilesInPlace(Float64Array.of(50, 15, 40, 20, 35), [0.05, 0.3, 0.4, 0.5, 1]).map((q) => Number(q.toFixed(9)))).toEqual([16, 23, 29, 35, 50])
    expect(quantilesInPlace(Float64Array.of(3), [0.16, 0.84])).toEqual([3, 3])
    const list = Float64Array.from({ length: 501 }, (_, i) => (i * 7919) % 100)
    const sorted = list.slice().sort()
    expect(quantilesInPlace(list, [0.16, 0.84])).toEqual([sorted[80], sorted[420]])
  })
})

/** Share of a normal below z, by summing its density finely. */
function normalShare(z: number): number {
  let sum = 0
  const step = 1e-3
  for (let x = -9 + step / 2; x < z; x += step) sum += Math.exp((-x * x) / 2) * step
  return sum / Math.sqrt(2 * Math.PI)
}
