/** Distance modulus and distance. μ = 5 log10(D / Mpc) + 25. */
import { requireFinite, requirePositive, requireWithin, type Mag, type Mpc } from './units.ts'

/** ln 10 / 5: relative error of a distance per magnitude. */
export const RELATIVE_PER_MAG = Math.LN10 / 5

/**
 * @param modulus - mag, true (extinction-corrected)
 * @example distanceOf(24.407) // => 0.7610268859
 */
export function distanceOf(modulus: Mag): Mpc {
  requireFinite(modulus, 'distance modulus (mag)')
  return 10 ** ((modulus - 25) / 5)
}

/** @param distance - Mpc, above 0 */
export function modulusOf(distance: Mpc): Mag {
  requirePositive(distance, 'distance (Mpc)')
  return 5 * Math.log10(distance) + 25
}

export interface Asymmetric {
  value: number
  plus: number
  minus: number
}

/**
 * A distance with its errors, through the exact map: a symmetric error in magnitudes is larger upwards in Mpc.
 *
 * @param plus, minus - errors of the modulus, mag, not negative
 */
export function distanceWithErrors(modulus: Mag, plus: Mag, minus: Mag = plus): Asymmetric {
  requireWithin(plus, 0, Number.MAX_VALUE, 'upper error (mag)')
  requireWithin(minus, 0, Number.MAX_VALUE, 'lower error (mag)')
  const value = distanceOf(modulus)
  return { value, plus: value * (10 ** (plus / 5) - 1), minus: value * (1 - 1 / 10 ** (minus / 5)) }
}

/** The modulus of a distance with its errors, through the exact map. @throws RangeError when the lower bound is not above 0 */
export function modulusWithErrors(distance: Mpc, plus: Mpc, minus: Mpc = plus): Asymmetric {
  requirePositive(distance - minus, 'lower bound of the distance (Mpc)')
  const value = modulusOf(distance)
  return { value, plus: modulusOf(distance + plus) - value, minus: value - modulusOf(distance - minus) }
}
