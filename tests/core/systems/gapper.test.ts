import { describe, expect, it } from 'vitest'
import { random } from '../../../core/random.ts'
import { dispersionOf, gapperDispersion } from '../../../core/systems/gapper.ts'
import { numpy } from './numpy.ts'

describe('gapperDispersion', () => {
  it('follows its definition on a handful', () => {
    // Gaps 10 and 30 of three velocities, weighted 1·2 and 2·1: sqrt(π) / 6 · 80.
    expect(gapperDispersion([100, 110, 140])).toBeCloseTo((Math.sqrt(Math.PI) / 6) * 80, 9)
    expect(gapperDispersion([140, 100, 110])).toBeCloseTo((Math.sqrt(Math.PI) / 6) * 80, 9)
  })

  it('is not defined for fewer than three', () => {
    expect(gapperDispersion([])).toBeNull()
    expect(gapperDispersion([100, 200])).toBeNull()
  })

  it('is half of Gini’s mean difference times sqrt(π): another form of the same estimator', () => {
    // Σ i (n − i) gap_i = Σ_{i<j} |v_i − v_j|, so σ = sqrt(π)/2 × the mean difference of pairs (Wainer & Thissen 1976).
    const draw = random(3)
    const v = Array.from({ length: 23 }, () => 1000 * draw.uniform())
    const differences = v.flatMap((a, i) => v.slice(i + 1).map((b) => Math.abs(a - b)))
    const mean = differences.reduce((a, b) => a + b, 0) / differences.length
    expect(gapperDispersion(v)).toBeCloseTo((Math.sqrt(Math.PI) / 2) * mean, 9)
  })

  it('recovers the dispersion of normal velocities', () => {
    const draw = random(8)
    const estimates = Array.from({ length: 400 }, () => gapperDispersion(Array.from({ length: 15 }, () => 300 + 80 * draw.normal())) ?? NaN)
    const mean = estimates.reduce((a, b) => a + b, 0) / estimates.length
    // One estimate from 15 scatters by about 19 %, so the mean of 400 by 1 %.
    expect(Math.abs(mean / 80 - 1)).toBeLessThan(0.04)
  })
})

describe('dispersionOf', () => {
  it('agrees, error and all, with the same written by hand in numpy', () => {
    const draw = random(21)
    const lists = [4, 5, 11, 40].map((n) => Array.from({ length: n }, () => 90 * draw.normal()))
    const script = `
def gapper(v):
    v = np.sort(np.array(v)); n = len(v); i = np.arange(1, n)
    return float(np.sqrt(np.pi) / (n * (n - 1)) * np.sum(i * (n - i) * np.diff(v)))
def jackknife(v):
    n = len(v); s = np.array([gapper(np.delete(v, i)) for i in range(n)])
    return float(np.sqrt((n - 1) ** 2 / n * np.var(s, ddof=1)))
answer = [[gapper(v), jackknife(v)] for v in given]`
    const answer = numpy<[number, number][]>(script, lists)
    lists.forEach((list, i) => {
      const [value, error] = answer[i] ?? [NaN, NaN]
      expect(dispersionOf(list)).toEqual({ value: expect.closeTo(value, 9), error: expect.closeTo(error, 9), n: list.length })
    })
  })

  it('says by its error how much an estimate scatters', () => {
    const draw = random(5)
    const found = Array.from({ length: 600 }, () => dispersionOf(Array.from({ length: 12 }, () => 100 * draw.normal())))
    const values = found.map((d) => d?.value ?? NaN)
    const mean = values.reduce((a, b) => a + b, 0) / values.length
    const scatter = Math.sqrt(values.reduce((a, b) => a + (b - mean) ** 2, 0) / values.length)
    const meanError = found.reduce((a, d) => a + (d?.error ?? NaN), 0) / found.length
    expect(meanError / scatter).toBeGreaterThan(0.85)
    expect(meanError / scatter).toBeLessThan(1.15)
  })

  it('has no error for three, and nothing for two', () => {
    expect(dispersionOf([1, 5, 9])).toMatchObject({ error: null, n: 3 })
    expect(dispersionOf([1, 5])).toBeNull()
  })
})
