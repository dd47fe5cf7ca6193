/** From angles to lengths. */
import { radians, requirePositive, requireWithin, type Arcmin, type Degrees, type Kpc, type Mpc, type Pc } from './units.ts'

/**
 * Half-light semi-major axis, pc: D a. The angle is small, so the arc is taken for the length.
 *
 * @see Martin, de Jong & Rix 2008, ApJ 684, 1075 (convention, from memory)
 */
export function semiMajorPc(distance: Mpc, semiMajor: Arcmin): Pc {
  requirePositive(distance, 'distance (Mpc)')
  requirePositive(semiMajor, 'semi-major axis (arcmin)')
  return distance * 1e6 * radians(semiMajor / 60)
}

/** Circularised half-light radius, pc: D a sqrt(b/a). */
export function circularisedPc(distance: Mpc, semiMajor: Arcmin, axisRatio: number): Pc {
  requireWithin(axisRatio, Number.MIN_VALUE, 1, 'axis ratio')
  return semiMajorPc(distance, semiMajor) * Math.sqrt(axisRatio)
}

/** Diameter, kpc, of what spans an angle: 2 D tan(θ/2). @param angle - deg, in (0, 180) */
export function diameterKpc(distance: Mpc, angle: Degrees): Kpc {
  requirePositive(distance, 'distance (Mpc)')
  requireWithin(angle, Number.MIN_VALUE, 179.999, 'angle (deg)')
  return 2000 * distance * Math.tan(radians(angle) / 2)
}
