import { distanceWithErrors } from '../astro/distance.ts'
import { length, type Vector } from '../astro/vector.ts'

export interface Sight {
  /** From the observer to the galaxy, unit vector. */
  direction: Vector
  /** How far its own error lets it come nearer or recede along the line of sight, kpc, not negative. */
  nearer: number
  farther: number
}

/**
 * The error bar of a galaxy in space: along the line of sight, one standard deviation of what is its own in the distance modulus. The common
 * error of the scale is left out, since it moves a system as a whole.
 *
 * @param position - Mpc, the observer at the origin; not the origin
 * @param modulus, statistical - mag
 */
export function sightOf(position: Vector, modulus: number, statistical: number): Sight {
  const distance = length(position)
  const { plus, minus } = distanceWithErrors(modulus, statistical)
  return { direction: [position[0] / distance, position[1] / distance, position[2] / distance], nearer: 1000 * minus, farther: 1000 * plus }
}
