import { requireFinite, requireWithin, wrap360, type Degrees } from './units.ts'

/** So far below a whole tick a number counts as the tick: 40.559999999 s was typed as 40.56. */
const TICK_TOLERANCE = 1e-6

/**
 * A designation from a position, such as `Demo J114207.3+231541`: coordinates are truncated, never rounded, as the IAU's recommendations for
 * nomenclature ask, so that the digits name the field that holds the object.
 *
 * @param acronym - what the names of this survey begin with
 * @param ra, dec - ICRS, deg
 * @param decimals - of the seconds of right ascension; the declination gets one less
 */
export function designationOf(acronym: string, ra: Degrees, dec: Degrees, decimals = 1): string {
  requireFinite(ra, 'right ascension (deg)')
  requireWithin(dec, -90, 90, 'declination (deg)')
  const decDecimals = Math.max(0, decimals - 1)
  const raTicks = Math.floor((wrap360(ra) / 15) * 3600 * 10 ** decimals + TICK_TOLERANCE)
  const decTicks = Math.floor(Math.abs(dec) * 3600 * 10 ** decDecimals + TICK_TOLERANCE)
  return `${acronym} J${digits(raTicks, decimals)}${dec < 0 ? '-' : '+'}${digits(decTicks, decDecimals)}`
}

function digits(ticks: number, decimals: number): string {
  const perSecond = 10 ** decimals
  const seconds = Math.floor(ticks / perSecond)
  const two = (n: number): string => String(n).padStart(2, '0')
  const whole = `${two(Math.floor(seconds / 3600))}${two(Math.floor(seconds / 60) % 60)}${two(seconds % 60)}`
  return decimals === 0 ? whole : `${whole}.${String(ticks % perSecond).padStart(decimals, '0')}`
}
