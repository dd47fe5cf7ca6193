/** How far distance errors may have made the shape of a system. */
import { RELATIVE_PER_MAG } from '../astro/distance.ts'
import { angleBetween } from '../astro/sphere.ts'
import { degrees } from '../astro/units.ts'
import { length, type Vector } from '../astro/vector.ts'
import type { Placed } from './flattening-draws.ts'
import { OUR_OWN_WITHIN_MPC } from '../derive/rest.ts'

export interface Stretch {
  /** Rms error of a satellite's place against its host, nearly all along the line of sight, kpc. The common error of the scale left out. */
  depthError: number
  /** Angle between the major axis and the line of sight to the host, 0 to 90 deg; null for our own Galaxy, which is seen from within. */
  alongSight: number | null
  /** Whether the errors are so large against the system that its shape is theirs as much as its own. */
  dominates: boolean
}

/** From this share of the rms extent along the major axis on. Common practice, no source. */
const DOMINATES_FROM = 0.5
const KPC_PER_MPC = 1000

/**
 * @param extent - rms along the major axis, kpc
 * @param unknownError - stands in where no error is known, mag
 */
export function stretchOf(host: Placed, satellites: readonly Placed[], major: Vector, extent: number, unknownError: number): Stretch {
  const errorOf = ({ position, statistical }: Placed): number => KPC_PER_MPC * length(position) * RELATIVE_PER_MAG * (statistical ?? unknownError)
  const squares = satellites.reduce((sum, s) => sum + errorOf(s) ** 2, 0)
  const depthError = Math.sqrt(squares / satellites.length + errorOf(host) ** 2)
  const apart = degrees(angleBetween(major, host.position))
  return { depthError, alongSight: length(host.position) < OUR_OWN_WITHIN_MPC ? null : Math.min(apart, 180 - apart), dominates: depthError > DOMINATES_FROM * extent }
}
