/** Satellite or not, and how sure: a galaxy's place against its main disturber, with the distance errors drawn through. */
import { TIDAL_INDEX_CONSTANT } from '../astro/constants.ts'
import { RELATIVE_PER_MAG } from '../astro/distance.ts'
import { virialRadius } from '../astro/environment.ts'
import { length, type Vector } from '../astro/vector.ts'
import { normals } from '../random.ts'
import type { Policy } from '../scale/policy.ts'
import type { Neighbour } from './neighbourhood.ts'
import { quantilesInPlace } from './quantile.ts'

export interface Membership {
  isSatellite: boolean
  /** Fraction of draws in which the assignment (satellite of it, or not) holds. */
  probability: number
  /** 3-D separation, Mpc: from the adopted distances, and the 16th and 84th percentile of the draws. */
  separation: number
  separationLo: number
  separationHi: number
}

/** Radius of a host's sphere, Mpc: a multiple of its R200, with the total mass from the stellar one. */
export function sphereOf(mass: number, policy: Policy['host']): number {
  return policy.sphere * virialRadius(policy.totalOverStellar * mass, policy.hubble)
}

/** How near a satellite has to be, Mpc: within the host's sphere, and where its term of the tidal index is above 0. */
export function reachOf(mass: number, policy: Policy['host']): number {
  return Math.min(sphereOf(mass, policy), Math.cbrt(mass * 10 ** TIDAL_INDEX_CONSTANT))
}

/**
 * Distances of a galaxy, Mpc, drawn from the errors of its modulus.
 *
 * The systematic part moves by one number a draw, the same for all galaxies, since a wrong scale moves them all alike. What is a galaxy's own
 * is seeded by the policy and its slug: so a draw of one galaxy is the same whatever it is compared with, and a result does not depend on
 * what else is computed. (The database's numbers would not do: a galaxy that is only foreseen gets another number when it is made.)
 */
export function drawnDistances(galaxy: Neighbour, policy: Policy['host']): Float64Array {
  const scale = scaleDraws(policy)
  const own = normals(policy.seed, streamOf(galaxy.slug), policy.draws)
  const statistical = galaxy.statistical ?? policy.unknownError
  const systematic = galaxy.systematic ?? 0
  const distances = new Float64Array(policy.draws)
  for (let i = 0; i < policy.draws; i++) {
    distances[i] = Math.exp(RELATIVE_PER_MAG * (galaxy.modulus - 25 + systematic * (scale[i] ?? 0) + statistical * (own[i] ?? 0)))
  }
  return distances
}

/**
 * Membership of a galaxy in the system of its main disturber. Masses are held, distances are drawn.
 *
 * @param hostDistances - `drawnDistances` of the host: handed in where many share it
 */
export function membershipOf(galaxy: Neighbour, host: Neighbour, policy: Policy['host'], hostDistances: Float64Array = drawnDistances(host, policy)): Membership {
  const reach = reachOf(host.mass, policy)
  const separation = Math.hypot(galaxy.x - host.x, galaxy.y - host.y, galaxy.z - host.z)
  const isSatellite = separation <= reach
  const chord2 = chordSquared(unit(galaxy), unit(host))
  const drawn = drawnDistances(galaxy, policy)
  const reach2 = reach * reach
  let within = 0
  for (let i = 0; i < drawn.length; i++) {
    const d1 = drawn[i] ?? NaN
    const d2 = hostDistances[i] ?? NaN
    // The law of cosines in the form that keeps its digits when the two are close to one another.
    const r2 = (d1 - d2) * (d1 - d2) + d1 * d2 * chord2
    drawn[i] = r2
    if (r2 <= reach2) within++
  }
  const [lo = NaN, hi = NaN] = quantilesInPlace(drawn, [0.16, 0.84])
  return { isSatellite, probability: (isSatellite ? within : drawn.length - within) / drawn.length, separation, separationLo: Math.sqrt(lo), separationHi: Math.sqrt(hi) }
}

function chordSquared(a: Vector, b: Vector): number {
  return (a[0] - b[0]) ** 2 + (a[1] - b[1]) ** 2 + (a[2] - b[2]) ** 2
}

function unit(g: Neighbour): Vector {
  const d = length([g.x, g.y, g.z])
  return [g.x / d, g.y / d, g.z / d]
}

let lastScale: { seed: number; draws: Float64Array } | null = null

/** The common scale error of each draw, in standard deviations; the last list is kept, since all galaxies ask for the same. */
function scaleDraws({ seed, draws }: Policy['host']): Float64Array {
  if (lastScale?.seed !== seed || lastScale.draws.length !== draws) {
    lastScale = { seed, draws: normals(seed, streamOf(''), draws) }
  }
  return lastScale.draws
}

/** A stream of its own for every slug: FNV-1a. */
function streamOf(slug: string): number {
  let hash = 0x811c9dc5
  for (let i = 0; i < slug.length; i++) hash = Math.imul(hash ^ slug.charCodeAt(i), 0x01000193)
  return hash >>> 0
}
