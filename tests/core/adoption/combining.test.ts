import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { derSimonianLaird } from '../../../core/adoption/dersimonian-laird.ts'
import { huberMean } from '../../../core/adoption/huber.ts'
import { median, medianWithError, robustSigma } from '../../../core/adoption/median.ts'
import { combine, pauleMandel } from '../../../core/adoption/paule-mandel.ts'
import { sharedZeroPointMean } from '../../../core/adoption/shared-zero-point.ts'
import { weightedMean } from '../../../core/adoption/weighted-mean.ts'
import { solve } from './linear.ts'

/** Kacker 2004, Metrologia 41, 132, table 1, row 1, as quoted in the test suite of statsmodels (test_meta.py). */
const KACKER = {
  values: [61.0, 61.4, 62.21, 62.3, 62.34, 62.6, 62.7, 62.84, 65.9],
  errors: [0.2025, 1.21, 0.09, 0.2025, 0.3844, 0.5625, 0.0676, 0.0225, 1.8225].map(Math.sqrt),
}
/** Charged-kaon mass, MeV: inputs from memory; the mean, its error and S as published by the Particle Data Group (pdgLive). */
const KAON = { values: [493.696, 493.636, 493.64, 493.67, 493.657, 493.691], errors: [0.007, 0.011, 0.054, 0.029, 0.02, 0.04] }

describe('pauleMandel', () => {
  it('gives the τ that Kacker 2004 publishes', () => {
    expect(pauleMandel(KACKER.values, KACKER.errors).tau).toBeCloseTo(0.8399, 4)
  })

  it('agrees with R’s metafor 3.8 on mean, error and τ²', () => {
    const kacker = pauleMandel(KACKER.values, KACKER.errors)
    expect(kacker.mean).toBeCloseTo(62.40761991, 7)
    expect(kacker.error).toBeCloseTo(0.3380306, 7)
    expect(kacker.tau ** 2).toBeCloseTo(0.70539531, 7)
    const three = pauleMandel([27.5, 27.8, 28.1], [0.05, 0.08, 0.1])
    expect(three.mean).toBeCloseTo(27.79166204, 7)
    expect(three.error).toBeCloseTo(0.17320283, 7)
    expect(three.tau ** 2).toBeCloseTo(0.083802, 6)
  })

  it('adds no scatter where the errors explain everything', () => {
    const fitting = pauleMandel([27.7, 27.8, 27.75], [0.05, 0.1, 0.08])
    expect(fitting.tau).toBe(0)
    // Inverse-variance mean, computed independently with scipy.
    expect(fitting.mean).toBeCloseTo(27.7271428571, 9)
    expect(fitting.error).toBeCloseTo(0.0390360029, 9)
  })

  it('takes one measurement as it is', () => {
    expect(pauleMandel([24.4], [0.03])).toMatchObject({ mean: 24.4, error: 0.03, weights: [1], tau: 0, dof: 0 })
  })

  it('refuses nothing, a missing error and an error of 0', () => {
    expect(() => pauleMandel([], [])).toThrow(RangeError)
    expect(() => pauleMandel([1, 2], [1])).toThrow(RangeError)
    expect(() => pauleMandel([1], [0])).toThrow(RangeError)
    expect(() => pauleMandel([NaN], [1])).toThrow(RangeError)
  })

  const measured = fc.array(fc.tuple(fc.double({ min: 20, max: 31, noNaN: true }), fc.double({ min: 0.01, max: 1, noNaN: true })), { minLength: 1, maxLength: 12 })

  it('has weights that sum to 1, a mean among the values, and a scatter that solves its equation', () => {
    fc.assert(
      fc.property(measured, (pairs) => {
        const values = pairs.map(([v]) => v)
        const errors = pairs.map(([, e]) => e)
        const found = pauleMandel(values, errors)
        expect(found.weights.reduce((a, b) => a + b, 0)).toBeCloseTo(1, 9)
        expect(found.mean).toBeGreaterThanOrEqual(Math.min(...values) - 1e-9)
        expect(found.mean).toBeLessThanOrEqual(Math.max(...values) + 1e-9)
        if (found.tau === 0) return
        const sum = values.reduce((total, x, i) => total + (x - found.mean) ** 2 / ((errors[i] ?? 1) ** 2 + found.tau ** 2), 0)
        expect(sum).toBeCloseTo(values.length - 1, 4)
      }),
    )
  })

  it('does not care for the order', () => {
    fc.assert(
      fc.property(measured, (pairs) => {
        const back = [...pairs].reverse()
        const a = pauleMandel(pairs.map(([v]) => v), pairs.map(([, e]) => e))
        const b = pauleMandel(back.map(([v]) => v), back.map(([, e]) => e))
        expect(b.mean).toBeCloseTo(a.mean, 9)
        expect(b.error).toBeCloseTo(a.error, 9)
      }),
    )
  })
})

describe('the estimators offered for comparison', () => {
  it('DerSimonian–Laird agrees with metafor', () => {
    const found = derSimonianLaird(KACKER.values, KACKER.errors)
    expect(found.tau).toBeCloseTo(0.536702, 6)
    expect(found.mean).toBeCloseTo(62.3901386, 7)
    expect(found.error).toBeCloseTo(0.24574967, 7)
  })

  it('the scale factor gives the charged-kaon mass as published: 493.677 ± 0.013, S = 2.4', () => {
    const found = weightedMean(KAON.values, KAON.errors)
    expect(found.mean).toBeCloseTo(493.677, 3)
    expect(found.error).toBeCloseTo(0.013, 3)
    expect(found.scaleFactor).toBeCloseTo(2.4, 1)
    expect(found.scaleFactor).toBeCloseTo(2.368831, 6)
  })

  it('leaves the error alone where the values agree', () => {
    expect(weightedMean([27.7, 27.8, 27.75], [0.05, 0.1, 0.08])).toMatchObject({ scaleFactor: 1 })
  })

  it('the fixed-effect mean and Q agree with metafor', () => {
    const fixed = combine(KACKER.values, KACKER.errors, 0)
    expect(fixed.mean).toBeCloseTo(62.5833971, 7)
    expect(fixed.error).toBeCloseTo(0.10784571, 7)
    expect(fixed.chi2).toBeCloseTo(24.801898, 5)
  })

  it('the median shrugs at one wild value', () => {
    // R: median and mad of the same list.
    const list = [27.7, 27.72, 27.68, 27.75, 27.69, 28.4]
    expect(median(list)).toBeCloseTo(27.71, 12)
    expect(robustSigma(list)).toBeCloseTo(0.037065, 9)
    expect(medianWithError(list).error).toBeGreaterThan(0)
  })

  it('reproduces Venables & Ripley’s chem data: median 3.385, MAD 0.526323', () => {
    // Modern Applied Statistics with S, section 5.5; data of R's MASS package.
    const chem = [2.9, 3.1, 3.4, 3.4, 3.7, 3.7, 2.8, 2.5, 2.4, 2.4, 2.7, 2.2, 5.28, 3.37, 3.03, 3.03, 28.95, 3.77, 3.4, 2.2, 3.5, 3.6, 3.7, 3.7]
    expect(median(chem)).toBeCloseTo(3.385, 3)
    expect(robustSigma(chem)).toBeCloseTo(0.526323, 5)
    // The same section, huber(chem) with k = 1.5: 3.206724; the plain mean is 4.280417.
    expect(huberMean(chem).mean).toBeCloseTo(3.206724, 6)
  })

  it('Huber’s mean agrees with R’s MASS::huber on a list with one wild value (27.7191195)', () => {
    const list = [27.7, 27.72, 27.68, 27.75, 27.69, 28.4]
    expect(huberMean(list).mean).toBeCloseTo(27.7191195, 6)
    expect(huberMean(list).error).toBeGreaterThan(0.005)
    expect(huberMean(list).error).toBeLessThan(0.05)
    expect(huberMean([5])).toEqual({ mean: 5, error: 0 })
  })
})

describe('zero points shared by method', () => {
  // Five values by two methods, statistical errors and a systematic one each: worked with numpy's full covariance matrix.
  const values = [27.8, 27.7, 27.86, 27.74, 27.66]
  const errors = [0.03, 0.05, 0.06, 0.04, 0.05]
  const groups = ['a', 'a', 'a', 'b', 'b']
  const systematic = new Map([['a', 0.05], ['b', 0.07]])

  it('gives the generalised least-squares mean: 27.7601908528 ± 0.0448516791, χ² 6.940651843', () => {
    const found = sharedZeroPointMean(values, errors, groups, systematic)
    expect(found.mean).toBeCloseTo(27.7601908528, 9)
    expect(found.error).toBeCloseTo(0.0448516791, 9)
    expect(found.chi2).toBeCloseTo(6.940651843, 8)
    expect(found.weights.map((w) => Number(w.toFixed(8)))).toEqual([0.40846155, 0.14704616, 0.10211539, 0.20876641, 0.1336105])
    // Taken for independent, the error would be 2.4 times too small: 27.7584797 ± 0.0188515.
    const naive = combine(values, errors, 0)
    expect([naive.mean, naive.error]).toEqual([expect.closeTo(27.7584797, 6), expect.closeTo(0.0188515, 6)])
  })

  it('is the full matrix solution (1ᵀC⁻¹x)/(1ᵀC⁻¹1), whatever the values', () => {
    const measured = fc.array(fc.tuple(fc.double({ min: 26, max: 29, noNaN: true }), fc.double({ min: 0.02, max: 0.5, noNaN: true }), fc.constantFrom('a', 'b', 'c')), { minLength: 1, maxLength: 7 })
    fc.assert(
      fc.property(measured, (list) => {
        const shared = new Map([['a', 0.05], ['b', 0.1], ['c', 0]])
        const covariance = list.map(([, e, g], i) => list.map(([, , h], j) => (i === j ? e ** 2 : 0) + (g === h ? (shared.get(g) ?? 0) ** 2 : 0)))
        const solved = solve(covariance, list.map(() => 1))
        const norm = solved.reduce((a, b) => a + b, 0)
        const found = sharedZeroPointMean(list.map(([v]) => v), list.map(([, e]) => e), list.map(([, , g]) => g), shared)
        expect(found.mean).toBeCloseTo(list.reduce((sum, [v], i) => sum + v * (solved[i] ?? 0), 0) / norm, 6)
        expect(found.error).toBeCloseTo(1 / Math.sqrt(norm), 6)
      }),
    )
  })
})
