import { describe, expect, it } from 'vitest'
import type { Vector } from '../../../core/astro/vector.ts'
import { random } from '../../../core/random.ts'
import { flatteningOf } from '../../../core/systems/flattening.ts'
import { isotropyOf } from '../../../core/systems/isotropy.ts'
import { numpy } from './numpy.ts'
import { isotropic } from './satellites.ts'

const tested = (satellites: readonly Vector[], reshuffles: number, seed = 7) => {
  const found = isotropyOf(satellites, flatteningOf(satellites)?.minorToMajor ?? NaN, { reshuffles, seed })
  if (!found) throw new Error('there are enough satellites')
  return found
}

describe('isotropyOf', () => {
  it('gives every p the same chance to systems that are isotropic', () => {
    const draw = random(77)
    const trials = 400
    const ps = Array.from({ length: trials }, (_, k) => tested(isotropic(draw, 6 + (k % 15), 300), 300, k).p).sort((a, b) => a - b)
    // Largest gap between the shares and the diagonal (Kolmogorov–Smirnov): by chance above 1.63 / sqrt(n) once in a hundred seeds; this one is fixed.
    const gap = Math.max(...ps.map((p, i) => Math.max(Math.abs((i + 1) / trials - p), Math.abs(p - i / trials))))
    expect(gap).toBeLessThan(1.63 / Math.sqrt(trials))
  })

  it('finds a planted plane', () => {
    const draw = random(5)
    const plane = isotropic(draw, 14, 250).map(([x, y, z]): Vector => [x, y, 0.1 * z])
    expect(tested(plane, 2000).p).toBeLessThan(0.005)
    // The least that so many reshuffles can say, and not 0.
    const sheet = isotropic(draw, 14, 250).map(([x, y]): Vector => [x, y, 0])
    expect(tested(sheet, 2000)).toMatchObject({ asFlat: 0, p: 1 / 2001 })
  })

  it('agrees with numpy’s own reshuffles of the same radii', () => {
    const satellites = isotropic(random(31), 8, 250).map(([x, y, z]): Vector => [x, y, 0.5 * z])
    const ratio = flatteningOf(satellites)?.minorToMajor ?? NaN
    const script = `
r = np.linalg.norm(np.array(given), axis=1); g = np.random.default_rng(12); n = 20000
u = g.normal(size=(n, len(r), 3)); u *= (r / np.linalg.norm(u, axis=2))[:, :, None]
w = np.linalg.eigvalsh(np.einsum('nik,nil->nkl', u, u)); own = np.linalg.eigvalsh(np.array(given).T @ np.array(given))
answer = [float(np.sqrt(own[0] / own[2])), float(np.mean(np.sqrt(w[:, 0] / w[:, 2]) <= np.sqrt(own[0] / own[2])))]`
    const [expectedRatio, share] = numpy<[number, number]>(script, satellites)
    expect(ratio).toBeCloseTo(expectedRatio, 10)
    const found = tested(satellites, 20_000)
    // Two estimates of one share, each with the binomial error.
    expect(Math.abs(found.p - share)).toBeLessThan(4 * Math.SQRT2 * found.error)
    expect(found.error).toBeCloseTo(Math.sqrt((found.p * (1 - found.p)) / 20_000), 12)
  })

  it('repeats itself, and counts every reshuffle once', () => {
    const satellites = isotropic(random(9), 7, 100)
    const first = tested(satellites, 500)
    expect(tested(satellites, 500)).toEqual(first)
    expect(tested(satellites, 500, 8).histogram).not.toEqual(first.histogram)
    expect(first.histogram.reduce((a, b) => a + b, 0)).toBe(500)
    expect(first.p).toBe((first.asFlat + 1) / 501)
  })

  it('says nothing of four', () => {
    expect(isotropyOf(isotropic(random(1), 4, 100), 0.2, { reshuffles: 100, seed: 1 })).toBeNull()
  })
})
