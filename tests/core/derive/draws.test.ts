import { describe, expect, it } from 'vitest'
import { drawnDistances, drawsKept } from '../../../core/derive/draws.ts'
import { DEFAULT_POLICY } from '../../../core/scale/policy.ts'
import { neighbour } from './neighbours.ts'

const policy = { ...DEFAULT_POLICY.host, draws: 20_000 }
const at = (id: number, more = {}) => neighbour(id, [3.6, 0, 0], 1e9, more)

/** Deviations of the drawn moduli from the adopted one, mag. */
const deviations = (g: ReturnType<typeof at>): number[] => [...drawnDistances(g, policy)].map((d) => 5 * Math.log10(d) + 25 - g.modulus)

const mean = (list: readonly number[]): number => list.reduce((sum, x) => sum + x, 0) / list.length
const correlation = (a: readonly number[], b: readonly number[]): number => {
  const [ma, mb] = [mean(a), mean(b)]
  const product = (x: readonly number[], mx: number, y: readonly number[], my: number): number => mean(x.map((v, i) => (v - mx) * ((y[i] ?? 0) - my)))
  return product(a, ma, b, mb) / Math.sqrt(product(a, ma, a, ma) * product(b, mb, b, mb))
}

describe('drawn distances', () => {
  // Bounds are four standard errors of 20,000 draws.
  it('scatter as their errors say', () => {
    for (let id = 1; id <= 12; id++) {
      const d = deviations(at(id, { statistical: 0.1, systematic: 0 }))
      const m = mean(d)
      expect(Math.abs(m)).toBeLessThan((4 * 0.1) / Math.sqrt(20_000))
      expect(Math.abs(Math.sqrt(mean(d.map((x) => (x - m) ** 2))) - 0.1)).toBeLessThan((4 * 0.1) / Math.sqrt(40_000))
    }
  })

  it('share the error of the scale and nothing else', () => {
    expect(correlation(deviations(at(1, { statistical: 0, systematic: 0.1 })), deviations(at(2, { statistical: 0, systematic: 0.05 })))).toBeCloseTo(1, 9)
    for (let id = 2; id < 40; id++) {
      expect(Math.abs(correlation(deviations(at(1, { systematic: 0 })), deviations(at(id, { systematic: 0 }))))).toBeLessThan(4 / Math.sqrt(20_000))
    }
    // The same own and common error: half of the variance is shared.
    expect(correlation(deviations(at(1, { statistical: 0.1, systematic: 0.1 })), deviations(at(2, { statistical: 0.1, systematic: 0.1 })))).toBeCloseTo(0.5, 1)
  })

  it('are the same however often, and by whatever way, they are asked for', () => {
    const once = drawnDistances(at(5), policy)
    const kept = drawsKept(policy, 3)
    const five = at(5)
    for (const g of [five, at(6), at(7), five, at(8), at(9), five, at(10), at(11), at(12), five]) kept(g)
    expect(kept(five)).toEqual(once)
    expect(kept(five)).toBe(kept(five))
  })
})
