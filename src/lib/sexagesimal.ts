/** ICRS angles in hours or degrees, minutes and seconds, as parts that a page can set. Rounds once, so that there is never a 60. */
export interface Sexagesimal {
  sign: '+' | '\u2212' | ''
  units: string
  minutes: string
  seconds: string
}

function split(value: number, decimals: number, modulus: number | null, width: number): Omit<Sexagesimal, 'sign'> {
  const perSecond = 10 ** decimals
  let steps = Math.round(value * 3600 * perSecond)
  if (modulus !== null) steps %= modulus * 3600 * perSecond
  const seconds = (steps % (60 * perSecond)) / perSecond
  const minutes = Math.floor(steps / (60 * perSecond)) % 60
  const units = Math.floor(steps / (3600 * perSecond))
  return {
    units: String(units).padStart(width, '0'),
    minutes: String(minutes).padStart(2, '0'),
    seconds: seconds.toFixed(decimals).padStart(decimals > 0 ? 3 + decimals : 2, '0'),
  }
}

/** @param ra - right ascension, degrees, any turn */
export function rightAscensionParts(ra: number, decimals = 1): Sexagesimal {
  const turned = ((ra % 360) + 360) % 360
  return { sign: '', ...split(turned / 15, decimals, 24, 2) }
}

/** @param dec - declination, degrees, −90 to +90 */
export function declinationParts(dec: number, decimals = 0): Sexagesimal {
  return { sign: dec < 0 ? '\u2212' : '+', ...split(Math.abs(dec), decimals, null, 2) }
}
