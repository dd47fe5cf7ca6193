import { describe, expect, it } from 'vitest'
import { binsOf, distanceAfter, shiftInErrors, summaryOf } from '../../core/shifts.ts'
import type { Shift } from '../../core/effect.ts'

const shift = (before: number, after: number, more: Partial<Shift> = {}): Shift => ({ slug: 'x', name: 'X', distance: 1, before, after, error: 0.1, method: 'trgb', hostChanged: false, ...more })

describe('shifts', () => {
  it('come to their ends, their median and how many change host', () => {
    expect(summaryOf([])).toBeNull()
    const odd = summaryOf([shift(25, 25.3, { hostChanged: true }), shift(25, 24.9), shift(25, 25.1)])
    expect(odd).toMatchObject({ count: 3, least: expect.closeTo(-0.1, 9) as number, greatest: expect.closeTo(0.3, 9) as number, median: expect.closeTo(0.1, 9) as number, hostsChanged: 1 })
    expect(summaryOf([shift(25, 25.1), shift(25, 25.3)])?.median).toBeCloseTo(0.2, 9)
  })

  it('are told in units of the error, where there is one, and as distances', () => {
    expect(shiftInErrors(shift(25, 25.05))).toBeCloseTo(0.5, 9)
    expect(shiftInErrors(shift(25, 25.05, { error: 0 }))).toBeNull()
    expect(distanceAfter(shift(25, 30))).toBeCloseTo(10, 12)
  })

  it('fall into bins, each once, the upper end among them', () => {
    expect(binsOf([0, 0.1, 0.5, 1, 1.2], 0, 1, 2)).toEqual([{ lo: 0, hi: 0.5, count: 2 }, { lo: 0.5, hi: 1, count: 2 }])
    expect(binsOf([0.5, 0.5], 0, 1, 1)[0]?.count).toBe(2)
  })
})
