/**
 * Units as types: a number of degrees is not a number of radians, and mixing them does not compile.
 *
 * The functions of this folder take numbers, never null: what to do about a missing value is decided where values are derived (core/derive),
 * once, by leaving out what depends on it. A number that is not finite, or outside a function's stated range, throws a RangeError that
 * names the argument and its unit.
 */
export type Unit<Name extends string> = number & { readonly __unit?: Name }

export type Degrees = Unit<'deg'>
export type Radians = Unit<'rad'>
export type Arcsec = Unit<'arcsec'>
export type Arcmin = Unit<'arcmin'>
export type Mpc = Unit<'Mpc'>
export type Kpc = Unit<'kpc'>
export type Pc = Unit<'pc'>
export type Mag = Unit<'mag'>
export type KmPerS = Unit<'km/s'>
export type Msun = Unit<'Msun'>
export type JyKmPerS = Unit<'Jy km/s'>

const RAD_PER_DEG = Math.PI / 180

/** Degrees to radians. */
export function radians(angle: Degrees): Radians {
  return angle * RAD_PER_DEG
}

/** Radians to degrees. */
export function degrees(angle: Radians): Degrees {
  return angle / RAD_PER_DEG
}

/** The same direction, in [0, 360) deg. */
export function wrap360(angle: Degrees): Degrees {
  const wrapped = angle % 360
  const positive = wrapped < 0 ? wrapped + 360 : wrapped
  // A tiny negative angle plus 360 rounds to 360 itself.
  return positive >= 360 ? 0 : positive + 0
}

/** @throws RangeError when the number is not finite or not within [least, most] */
export function requireWithin(value: number, least: number, most: number, what: string): void {
  if (!(value >= least && value <= most)) throw new RangeError(`${what} must lie from ${least} to ${most}, not ${value}`)
}

/** @throws RangeError when the number is not finite and above 0 */
export function requirePositive(value: number, what: string): void {
  if (!(value > 0 && value < Infinity)) throw new RangeError(`${what} must be above 0, not ${value}`)
}

/** @throws RangeError when the number is not finite */
export function requireFinite(value: number, what: string): void {
  if (!Number.isFinite(value)) throw new RangeError(`${what} must be a finite number, not ${value}`)
}
