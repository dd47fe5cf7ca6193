import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { adopt } from '../../../core/adoption/adopt.ts'
import type { Scale } from '../../../core/adoption/adopted.ts'
import { distanceOf } from '../../../core/astro/distance.ts'
import type { Measurement } from '../../../core/catalogue/types.ts'
import { METHOD_KEYS } from '../../../core/methods.ts'
import { DEFAULT_ANCHORS } from '../../../core/scale/anchors.ts'
import { DEFAULT_POLICY } from '../../../core/scale/policy.ts'
import { solve } from './linear.ts'

const SCALE: Scale = { anchors: DEFAULT_ANCHORS, policy: DEFAULT_POLICY }
let nextId = 1

function modulus(value: number, more: Partial<Measurement> = {}): Measurement {
  const id = nextId++
  return {
    id, versionId: id, galaxyId: 1, quantity: 'distance_modulus', value, errPlus: 0.05, errMinus: 0.05, errSys: null, textValue: null, limitFlag: null, method: 'trgb',
    anchor: 'trgb-absolute-i', anchorValueAssumed: -4.049, convention: null, published: null, sourceId: id, sourceLabel: `Author ${2000 + id}`, sourceYear: 2000 + id, locator: null,
    note: null, excludedReason: null, supersedes: null, ...more,
  }
}

const velocity = (value: number, error: number | null, more: Partial<Measurement> = {}): Measurement =>
  modulus(value, { quantity: 'velocity', errPlus: error, errMinus: error, method: null, anchor: null, anchorValueAssumed: null, ...more })

describe('one scale', () => {
  it('moves a modulus by the difference of its anchor’s values', () => {
    // McCommas et al. 2009: 27.78 on an LMC modulus of 18.41 is 27.847 on 18.477.
    const found = adopt('distance_modulus', [modulus(27.78, { method: 'cepheids', anchor: 'lmc-modulus', anchorValueAssumed: 18.41 })], SCALE)
    expect(found?.value).toBeCloseTo(27.847, 9)
    expect(found?.reasons[0]).toMatchObject({ used: true, weight: 1 })
    expect(found?.reasons[0]?.shift).toBeCloseTo(0.067, 9)
  })

  it('moves it the other way when the anchor is the luminosity of a candle', () => {
    // μ = m − M: assumed −4.01, ours −4.049 is brighter, so the galaxy is farther.
    const found = adopt('distance_modulus', [modulus(28, { anchorValueAssumed: -4.01 })], SCALE)
    expect(found?.value).toBeCloseTo(28.039, 9)
  })

  it('takes a value without a stated anchor as published, with a larger error and a flag', () => {
    const stated = modulus(28)
    const silent = modulus(28.02, { anchor: null, anchorValueAssumed: null })
    const found = adopt('distance_modulus', [stated, silent], SCALE)
    const reason = found?.reasons.find((r) => r.measurementId === silent.id)
    expect(reason?.flags).toContain('scale unknown')
    expect(reason?.error).toBeCloseTo(Math.hypot(0.05, 0.05), 9)
    expect(reason?.weight).toBeLessThan(0.5)
  })
})

describe('the adopted distance', () => {
  it('comes from the best tier; the lower ones are shown and not used', () => {
    const found = adopt('distance_modulus', [modulus(27.79), modulus(27.75, { method: 'cepheids', anchor: 'lmc-modulus', anchorValueAssumed: 18.477 }), modulus(28.3, { method: 'tully-fisher', anchor: null, anchorValueAssumed: null, errPlus: 0.4, errMinus: 0.4 })], SCALE)
    expect(found).toMatchObject({ nUsed: 2, nAll: 3 })
    expect(found?.reasons.map((r) => r.reason)).toEqual(['used', 'used', 'lower tier'])
    expect(found?.sentence).toContain('Weighted from 1 TRGB and 1 Cepheid values')
    expect(found?.sentence).toContain('1 Tully–Fisher value of a lower tier is shown and not used.')
  })

  it('uses the lower tier when there is no better one', () => {
    expect(adopt('distance_modulus', [modulus(28.3, { method: 'tully-fisher', anchor: null, anchorValueAssumed: null })], SCALE)).toMatchObject({ nUsed: 1, method: 'tully-fisher' })
  })

  it('leaves out what is excluded, superseded or a limit, and says so', () => {
    const old = modulus(27.5)
    const list = [old, modulus(27.8, { supersedes: old.id, sourceLabel: 'Harrow 2024' }), modulus(30, { excludedReason: 'wrong galaxy' }), modulus(27, { limitFlag: 'lower' })]
    const found = adopt('distance_modulus', list, SCALE)
    expect(found?.value).toBeCloseTo(27.8, 9)
    expect(found?.reasons.map((r) => r.reason)).toEqual(['superseded by Harrow 2024', 'used', 'excluded: wrong galaxy', 'lower limit'])
    expect(found?.sentence).toBe(
      'From one TRGB value on the catalogue’s scale. 1 value is superseded by Harrow 2024. 1 value is excluded: wrong galaxy. 1 lower limit is shown and not used.',
    )
  })

  it('lets a superseding measurement that is itself excluded supersede nothing', () => {
    const old = modulus(27.5)
    const found = adopt('distance_modulus', [old, modulus(27.8, { supersedes: old.id, excludedReason: 'blended' })], SCALE)
    expect(found?.value).toBeCloseTo(27.5, 9)
  })

  it('flags tension and drops nothing for it', () => {
    const found = adopt('distance_modulus', [modulus(27.8, { errPlus: 0.02, errMinus: 0.02 }), modulus(27.81, { errPlus: 0.02, errMinus: 0.02 }), modulus(28.4, { errPlus: 0.05, errMinus: 0.05 })], SCALE)
    expect(found?.nUsed).toBe(3)
    expect(found?.reasons.some((r) => r.tension && r.used)).toBe(true)
    expect(found?.sentence).toContain('In tension')
    expect(found?.scatter).toBeGreaterThan(0.1)
  })

  it('gives a missing error the policy’s, and says so', () => {
    const found = adopt('distance_modulus', [modulus(27.8, { errPlus: null, errMinus: null })], SCALE)
    expect(found?.errPlus).toBeCloseTo(0.1, 9)
    expect(found?.reasons[0]?.flags).toEqual(['error assumed'])
  })

  it('keeps the systematic part apart: more values by one method do not shrink it', () => {
    const one = adopt('distance_modulus', [modulus(27.8)], SCALE)
    const many = adopt('distance_modulus', Array.from({ length: 9 }, () => modulus(27.8)), SCALE)
    expect(many?.errPlus).toBeCloseTo((one?.errPlus ?? 0) / 3, 9)
    expect(many?.errSys).toBeCloseTo(one?.errSys ?? 0, 9)
    // TRGB: 0.05 of the method, 0.038 of the anchor that it hangs on.
    expect(one?.errSys).toBeCloseTo(Math.hypot(0.05, 0.038), 9)
  })

  it('counts an anchor’s error with the share of the value that hangs on it', () => {
    const tip = modulus(27.8)
    const cepheids = modulus(27.8, { method: 'cepheids', anchor: 'lmc-modulus', anchorValueAssumed: 18.477 })
    const found = adopt('distance_modulus', [tip, cepheids], SCALE)
    // Both methods weigh the same, so the methods' part is 0.05 / sqrt(2), and of each anchor half counts.
    expect(found?.errSys).toBeCloseTo(Math.hypot(0.05 / Math.SQRT2, 0.038 / 2, 0.026 / 2), 9)
    // Two methods on one anchor carry all of it.
    const miras = modulus(27.8, { method: 'miras', anchor: 'lmc-modulus', anchorValueAssumed: 18.477 })
    const shared = adopt('distance_modulus', [cepheids, miras], SCALE)
    expect(Math.sqrt((shared?.errSys ?? 0) ** 2 - 0.026 ** 2)).toBeCloseTo(Math.sqrt((1 / (1 / (0.05 ** 2 + 0.05 ** 2) + 1 / (0.05 ** 2 + 0.08 ** 2))) - (shared?.errPlus ?? 0) ** 2), 9)
  })

  it('does not move when a value of a lower tier is added', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: 26, max: 28, noNaN: true }), { minLength: 1, maxLength: 5 }), fc.double({ min: 25, max: 29, noNaN: true }), (values, low) => {
        const list = values.map((v) => modulus(v))
        const without = adopt('distance_modulus', list, SCALE)
        const lower = adopt('distance_modulus', [...list, modulus(low, { method: 'tully-fisher', anchor: null, anchorValueAssumed: null })], SCALE)
        expect([lower?.value, lower?.errPlus, lower?.errSys, lower?.chi2, lower?.nUsed]).toEqual([without?.value, without?.errPlus, without?.errSys, without?.chi2, without?.nUsed])
      }),
    )
  })

  it('follows an override, which must give its reason', () => {
    const chosen = modulus(28.3, { method: 'brightest-stars', anchor: null, anchorValueAssumed: null })
    const other = modulus(27.8)
    const found = adopt('distance_modulus', [other, chosen], SCALE, { measurements: [chosen.id], reason: 'the tip is contaminated' })
    expect(found?.value).toBeCloseTo(28.3, 9)
    expect(found?.override).toBe('the tip is contaminated')
    expect(found?.reasons.find((r) => r.measurementId === other.id)).toMatchObject({ used: false, weight: 0, reason: 'set aside by an override: the tip is contaminated' })
  })

  it('is null when nothing can be used', () => {
    expect(adopt('distance_modulus', [], SCALE)).toBeNull()
    expect(adopt('distance_modulus', [modulus(27.8, { excludedReason: 'blended' })], SCALE)).toBeNull()
  })

  it('is among its data, with weights that sum to 1, whatever the order', () => {
    const any = fc.record({ value: fc.double({ min: 24, max: 30, noNaN: true }), error: fc.option(fc.double({ min: 0.01, max: 0.6, noNaN: true }), { nil: null }), method: fc.constantFrom(...METHOD_KEYS) })
    fc.assert(
      fc.property(fc.array(any, { minLength: 1, maxLength: 10 }), (drawn) => {
        const list = drawn.map((d) => modulus(d.value, { errPlus: d.error, errMinus: d.error, method: d.method, anchor: null, anchorValueAssumed: null }))
        const found = adopt('distance_modulus', list, SCALE)
        const back = adopt('distance_modulus', [...list].reverse(), SCALE)
        expect(back).toEqual(found)
        const used = found?.reasons.filter((r) => r.used) ?? []
        expect(used.reduce((sum, r) => sum + r.weight, 0)).toBeCloseTo(1, 9)
        const scaled = used.map((r) => r.scaled ?? NaN)
        expect(found?.value).toBeGreaterThanOrEqual(Math.min(...scaled) - 1e-9)
        expect(found?.value).toBeLessThanOrEqual(Math.max(...scaled) + 1e-9)
        expect(found?.errPlus).toBeGreaterThan(0)
        expect(found?.errSys).toBeGreaterThan(0)
      }),
    )
  })
})

describe('other quantities', () => {
  it('velocities: the weighted mean, its error enlarged where they scatter', () => {
    const found = adopt('velocity', [velocity(-300, 2), velocity(-296, 2)], SCALE)
    expect(found?.value).toBeCloseTo(-298, 9)
    expect(found?.errPlus).toBeCloseTo(Math.SQRT2 * Math.SQRT2, 6)
    expect(found?.sentence).toBe('Weighted from 2 values. The error is enlarged 1.4 times, since they scatter more than their errors allow.')
  })

  it('magnitudes: the smallest stated error, then the newest', () => {
    const old = velocity(12.3, 0.05, { quantity: 'v_mag', sourceYear: 1999 })
    const precise = velocity(12.1, 0.02, { quantity: 'v_mag', sourceYear: 2001 })
    const silent = velocity(11.9, null, { quantity: 'v_mag', sourceYear: 2020 })
    expect(adopt('v_mag', [old, precise, silent], SCALE)?.value).toBe(12.1)
    expect(adopt('v_mag', [old, silent], SCALE)?.value).toBe(12.3)
    expect(adopt('v_mag', [silent], SCALE)?.value).toBe(11.9)
  })

  it('morphology: the newest', () => {
    const type = (textValue: string, sourceYear: number): Measurement => velocity(0, null, { quantity: 'morphology', value: null, textValue, sourceYear })
    const found = adopt('morphology', [type('dSph', 1995), type('dIrr/dSph', 2015)], SCALE)
    expect(found).toMatchObject({ textValue: 'dIrr/dSph', value: null, nUsed: 1, nAll: 2 })
  })
})

describe('what the policy does not speak of', () => {
  it('is shown with that as the reason', () => {
    const scale = { anchors: DEFAULT_ANCHORS, policy: { ...DEFAULT_POLICY, methods: DEFAULT_POLICY.methods.filter((m) => m.method !== 'jagb') } }
    const odd = modulus(27.9, { method: 'jagb', anchor: null, anchorValueAssumed: null })
    const found = adopt('distance_modulus', [modulus(27.8), odd], scale)
    expect(found?.reasons.find((r) => r.measurementId === odd.id)).toMatchObject({ used: false, weight: 0, reason: 'the policy has no rule for its method' })
    expect(found?.value).toBeCloseTo(27.8, 9)
    expect(adopt('distance_modulus', [odd], scale)).toBeNull()
  })
})

describe('what all distances share', () => {
  it('a common shift moves the adopted value by as much, and nothing else', () => {
    const values = fc.array(fc.tuple(fc.double({ min: 26, max: 28, noNaN: true }), fc.double({ min: 0.02, max: 0.3, noNaN: true }), fc.constantFrom('trgb', 'cepheids', 'miras')), { minLength: 1, maxLength: 8 })
    fc.assert(
      fc.property(values, fc.double({ min: -1, max: 1, noNaN: true }), (list, shift) => {
        const at = (by: number) => adopt('distance_modulus', list.map(([v, e, method], i) => modulus(v + by, { id: i + 1, errPlus: e, errMinus: e, method: method as Measurement['method'], anchor: null, anchorValueAssumed: null })), SCALE)
        const [a, b] = [at(0), at(shift)]
        expect((b?.value ?? NaN) - (a?.value ?? NaN)).toBeCloseTo(shift, 6)
        expect(b?.errPlus).toBeCloseTo(a?.errPlus ?? NaN, 6)
        expect(b?.errSys).toBeCloseTo(a?.errSys ?? NaN, 6)
      }),
    )
  })

  it('copies of a measurement never bring the error below that of the method and its anchor', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 60 }), fc.double({ min: 0.01, max: 0.3, noNaN: true }), (n, error) => {
        const found = adopt('distance_modulus', Array.from({ length: n }, () => modulus(27.8, { errPlus: error, errMinus: error })), SCALE)
        expect(Math.hypot(found?.errPlus ?? NaN, found?.errSys ?? NaN)).toBeGreaterThan(Math.hypot(0.05, 0.038))
      }),
    )
  })

  it.each([
    // Peelle 1987: 0.88 ± 0.22 (published, from memory; 0.882353 ± 0.218282 computed).
    { name: 'Peelle’s puzzle', distances: [1.5, 1], own: 0.1, common: 0.2, naive: 0.882353, error: 0.218282 },
    // D'Agostini 1994, Nuclear Instruments and Methods A 346, 306: 7.87 ± 0.81 (published, from memory; 7.873684 ± 0.813611 computed).
    { name: 'D’Agostini’s example', distances: [8, 8.5], own: 0.02, common: 0.1, naive: 7.873684, error: 0.813611 },
  ])('$name: a common proportional error pulls least squares on the distances outside its data, and not ours', ({ distances, own, common, naive, error }) => {
    const covariance = distances.map((x, i) => distances.map((y, j) => common ** 2 * x * y + (i === j ? (own * x) ** 2 : 0)))
    const weights = solve(covariance, distances.map(() => 1))
    const norm = weights.reduce((a, b) => a + b, 0)
    const fallen = distances.reduce((sum, x, i) => sum + x * (weights[i] ?? 0), 0) / norm
    expect(fallen).toBeCloseTo(naive, 6)
    expect(1 / Math.sqrt(norm)).toBeCloseTo(error, 6)
    expect(fallen).toBeLessThan(Math.min(...distances))

    const bar = (5 / Math.LN10) * own
    const found = distanceOf(adopt('distance_modulus', distances.map((d) => modulus(5 * Math.log10(d) + 25, { errPlus: bar, errMinus: bar })), SCALE)?.value ?? NaN)
    expect(found).toBeGreaterThan(Math.min(...distances))
    expect(found).toBeLessThan(Math.max(...distances))
  })
})
