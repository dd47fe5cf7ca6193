/** Radial velocities in other rest frames. Positions in Galactic coordinates, deg; velocities in km/s. */
import { SPEED_OF_LIGHT_KM_PER_S, SUN_CMB, SUN_GSR_KM_PER_S, SUN_LOCAL_GROUP } from './constants.ts'
import { unitVector } from './sphere.ts'
import { requireFinite, type Degrees, type KmPerS } from './units.ts'
import { dot, type Vector } from './vector.ts'

function apex(sun: { speedKmPerS: number; lonDeg: number; latDeg: number }): Vector {
  const u = unitVector(sun.lonDeg, sun.latDeg)
  return [sun.speedKmPerS * u[0], sun.speedKmPerS * u[1], sun.speedKmPerS * u[2]]
}

const LOCAL_GROUP = apex(SUN_LOCAL_GROUP)
const CMB = apex(SUN_CMB)

/** Galactic standard of rest: v + (12.9, 245.6, 7.78) km/s projected (Drimmel & Poggio 2018). */
export function velocityGsr(heliocentric: KmPerS, glon: Degrees, glat: Degrees): KmPerS {
  return heliocentric + along(SUN_GSR_KM_PER_S, glon, glat, heliocentric)
}

/** Local Group rest frame (Karachentsev & Makarov 1996): 316 km/s toward l = 93°, b = −4°. */
export function velocityLocalGroup(heliocentric: KmPerS, glon: Degrees, glat: Degrees): KmPerS {
  return heliocentric + along(LOCAL_GROUP, glon, glat, heliocentric)
}

/**
 * Rest frame of the cosmic microwave background: redshifts compose as (1 + z)(1 + z_sun), not by sum.
 *
 * @see Planck Collaboration I 2020
 */
export function velocityCmb(heliocentric: KmPerS, glon: Degrees, glat: Degrees): KmPerS {
  const c = SPEED_OF_LIGHT_KM_PER_S
  return c * ((1 + heliocentric / c) * (1 + along(CMB, glon, glat, heliocentric) / c) - 1)
}

function along(sun: Vector, glon: Degrees, glat: Degrees, heliocentric: KmPerS): KmPerS {
  requireFinite(heliocentric, 'heliocentric velocity (km/s)')
  return dot(sun, unitVector(glon, glat))
}
