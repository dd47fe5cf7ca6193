/** Satellite or not, and how sure: a galaxy's place against its main disturber, with the distance errors drawn through. */
import { distanceOf } from '../astro/distance.ts'
import { tidalTerm, virialRadius } from '../astro/environment.ts'
import { length, type Vector } from '../astro/vector.ts'
import { random } from '../random.ts'
import type { Policy } from '../scale/policy.ts'
import type { Neighbour } from './neighbourhood.ts'

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

/** The rule: within the host's reach (its term above 0) and within its sphere. */
function holds(separation: number, hostMass: number, sphere: number): boolean {
  return separation <= sphere && tidalTerm(hostMass, Math.max(separation, 1e-6)) > 0
}

/**
 * Membership of a galaxy in the system of its main disturber.
 *
 * Both moduli are drawn from their errors; the systematic parts move together, by one number a draw, since a wrong scale moves all galaxies
 * alike. Masses are held. The generator is seeded by the policy and the slugs of the two galaxies, so that a result does not depend on what else is computed.
 */
export function membershipOf(galaxy: Neighbour, host: Neighbour, policy: Policy['host']): Membership {
  const sphere = sphereOf(host.mass, policy)
  const separation = Math.hypot(galaxy.x - host.x, galaxy.y - host.y, galaxy.z - host.z)
  const isSatellite = holds(separation, host.mass, sphere)
  const draw = random(policy.seed, streamOf(galaxy.slug, host.slug))
  const toGalaxy = unit(galaxy)
  const toHost = unit(host)
  const separations = new Float64Array(policy.draws)
  let agreeing = 0
  for (let i = 0; i < policy.draws; i++) {
    const scale = draw.normal()
    const d1 = distanceOf(galaxy.modulus + scale * (galaxy.systematic ?? 0) + draw.normal() * errorOf(galaxy, policy))
    const d2 = distanceOf(host.modulus + scale * (host.systematic ?? 0) + draw.normal() * errorOf(host, policy))
    const r = Math.hypot(d1 * toGalaxy[0] - d2 * toHost[0], d1 * toGalaxy[1] - d2 * toHost[1], d1 * toGalaxy[2] - d2 * toHost[2])
    separations[i] = r
    if (holds(r, host.mass, sphere) === isSatellite) agreeing++
  }
  separations.sort()
  return {
    isSatellite, probability: agreeing / policy.draws, separation, separationLo: quantile(separations, 0.16), separationHi: quantile(separations, 0.84),
  }
}

function errorOf(g: Neighbour, policy: Policy['host']): number {
  return g.statistical ?? policy.unknownError
}

function unit(g: Neighbour): Vector {
  const d = length([g.x, g.y, g.z])
  return [g.x / d, g.y / d, g.z / d]
}

/** Quantile of a sorted list, linear between neighbours (type 7 of Hyndman & Fan 1996, The American Statistician 50, 361). */
function quantile(sorted: Float64Array, p: number): number {
  const position = (sorted.length - 1) * p
  const below = Math.floor(position)
  const low = sorted[below] ?? NaN
  return low + (position - below) * ((sorted[below + 1] ?? low) - low)
}

/**
 * A stream of its own for every ordered pair, by FNV-1a over the slugs: the database's numbers would not do, since a galaxy that is only
 * foreseen gets another number when it is made.
 */
function streamOf(galaxy: string, host: string): number {
  let hash = 0x811c9dc5
  for (const character of `${galaxy} ${host}`) hash = Math.imul(hash ^ (character.codePointAt(0) ?? 0), 0x01000193)
  return hash >>> 0
}
