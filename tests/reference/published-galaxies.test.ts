/** The published sample from end to end, with the policy and anchors that a new catalogue starts with. */
import { describe, expect, it } from 'vitest'
import { adopt } from '../../core/adoption/adopt.ts'
import type { Adopted } from '../../core/adoption/adopted.ts'
import { neighbourFrom, neighbourhoodOf } from '../../core/derive/neighbourhood.ts'
import { deriveOwn } from '../../core/derive/own.ts'
import { relationOf } from '../../core/derive/relation.ts'
import type { QuantityKey } from '../../core/quantities.ts'
import { DEFAULT_ANCHORS } from '../../core/scale/anchors.ts'
import { DEFAULT_POLICY } from '../../core/scale/policy.ts'
import { publishedSample, table } from './published-sample.ts'

const scale = { anchors: DEFAULT_ANCHORS, policy: DEFAULT_POLICY }
const computed = publishedSample().map(({ galaxy, measurements }) => {
  const adopted = new Map<QuantityKey, Adopted>()
  for (const key of new Set(measurements.map((m) => m.quantity))) {
    const value = adopt(key, measurements.filter((m) => m.quantity === key), scale)
    if (value) adopted.set(key, value)
  }
  return { galaxy, adopted, own: deriveOwn(galaxy, adopted, measurements) }
})
const neighbourhood = neighbourhoodOf(computed.flatMap((c) => neighbourFrom(c.galaxy.id, c.own) ?? []))
const named = (name: string) => {
  const found = computed.find((c) => c.galaxy.designation === name)
  if (!found) throw new Error(`no galaxy is called ${name}`)
  return { ...found, relation: relationOf(neighbourhood, found.galaxy.id, DEFAULT_POLICY) }
}

describe('hosts and satellites', () => {
  // tests/reference/membership.csv: common practice of the field, no source.
  it.each(table('membership.csv').map((row) => [row.galaxy ?? '', row.host ?? '']))('%s belongs to "%s"', (name, host) => {
    const { relation } = named(name)
    const slug = host === '' ? null : named(host).galaxy.slug
    expect(relation.columns.host).toBe(slug)
  })

  it('are a forest: no galaxy is among its own hosts', () => {
    for (const { galaxy } of computed) {
      const seen = new Set<number>([galaxy.id])
      let at = relationOf(neighbourhood, galaxy.id, DEFAULT_POLICY).mainDisturber
      while (at !== null) {
        expect(seen.has(at)).toBe(false)
        seen.add(at)
        at = relationOf(neighbourhood, at, DEFAULT_POLICY).mainDisturber
      }
    }
  })

  it('are sure where the distances are', () => {
    expect(named('Draco dSph').relation.columns.host_probability).toBe(1)
    expect(named('WLM').relation.columns.host_probability).toBe(1)
  })
})

describe('published distances', () => {
  // Graczyk et al. 2020; Li et al. 2021; Beaton et al. 2019; each within the rounding of the paper and the shift of the scale.
  it.each([
    ['SMC', 0.06244, 0.0001],
    ['M 31', 0.761, 0.001],
    ['NGC 5457', 6.52, 0.01],
    ['NGC 628', 10.19, 0.01],
  ])('%s is at %f Mpc', (name, published, tolerance) => {
    expect(Math.abs(Number(named(name).own.distance) - published)).toBeLessThan(tolerance)
  })

  it('puts NGC 3031 on the catalogue’s scale: 27.78 on an LMC modulus of 18.41 becomes 27.847 before it is combined', () => {
    const reasons = named('NGC 3031').adopted.get('distance_modulus')?.reasons ?? []
    expect(reasons[0]?.scaled).toBeCloseTo(27.847, 9)
  })
})

describe('the tidal index over all neighbours', () => {
  // tests/reference/tidal_index.csv: synthetic masses, computed by independent code.
  const rows = table('tidal_index.csv')
  const others = neighbourhoodOf(
    rows.map((r, i) => ({
      id: i + 1, slug: r.name ?? '', name: r.name ?? '', x: Number(r.sgx_mpc), y: Number(r.sgy_mpc), z: Number(r.sgz_mpc), mass: Number(r.mstar_msun_SYNTHETIC), modulus: 25,
      statistical: 0.05, systematic: 0.05, vGsr: null, vError: null,
    })),
  )
  // Our Galaxy stands at the origin in this table, where no direction can be drawn; its index needs none.
  it.each(rows.filter((r) => r.name !== 'MW').map((r) => [r.name ?? '', r.main_disturber ?? '', Number(r.theta1)]))('%s: %s, %f', (name, disturber, theta) => {
    const id = rows.findIndex((r) => r.name === name) + 1
    const relation = relationOf(others, id, DEFAULT_POLICY)
    expect(relation.columns.tidal_index).toBeCloseTo(theta, 3)
    expect(rows[(relation.indexDisturber ?? 0) - 1]?.name).toBe(disturber)
  })
})
