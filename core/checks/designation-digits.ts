/**
 * Names that are made from a position carry its digits truncated, never rounded, as the IAU's recommendations for nomenclature ask: the digits
 * then name the field that holds the object.
 */
import { wrap360 } from '../astro/units.ts'
import type { Check } from './check.ts'

/** `J114207.3+231541`, `J1142+2315`, `J1142.1+2315`: right ascension in hours, declination in degrees. */
const DIGITS = /J(\d{2})(\d{2})(\d{2})?(\.\d+)?([+\-\u2212])(\d{2})(\d{2})?(\d{2})?(\.\d+)?(?!\d)/

interface Part {
  /** What the digits say, in ticks of the last one. */
  given: number
  /** What they would be truncated, and rounded. */
  truncated: number
  rounded: number
}

/** So far below a whole tick a number counts as the tick: 40.559999999 s was typed as 40.56. */
const TICK_TOLERANCE = 1e-6

/** @param ra, dec - deg, ICRS. @returns null for a name that is not made from a position */
export function designationDigits(name: string, ra: number, dec: number): Check | null {
  const found = DIGITS.exec(name)
  if (!found) return null
  const parts = [rightAscension(found, ra), declination(found, dec)]
  const sameSide = (found[5] === '+') === dec >= 0
  if (sameSide && parts.every((p) => p.given === p.truncated)) return { check: 'designation-digits', level: 'ok', sentence: `The digits of “${name}” are those of its position, truncated.` }
  if (sameSide && parts.every((p) => p.given === p.truncated || p.given === p.rounded)) {
    return { check: 'designation-digits', level: 'warn', sentence: `The digits of “${name}” are rounded. Designations truncate positions (IAU recommendations): unless it was published like that, it should be another.` }
  }
  return { check: 'designation-digits', level: 'warn', sentence: `The digits of “${name}” are not those of its position. Check the name, and the position against the source.` }
}

function rightAscension([, hours = '', minutes = '', seconds, fraction = '']: RegExpExecArray, ra: number): Part {
  const unit = seconds === undefined ? 60 : 1
  const given = Number(hours) * 3600 + Number(minutes) * 60 + Number(seconds ?? 0) + Number(fraction === '' ? 0 : fraction) * unit
  return inTicks(given, (wrap360(ra) / 15) * 3600, unit / 10 ** decimalsOf(fraction))
}

function declination(found: RegExpExecArray, dec: number): Part {
  const [, , , , , , degrees = '', minutes, seconds, fraction = ''] = found
  const unit = minutes === undefined ? 3600 : seconds === undefined ? 60 : 1
  const given = Number(degrees) * 3600 + Number(minutes ?? 0) * 60 + Number(seconds ?? 0) + Number(fraction === '' ? 0 : fraction) * unit
  return inTicks(given, Math.abs(dec) * 3600, unit / 10 ** decimalsOf(fraction))
}

function inTicks(given: number, true_: number, tick: number): Part {
  return { given: Math.round(given / tick), truncated: Math.floor(true_ / tick + TICK_TOLERANCE), rounded: Math.round(true_ / tick) }
}

const decimalsOf = (fraction: string): number => Math.max(0, fraction.length - 1)
