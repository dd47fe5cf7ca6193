import { describe, expect, it } from 'vitest'
import { luminosityFunction } from '../../../core/systems/luminosity-function.ts'
import { poissonLimits } from '../../../core/systems/poisson-limits.ts'

/** Probability of a count of at most n when λ is expected. */
function atMost(n: number, lambda: number): number {
  let term = Math.exp(-lambda)
  let sum = term
  for (let k = 1; k <= n; k++) sum += term *= lambda / k
  return sum
}

/** The λ at which a falling function passes a value. */
function solve(falling: (lambda: number) => number, value: number): number {
  let [low, high] = [0, 400]
  for (let i = 0; i < 200; i++) {
    const middle = (low + high) / 2
    if (falling(middle) > value) low = middle
    else high = middle
  }
  return (low + high) / 2
}

const ONE_SIDED = 0.8413447460685429

describe('poissonLimits', () => {
  it('comes to 1 % of the exact limits', () => {
    for (const n of [0, 1, 2, 3, 5, 10, 30, 100, 200]) {
      const { lo, hi } = poissonLimits(n)
      const upper = solve((lambda) => atMost(n, lambda), 1 - ONE_SIDED)
      expect(Math.abs(hi / upper - 1), `upper of ${n}`).toBeLessThan(0.01)
      const lower = n === 0 ? 0 : solve((lambda) => atMost(n - 1, lambda), ONE_SIDED)
      expect(Math.abs(lo - lower), `lower of ${n}`).toBeLessThanOrEqual(0.01 * lower)
    }
  })

  it('comes to 1 % of the published limits', () => {
    // Gehrels 1986, tables 1 and 2, 84.13 %, from memory; the exact solution of this test gives the same.
    for (const [n, lo, hi] of [[0, 0, 1.841], [1, 0.1727, 3.3], [3, 1.367, 5.918], [10, 6.891, 14.27]] as const) {
      const found = poissonLimits(n)
      expect(Math.abs(found.hi / hi - 1)).toBeLessThan(0.01)
      expect(Math.abs(found.lo - lo)).toBeLessThanOrEqual(0.01 * lo)
    }
  })

  it('counts whole things only', () => {
    expect(() => poissonLimits(1.5)).toThrow(RangeError)
    expect(() => poissonLimits(-1)).toThrow(RangeError)
  })
})

describe('luminosityFunction', () => {
  it('counts from the brightest on, and says how many have no magnitude', () => {
    const found = luminosityFunction([
      { slug: 'c', absV: -7.5 }, { slug: 'a', absV: -16.2 }, { slug: 'x', absV: null }, { slug: 'b', absV: -11 }, { slug: 'd', absV: -11 },
    ])
    expect(found.missing).toBe(1)
    expect(found.steps.map((s) => [s.slug, s.count])).toEqual([['a', 1], ['b', 3], ['d', 3], ['c', 4]])
    for (const step of found.steps) expect(step).toMatchObject(poissonLimits(step.count))
  })

  it('of nothing is nothing', () => {
    expect(luminosityFunction([])).toEqual({ steps: [], missing: 0 })
    expect(luminosityFunction([{ slug: 'x', absV: null }])).toEqual({ steps: [], missing: 1 })
  })
})
