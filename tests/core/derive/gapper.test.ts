import { describe, expect, it } from 'vitest'
import { gapperDispersion } from '../../../core/derive/gapper.ts'
import { random } from '../../../core/random.ts'

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

  it('recovers the dispersion of normal velocities', () => {
    const draw = random(8)
    const estimates = Array.from({ length: 400 }, () => gapperDispersion(Array.from({ length: 15 }, () => 300 + 80 * draw.normal())) ?? NaN)
    const mean = estimates.reduce((a, b) => a + b, 0) / estimates.length
    // One estimate from 15 scatters by about 19 %, so the mean of 400 by 1 %.
    expect(Math.abs(mean / 80 - 1)).toBeLessThan(0.04)
  })
})
