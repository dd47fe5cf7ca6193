import { describe, expect, it } from 'vitest'
import { virialRadius } from '../../../core/astro/environment.ts'
import { modulusOf } from '../../../core/astro/distance.ts'
import { length, type Vector } from '../../../core/astro/vector.ts'
import { random } from '../../../core/random.ts'
import { DEFAULT_POLICY } from '../../../core/scale/policy.ts'
import { escapeSpeed } from '../../../core/systems/escape.ts'
import { restOf } from '../../../core/derive/rest.ts'
import { systemOf, type SystemGalaxy } from '../../../core/systems/system.ts'
import { isotropic } from './satellites.ts'

const policy = DEFAULT_POLICY.host
const HOST: Vector = [3.1, -1.4, 0.9]

function galaxy(slug: string, position: Vector | null, more: Partial<SystemGalaxy> = {}): SystemGalaxy {
  return { slug, position, modulus: position && modulusOf(length(position)), statistical: 0.02, systematic: 0.05, absV: null, vGsr: null, ...more }
}

const around = (offsets: readonly Vector[], more: Partial<SystemGalaxy> = {}): SystemGalaxy[] =>
  offsets.map(([x, y, z], i) => galaxy(`s-${i}`, [HOST[0] + x / 1000, HOST[1] + y / 1000, HOST[2] + z / 1000], more))

describe('systemOf', () => {
  const offsets = isotropic(random(17), 20, 250).map(([x, y, z]): Vector => [x, y, 0.2 * z])
  const host = galaxy('host', HOST)

  it('gives lengths in kpc', () => {
    const { shape } = systemOf(host, around(offsets), policy)
    const rms = Math.sqrt(offsets.reduce((sum, o) => sum + o[2] ** 2, 0) / offsets.length)
    expect(Math.abs((shape?.height ?? NaN) / rms - 1)).toBeLessThan(0.1)
    expect(shape?.pole.sgb).toBeGreaterThan(70)
    expect(shape?.drawn.draws).toBe(policy.draws)
    expect(shape?.isotropy.reshuffles).toBe(policy.draws)
  })

  it('has a range as narrow as the distances are sure, about the adopted values', () => {
    const shape = systemOf({ ...host, statistical: 1e-6 }, around(offsets, { statistical: 1e-6 }), policy).shape
    if (!shape) throw new Error('20 satellites have a shape')
    // The scale moves all alike: ratios and directions stay, lengths go with it, 2.3 % for 0.05 mag.
    expect(shape.drawn.minorToMajor.lo).toBeCloseTo(shape.minorToMajor, 4)
    expect(shape.drawn.minorToMajor.hi).toBeCloseTo(shape.minorToMajor, 4)
    expect(shape.drawn.poleSpread).toBeLessThan(0.1)
    expect((shape.drawn.height.hi - shape.drawn.height.lo) / (2 * shape.height)).toBeCloseTo(0.4605 * 0.05, 2)
  })

  it('widens with the errors of the distances', () => {
    const at = (statistical: number) => systemOf({ ...host, statistical }, around(offsets, { statistical }), policy).shape?.drawn
    const spread = (d: ReturnType<typeof at>): number => (d ? d.minorToMajor.hi - d.minorToMajor.lo : NaN)
    expect(spread(at(0.06))).toBeGreaterThan(spread(at(0.01)))
    expect(at(0.06)?.poleSpread).toBeGreaterThan(at(0.01)?.poleSpread ?? NaN)
  })

  it('says when the distance errors rule the shape', () => {
    // 0.01 mag at 3.52 Mpc is 16 kpc, for host and satellite together 23: less than half of the rms extent of some 80 kpc.
    const sure = systemOf({ ...host, statistical: 0.01 }, around(offsets, { statistical: 0.01 }), policy).shape?.stretch
    expect(Math.abs((sure?.depthError ?? NaN) - 0.4605 * 0.01 * 1000 * length(HOST) * Math.SQRT2)).toBeLessThan(0.5)
    expect(sure?.dominates).toBe(false)
    const stretched = systemOf(host, around(offsets, { statistical: 0.1 }), policy).shape?.stretch
    expect(stretched?.dominates).toBe(true)
    // Satellites in a row behind one another.
    const row = Array.from({ length: 8 }, (_, i): Vector => [HOST[0] * 20 * (i - 3.5) + i, HOST[1] * 20 * (i - 3.5) - i, HOST[2] * 20 * (i - 3.5)])
    expect(systemOf(host, around(row), policy).shape?.stretch.alongSight).toBeLessThan(5)
    const [ours, seen] = [galaxy('ours', [0.004, 0.005, 0.005]), isotropic(random(2), 6, 100).map(([x, y, z], i) => galaxy(`o-${i}`, [x / 1000, y / 1000, z / 1000]))]
    expect(systemOf(ours, seen, policy).shape?.stretch.alongSight).toBeNull()
  })

  it('makes up nothing: too few, unplaced, unknown', () => {
    expect(systemOf(host, around(offsets.slice(0, 4)), policy)).toMatchObject({ placed: 4, needed: 5, shape: null, dispersion: null, luminosity: { steps: [], missing: 4 } })
    expect(systemOf(galaxy('host', null), around(offsets), policy)).toMatchObject({ placed: 0, shape: null })
    const some = [...around(offsets.slice(0, 4)), galaxy('lost', null, { vGsr: 10 }), galaxy('found', [3, -1.4, 0.9], { vGsr: -10 })]
    expect(systemOf(host, some, policy)).toMatchObject({ placed: 5, dispersion: null })
  })

  it('takes less than a second for a hundred members, on a busy machine too', () => {
    const many = around(isotropic(random(3), 100, 300))
    systemOf(host, many, policy)
    const start = performance.now()
    systemOf(host, many, policy)
    expect(performance.now() - start).toBeLessThan(1000)
  })
})

describe('escapeSpeed', () => {
  it('is sqrt(20) H0 R200 at R200: 200 times the critical density is a definition in it', () => {
    // G M = 100 H0² R200³.
    const mass = 1e12
    const r = virialRadius(mass, 67.4)
    expect(escapeSpeed(mass, r)).toBeCloseTo(Math.sqrt(200) * 67.4 * r, 6)
    expect(() => escapeSpeed(mass, 0)).toThrow(RangeError)
  })
})

describe('restOf', () => {
  it('puts our own Galaxy at rest, and no other', () => {
    expect(restOf(null, 0.0082)).toBe(0)
    expect(restOf(null, 0.05)).toBeNull()
    expect(restOf(null, null)).toBeNull()
    expect(restOf(-120, 0.78)).toBe(-120)
  })
})
