/** Whether a system is flatter than chance would have it. */
import type { Vector } from '../astro/vector.ts'
import { length } from '../astro/vector.ts'
import { normals } from '../random.ts'
import { extents, FEWEST_SATELLITES } from './flattening.ts'
import { symmetricEigen } from './symmetric-eigen.ts'

export interface Isotropy {
  /** Reshuffled systems, and how many of them are as flat as the observed one or flatter. */
  reshuffles: number
  asFlat: number
  /** Probability that an isotropic system with these radii is as flat: (asFlat + 1) / (reshuffles + 1). */
  p: number
  /** Binomial error of p from the number of reshuffles. */
  error: number
  /** How often each minor-to-major ratio came out: equal bins over [0, 1]. */
  histogram: readonly number[]
}

const BINS = 40
/** The draws of the distances take streams 1 and 2 of the same seed. */
const SHUFFLE_STREAM = 3

/**
 * Fraction of isotropic systems that are as flat: each satellite keeps its distance from the host and takes a direction at random. With the
 * observed system counted among them, (k + 1) / (n + 1), the fraction is never 0 and the test never claims more than its reshuffles allow
 * (Davison & Hinkley 1997, Bootstrap Methods and their Application, section 4.2; from memory).
 *
 * It says nothing of where satellites were looked for: a survey that leaves out part of the sky may make a system flat by itself.
 *
 * @param offsets - from the host, any unit
 * @param minorToMajor - of the observed system
 * @param reshuffles - how many, at least 1; the same seed gives the same ones
 * @returns null for fewer than FEWEST_SATELLITES
 */
export function isotropyOf(offsets: readonly Vector[], minorToMajor: number, { reshuffles, seed }: { reshuffles: number; seed: number }): Isotropy | null {
  if (offsets.length < FEWEST_SATELLITES) return null
  const squares = offsets.map((offset) => length(offset) ** 2)
  const directions = normals(seed, SHUFFLE_STREAM, 3 * squares.length * reshuffles)
  const counts = new Array<number>(BINS).fill(0)
  let asFlat = 0
  for (let i = 0; i < reshuffles; i++) {
    const ratio = ratioOf(squares, directions, 3 * squares.length * i)
    if (ratio <= minorToMajor) asFlat++
    const bin = Math.min(BINS - 1, Math.floor(ratio * BINS))
    counts[bin] = (counts[bin] ?? 0) + 1
  }
  const p = (asFlat + 1) / (reshuffles + 1)
  return { reshuffles, asFlat, p, error: Math.sqrt((p * (1 - p)) / reshuffles), histogram: counts }
}

/** Minor-to-major ratio of satellites of these squared radii in the directions of the normals from a place on. */
function ratioOf(squares: readonly number[], directions: Float64Array, from: number): number {
  let [xx, yy, zz, xy, xz, yz] = [0, 0, 0, 0, 0, 0]
  let at = from
  for (const square of squares) {
    const x = directions[at++] ?? NaN
    const y = directions[at++] ?? NaN
    const z = directions[at++] ?? NaN
    // Three normals point anywhere with equal chance (Muller 1959); only their products over r² are needed.
    const weight = square / (x * x + y * y + z * z)
    xx += weight * x * x
    yy += weight * y * y
    zz += weight * z * z
    xy += weight * x * y
    xz += weight * x * z
    yz += weight * y * z
  }
  const [major, , minor] = extents(symmetricEigen([xx, yy, zz, xy, xz, yz]).values)
  return minor / major
}
