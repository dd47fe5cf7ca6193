/**
 * Errors of derived values, carried through to first order. The rules, once for all:
 *
 * - An asymmetric error enters as the mean of its two sides, as it does in adoption.
 * - The distance counts with both its parts, statistical and systematic: the value is as wrong as the distance is.
 * - The error of what is measured (a magnitude, an angle, a flux) and that of the distance must be known, or the derived value has none.
 *   What only corrects it (reddening, axis ratio) counts as exact where it states no error.
 * - Common practice, no source: independent errors add in quadrature (Bevington & Robinson 2003, chapter 3, from memory).
 */
import type { Adopted } from '../adoption/adopted.ts'
import { statedError } from '../adoption/eligible.ts'
import { RELATIVE_PER_MAG } from '../astro/distance.ts'

/** Of an adopted value, one standard deviation in its unit: null where none is known. */
export function errorOf(adopted: Adopted | undefined): number | null {
  if (!adopted || adopted.value === null) return null
  const statistical = statedError(adopted)
  return statistical === null ? null : Math.hypot(statistical, adopted.errSys ?? 0)
}

/** Of a correction: 0 where none is known. */
export function correctionError(adopted: Adopted | undefined): number {
  return errorOf(adopted) ?? 0
}

/** Parts in quadrature; null when one of them is unknown. */
export function inQuadrature(...parts: readonly (number | null)[]): number | null {
  let sum = 0
  for (const part of parts) {
    if (part === null) return null
    sum += part * part
  }
  return Math.sqrt(sum)
}

/** A part times a factor; null stays null. */
export function times(part: number | null, factor: number): number | null {
  return part === null ? null : part * Math.abs(factor)
}

/** Relative error of a length that is an angle times the distance. @param modulusError - mag @param angleError, angle - in one unit */
export function relativeLengthError(modulusError: number | null, angleError: number | null, angle: number): number | null {
  return inQuadrature(times(modulusError, RELATIVE_PER_MAG), times(angleError, 1 / angle))
}
