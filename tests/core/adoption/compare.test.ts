import { describe, expect, it } from 'vitest'
import type { Reason } from '../../../core/adoption/adopted.ts'
import { compareEstimators } from '../../../core/adoption/compare.ts'
import { DEFAULT_POLICY } from '../../../core/scale/policy.ts'

const reason = (measurementId: number, scaled: number, error: number, used = true): Reason => ({ measurementId, used, weight: used ? 0.3 : 0, shift: 0, scaled, error, residual: null, tension: false, reason: '', flags: [] })

describe('estimators to compare with', () => {
  // 27.50 ± 0.05, 27.80 ± 0.08, 28.10 ± 0.10: mean 27.6628571429, S 4.0408627085, scaled error 0.1577391288 (computed); DerSimonian–Laird 27.79178601 ± 0.17450496 (metafor 3.8).
  const list = [reason(1, 27.5, 0.05), reason(2, 27.8, 0.08), reason(3, 28.1, 0.1), reason(4, 30, 0.4, false)]
  const found = compareEstimators(list, () => 'trgb', DEFAULT_POLICY)
  const of = (key: string) => found.find((e) => e.key === key)

  it('are those of the values that were used, and only of those', () => {
    expect(of('weighted-mean')?.value).toBeCloseTo(27.6628571429, 9)
    expect(of('weighted-mean')?.error).toBeCloseTo(0.1577391288, 9)
    expect(of('weighted-mean')?.note).toContain('scale factor 4.0')
    expect(of('dersimonian-laird')?.value).toBeCloseTo(27.79178601, 7)
    expect(of('dersimonian-laird')?.error).toBeCloseTo(0.17450496, 7)
    expect(of('median')?.value).toBe(27.8)
    // One method: its systematic error of 0.05 is added to the plain mean's.
    expect(of('shared-zero-point')?.error).toBeCloseTo(Math.hypot(0.0390360029, 0.05), 9)
    expect(found.every((e) => e.value < 28.2 && e.error > 0)).toBe(true)
  })

  it('say nothing of one value', () => {
    expect(compareEstimators([reason(1, 27.5, 0.05), reason(4, 30, 0.4, false)], () => 'trgb', DEFAULT_POLICY)).toEqual([])
  })
})
