/** Positions as people read them, and the designations made from them. */
import { requireFinite, requireWithin, wrap360, type Degrees } from './units.ts'

const MINUS = '\u2212'

/**
 * An angle as whole ticks of its last printed place: rounding happens once, so that 59.9995 s never prints as 60.
 */
function parts(ticks: number, decimals: number): { first: number; second: number; third: string } {
  const perSecond = 10 ** decimals
  const seconds = ticks % (60 * perSecond)
  const minutes = Math.floor(ticks / (60 * perSecond))
  const whole = Math.floor(seconds / perSecond)
  const fraction = seconds % perSecond
  return {
    first: Math.floor(minutes / 60),
    second: minutes % 60,
    third: decimals === 0 ? two(whole) : `${two(whole)}.${String(fraction).padStart(decimals, '0')}`,
  }
}

const two = (n: number): string => String(n).padStart(2, '0')

/** Right ascension in hours, such as `00ʰ 42ᵐ 44.3ˢ`. @param decimals - of the seconds, 0 to 6 */
export function formatRightAscension(ra: Degrees, decimals = 1): string {
  requireFinite(ra, 'right ascension (deg)')
  const day = 24 * 3600 * 10 ** decimals
  const { first, second, third } = parts(Math.round((wrap360(ra) / 360) * day) % day, decimals)
  return `${two(first)}ʰ ${two(second)}ᵐ ${third}ˢ`
}

/** Declination in degrees, such as `+41° 16′ 09″`. @param decimals - of the seconds, 0 to 6 */
export function formatDeclination(dec: Degrees, decimals = 0): string {
  requireWithin(dec, -90, 90, 'declination (deg)')
  const ticks = Math.round(Math.abs(dec) * 3600 * 10 ** decimals)
  const { first, second, third } = parts(ticks, decimals)
  return `${dec < 0 && ticks > 0 ? MINUS : '+'}${two(first)}° ${two(second)}′ ${third}″`
}

/** Both, with one more decimal of seconds in right ascension, which is 15 times coarser. */
export function formatPosition(ra: Degrees, dec: Degrees, decimals = 0): string {
  return `${formatRightAscension(ra, decimals + 1)}  ${formatDeclination(dec, decimals)}`
}
