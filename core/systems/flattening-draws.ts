/** The flattening with the distance errors carried through. */
import { angleBetween } from '../astro/sphere.ts'
import { degrees } from '../astro/units.ts'
import { length, type Vector } from '../astro/vector.ts'
import { drawnDistances } from '../derive/draws.ts'
import { quantilesInPlace } from '../derive/quantile.ts'
import type { Policy } from '../scale/policy.ts'
import { extents, FEWEST_SATELLITES } from './flattening.ts'
import { symmetricEigen, type Symmetric } from './symmetric-eigen.ts'

/** What a draw needs of a galaxy. Errors of the modulus in mag; null where none is known: the policy's stands in. */
export interface Placed {
  slug: string
  /** Supergalactic, Mpc. Not the origin. */
  position: Vector
  modulus: number
  statistical: number | null
  systematic: number | null
}

/** Median with the 16th and 84th percentile. */
export interface Range {
  median: number
  lo: number
  hi: number
}

export interface FlatteningDraws {
  draws: number
  minorToMajor: Range
  middleToMajor: Range
  /** Rms height about the plane through the host, kpc. */
  height: Range
  /** Angle about the normal that holds 68 % of the drawn normals, deg, 0 to 90. */
  poleSpread: number
}

const KPC_PER_MPC = 1000
const CENTRAL = [0.16, 0.5, 0.84] as const
const SHARE_ABOUT_POLE = 0.68

/**
 * The flattening in each of the policy's draws of all distances, the host's too. The draws are those of the memberships: seeded by policy
 * and slug, with the error of the scale common to all galaxies of a draw.
 *
 * Errors of distance stretch a remote system along the line of sight, so the median is no better a guess of the truth than the adopted
 * value; the range says how much the errors matter.
 *
 * @param normal - of the adopted distances, unit vector
 * @returns null for fewer than FEWEST_SATELLITES
 */
export function flatteningDraws(host: Placed, satellites: readonly Placed[], normal: Vector, policy: Policy['host']): FlatteningDraws | null {
  if (satellites.length < FEWEST_SATELLITES) return null
  const total = policy.draws
  const moments = drawnMoments(host, satellites, policy)
  const [ca, ba, height, angle] = [new Float64Array(total), new Float64Array(total), new Float64Array(total), new Float64Array(total)]
  for (let i = 0; i < total; i++) {
    const { values, vectors } = symmetricEigen(momentsAt(moments, i))
    const [major, middle, minor] = extents(values)
    ca[i] = minor / major
    ba[i] = middle / major
    height[i] = KPC_PER_MPC * minor
    const apart = degrees(angleBetween(vectors[2], normal))
    angle[i] = Math.min(apart, 180 - apart)
  }
  const [poleSpread = NaN] = quantilesInPlace(angle, [SHARE_ABOUT_POLE])
  return { draws: total, minorToMajor: rangeOf(ca), middleToMajor: rangeOf(ba), height: rangeOf(height), poleSpread }
}

/** Second moments of every draw, six numbers a draw, Mpc². */
function drawnMoments(host: Placed, satellites: readonly Placed[], policy: Policy['host']): Float64Array {
  const total = policy.draws
  const moments = new Float64Array(6 * total)
  const own = drawnDistances(host, policy)
  const [hx, hy, hz] = unit(host.position)
  for (const satellite of satellites) {
    const distances = drawnDistances(satellite, policy)
    const [ux, uy, uz] = unit(satellite.position)
    for (let i = 0; i < total; i++) {
      const d = distances[i] ?? NaN
      const h = own[i] ?? NaN
      const x = d * ux - h * hx
      const y = d * uy - h * hy
      const z = d * uz - h * hz
      const at = 6 * i
      moments[at] = (moments[at] ?? 0) + x * x
      moments[at + 1] = (moments[at + 1] ?? 0) + y * y
      moments[at + 2] = (moments[at + 2] ?? 0) + z * z
      moments[at + 3] = (moments[at + 3] ?? 0) + x * y
      moments[at + 4] = (moments[at + 4] ?? 0) + x * z
      moments[at + 5] = (moments[at + 5] ?? 0) + y * z
    }
  }
  return moments.map((sum) => sum / satellites.length)
}

function momentsAt(moments: Float64Array, i: number): Symmetric {
  const at = (k: number): number => moments[6 * i + k] ?? NaN
  return [at(0), at(1), at(2), at(3), at(4), at(5)]
}

/** Changes the order of the list. */
function rangeOf(list: Float64Array): Range {
  const [lo = NaN, median = NaN, hi = NaN] = quantilesInPlace(list, CENTRAL)
  return { median, lo, hi }
}

function unit(v: Vector): Vector {
  const d = length(v)
  return [v[0] / d, v[1] / d, v[2] / d]
}
