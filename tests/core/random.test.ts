import { describe, expect, it } from 'vitest'
import { normals, random } from '../../core/random.ts'

describe('random', () => {
  it('gives the sequence that the reference implementation prints', () => {
    // Output of pcg32-demo, seed 42, stream 54, from the PCG project's C sample (O'Neill 2014); two draws make one uniform.
    const published = [0xa15c02b7, 0x7b47f409, 0xba1d3330, 0x83d2f293, 0xbfa4784b, 0xcbed606e]
    const pair = (i: number): number => ((published[i] ?? NaN) * 2 ** 21 + ((published[i + 1] ?? NaN) >>> 11)) / 2 ** 53
    const draw = random(42, 54)
    expect([draw.uniform(), draw.uniform(), draw.uniform()]).toEqual([pair(0), pair(2), pair(4)])
  })

  it('draws normals of zero mean and unit variance within the sampling error', () => {
    const draw = random(7)
    const n = 40_000
    const values = Array.from({ length: n }, () => draw.normal())
    const mean = values.reduce((a, b) => a + b, 0) / n
    const variance = values.reduce((a, b) => a + (b - mean) ** 2, 0) / (n - 1)
    expect(Math.abs(mean)).toBeLessThan(4 / Math.sqrt(n))
    expect(Math.abs(variance - 1)).toBeLessThan(4 * Math.sqrt(2 / n))
  })

  it('keeps streams apart and repeats itself', () => {
    const three = (seed: number, stream: number): number[] => {
      const draw = random(seed, stream)
      return [draw.uniform(), draw.uniform(), draw.uniform()]
    }
    expect(three(1, 1)).toEqual(three(1, 1))
    expect(three(1, 1)).not.toEqual(three(1, 2))
  })

  it('draws many normals at once from the same numbers', () => {
    const published = [0xa15c02b7, 0x7b47f409, 0xba1d3330, 0x83d2f293, 0xbfa4784b, 0xcbed606e].map((n) => (n | 0) / 2 ** 31)
    const expected = [0, 2, 4].flatMap((i) => {
      const [u = NaN, v = NaN] = published.slice(i, i + 2)
      const s = u * u + v * v
      const factor = Math.sqrt((-2 * Math.log(s)) / s)
      return s < 1 ? [u * factor, v * factor] : []
    })
    expect(expected.length).toBeGreaterThan(1)
    expect([...normals(42, 54, expected.length)]).toEqual(expected)
  })

  it('gives the bulk of normals the moments of a normal, up to the fourth, within the sampling error', () => {
    const n = 200_000
    const list = normals(20111, 0xfedcba98, n)
    const moment = (k: number): number => list.reduce((sum, x) => sum + x ** k, 0) / n
    expect(Math.abs(moment(1))).toBeLessThan(4 / Math.sqrt(n))
    expect(Math.abs(moment(2) - 1)).toBeLessThan(4 * Math.sqrt(2 / n))
    expect(Math.abs(moment(3))).toBeLessThan(4 * Math.sqrt(15 / n))
    expect(Math.abs(moment(4) - 3)).toBeLessThan(4 * Math.sqrt(96 / n))
    expect(normals(20111, 7, 5)).toEqual(normals(20111, 7, 9).slice(0, 5))
  })
})
