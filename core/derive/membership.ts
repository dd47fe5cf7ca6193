/** Whose satellite a galaxy is, and how sure: its place among its possible hosts, with the distance errors drawn through. */
import { virialRadius } from '../astro/environment.ts'
import { length, type Vector } from '../astro/vector.ts'
import type { Policy } from '../scale/policy.ts'
import { CLOSEST_MPC } from './disturber.ts'
import { drawsKept } from './draws.ts'
import type { Neighbour } from './neighbourhood.ts'
import { tidalReach } from './possible-hosts.ts'
import { quantilesInPlace } from './quantile.ts'

export interface Membership {
  isSatellite: boolean
  /** Fraction of draws in which the assignment (satellite of its main disturber, or of nobody) holds. */
  probability: number
  /** 3-D separation from the main disturber, Mpc: of the adopted distances; then the median, 16th and 84th percentile of the draws. */
  separation: number
  separationMedian: number
  separationLo: number
  separationHi: number
  /** Fraction of draws in which it is a satellite of each, most likely first; those of no draw left out. They sum to at most 1. */
  hosts: { slug: string; probability: number }[]
}

/** Radius of a host's sphere, Mpc: a multiple of its R200, with the total mass from the stellar one. A host by decree may have no known mass: 0. */
export function sphereOf(mass: number, policy: Policy['host']): number {
  if (mass === 0) return 0
  return policy.sphere * virialRadius(policy.totalOverStellar * mass, policy.hubble)
}

/** How near a satellite has to be, Mpc: within the host's sphere, and where its term of the tidal index is above 0. */
export function reachOf(mass: number, policy: Policy['host']): number {
  return Math.min(sphereOf(mass, policy), tidalReach(mass))
}

export type MembershipFinder = (galaxy: Neighbour, main: Neighbour, others: readonly Neighbour[]) => Membership

/** Membership of one galaxy, as `membershipFinder` finds it. */
export function membershipOf(galaxy: Neighbour, main: Neighbour, others: readonly Neighbour[], policy: Policy['host']): Membership {
  return membershipFinder(policy)(galaxy, main, others)
}

/**
 * Finds memberships. Masses are held, distances are drawn. In each draw the galaxy belongs to whichever of its possible hosts then exerts the
 * largest M★/d³, if it lies within reach of that one: the rule of the assignment itself, draw by draw.
 *
 * It is handed the galaxy, its main disturber, and its other possible hosts (core/derive/possible-hosts.ts).
 */
export function membershipFinder(policy: Policy['host']): MembershipFinder {
  const drawn = drawsKept(policy)
  const total = policy.draws
  // Filled anew for every galaxy.
  const own = new Float64Array(total)
  const separations = new Float64Array(total)
  const least = new Float64Array(total)
  const holder = new Int32Array(total)

  /** In how many draws the galaxy is a satellite of each. The squares of its separation from the first are left in `separations`, Mpc². */
  const countDraws = (galaxy: Neighbour, hosts: readonly Neighbour[]): number[] => {
    const direction = unit(galaxy)
    own.set(drawn(galaxy))
    least.fill(Infinity)
    const bounds = hosts.map((host, k) => {
      // The largest m/d³ is the least d²/m^(2/3): no roots are taken.
      const weight = host.mass > 0 ? 1 / Math.cbrt(host.mass) ** 2 : Infinity
      nearest(own, drawn(host), chordSquared(direction, unit(host)), weight, k, least, holder, k === 0 ? separations : null)
      return host.mass > 0 ? reachOf(host.mass, policy) ** 2 * weight : 0
    })
    const counts = hosts.map(() => 0)
    for (let i = 0; i < total; i++) {
      const k = holder[i] ?? 0
      if ((least[i] ?? Infinity) <= (bounds[k] ?? 0)) counts[k] = (counts[k] ?? 0) + 1
    }
    return counts
  }

  return (galaxy, main, others) => {
    const hosts = [main, ...others]
    const counts = countDraws(galaxy, hosts)
    const separation = Math.hypot(galaxy.x - main.x, galaxy.y - main.y, galaxy.z - main.z)
    const isSatellite = separation <= reachOf(main.mass, policy)
    const [lo = NaN, median = NaN, hi = NaN] = quantilesInPlace(separations, [0.16, 0.5, 0.84])
    const bound = counts.reduce((sum, c) => sum + c, 0)
    return {
      isSatellite, probability: (isSatellite ? (counts[0] ?? 0) : total - bound) / total, separation, separationMedian: Math.sqrt(median), separationLo: Math.sqrt(lo),
      separationHi: Math.sqrt(hi),
      hosts: hosts
        .map((host, k) => ({ slug: host.slug, probability: (counts[k] ?? 0) / total }))
        .filter((h) => h.probability > 0)
        .sort((a, b) => b.probability - a.probability || (a.slug < b.slug ? -1 : 1)),
    }
  }
}

const CLOSEST_SQUARED = CLOSEST_MPC ** 2

/** Lets one host stand for the holder of each draw. The loop that everything waits for. */
function nearest(own: Float64Array, host: Float64Array, chord2: number, weight: number, k: number, least: Float64Array, holder: Int32Array, separations: Float64Array | null): void {
  const closest = CLOSEST_SQUARED
  for (let i = 0; i < own.length; i++) {
    const d1 = own[i] ?? NaN
    const d2 = host[i] ?? NaN
    // The law of cosines in the form that keeps its digits when the two are close to one another.
    const r2 = (d1 - d2) * (d1 - d2) + d1 * d2 * chord2
    if (separations) separations[i] = r2
    const pull = (r2 > closest ? r2 : closest) * weight
    if (pull < (least[i] ?? Infinity)) {
      least[i] = pull
      holder[i] = k
    }
  }
}

function chordSquared(a: Vector, b: Vector): number {
  return (a[0] - b[0]) ** 2 + (a[1] - b[1]) ** 2 + (a[2] - b[2]) ** 2
}

function unit(g: Neighbour): Vector {
  const d = length([g.x, g.y, g.z])
  return [g.x / d, g.y / d, g.z / d]
}
