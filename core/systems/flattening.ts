/** How flat a system of satellites is: its second moments about the host. */
import { directionOf } from '../astro/sphere.ts'
import { cross, type Vector } from '../astro/vector.ts'
import { symmetricEigen, type Symmetric } from './symmetric-eigen.ts'

/**
 * With fewer satellites nothing is said of the flattening: the fewer there are, the flatter a system comes out whatever it is (three points
 * lie in a plane with one another, and nearly with the host). Common practice, no source.
 */
export const FEWEST_SATELLITES = 5

export interface Flattening {
  /** Minor to major axis: ratio of the rms extents, 0 (a plane through the host) to 1 (round). */
  minorToMajor: number
  /** Intermediate to major axis. */
  middleToMajor: number
  /** Rms distance from the plane through the host that makes it least; unit of the offsets. */
  height: number
  /** Rms extent along the major axis; unit of the offsets. */
  extent: number
  /** Unit vectors, supergalactic, right-handed: major axis, intermediate axis, normal of the plane. */
  axes: readonly [Vector, Vector, Vector]
  /** Supergalactic direction of the normal, deg. Of its two ends the one with SGB ≥ 0 is given. */
  pole: { sgl: number; sgb: number }
}

/**
 * Second-moment tensor Σ r rᵀ / n of satellites about their host, all weighed alike. About the host and not about their centroid, since it
 * is the host's potential they move in; a system that lies all on one side is then long, not flat.
 *
 * @param offsets - from the host, supergalactic, one unit for all; not all null
 * @returns null for fewer than FEWEST_SATELLITES
 */
export function flatteningOf(offsets: readonly Vector[]): Flattening | null {
  if (offsets.length < FEWEST_SATELLITES) return null
  const { values, vectors } = symmetricEigen(secondMoments(offsets))
  const [major, middle, minor] = extents(values)
  const normal = northward(vectors[2])
  const along = northward(vectors[0])
  return {
    minorToMajor: minor / major, middleToMajor: middle / major, height: minor, extent: major, axes: [along, cross(normal, along), normal], pole: poleOf(normal),
  }
}

/** Mean of the products of the coordinates; unit of the offsets, squared. */
export function secondMoments(offsets: readonly Vector[]): Symmetric {
  const sums: [number, number, number, number, number, number] = [0, 0, 0, 0, 0, 0]
  for (const [x, y, z] of offsets) {
    sums[0] += x * x
    sums[1] += y * y
    sums[2] += z * z
    sums[3] += x * y
    sums[4] += x * z
    sums[5] += y * z
  }
  const n = offsets.length
  return [sums[0] / n, sums[1] / n, sums[2] / n, sums[3] / n, sums[4] / n, sums[5] / n]
}

/** Rms extents along the axes, longest first. Rounding may leave the least eigenvalue of a plane just below 0. */
export function extents(values: Vector): Vector {
  return [Math.sqrt(Math.max(0, values[0])), Math.sqrt(Math.max(0, values[1])), Math.sqrt(Math.max(0, values[2]))]
}

/** The end of an axis with SGB ≥ 0; of a level one, with SGL in [0, 180). */
function northward([x, y, z]: Vector): Vector {
  const turned = z < 0 || (z === 0 && (y < 0 || (y === 0 && x < 0)))
  // 0 and not −0.
  return turned ? [0 - x, 0 - y, 0 - z] : [x, y, z]
}

function poleOf(normal: Vector): Flattening['pole'] {
  const { lon, lat } = directionOf(normal)
  return { sgl: lon, sgb: lat }
}
