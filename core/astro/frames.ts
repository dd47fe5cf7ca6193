/**
 * The three frames: equatorial (ICRS), Galactic, supergalactic.
 *
 * ICRS to Galactic goes through FK5 J2000 with the frame bias, as astropy does; the Hipparcos convention (ESA SP-1200, vol. 1, sect. 1.5.3)
 * differs by 24.9 mas. Galactic to supergalactic follows de Vaucouleurs et al. 1991 (RC3).
 */
import { SUPERGALACTIC_POLE_GALACTIC_DEG } from './constants.ts'
import { directionOf, unitVector, type Direction } from './sphere.ts'
import { radians, degrees, requirePositive, type Degrees, type Mpc } from './units.ts'
import { multiply, transpose, turn, type Matrix, type Vector } from './vector.ts'

export const FRAMES = ['equatorial', 'galactic', 'supergalactic'] as const
export type Frame = (typeof FRAMES)[number]

/** astropy 5.2.1, ICRS → FK5 J2000 → Galactic, checked with 40-digit arithmetic. */
export const ICRS_TO_GALACTIC: Matrix = [
  [-0.054875657712591728, -0.87343705195561625, -0.48383507361671559],
  [0.49410943719272730, -0.44482972122329535, 0.74698218398666753],
  [-0.86766613755965880, -0.19807633727300053, 0.45598381368730161],
]

/** Pole at l = 47.37°, b = +6.32°; SGL = 0 at l = 137.37°, b = 0. */
export const GALACTIC_TO_SUPERGALACTIC: Matrix = supergalacticRotation()

function supergalacticRotation(): Matrix {
  const { lon, lat } = SUPERGALACTIC_POLE_GALACTIC_DEG
  const l = radians(lon)
  const b = radians(lat)
  return [
    [-Math.sin(l), Math.cos(l), 0],
    [-Math.sin(b) * Math.cos(l), -Math.sin(b) * Math.sin(l), Math.cos(b)],
    [Math.cos(b) * Math.cos(l), Math.cos(b) * Math.sin(l), Math.sin(b)],
  ]
}

const IDENTITY: Matrix = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
]

const FROM_ICRS: Readonly<Record<Frame, Matrix>> = {
  equatorial: IDENTITY,
  galactic: ICRS_TO_GALACTIC,
  supergalactic: multiply(GALACTIC_TO_SUPERGALACTIC, ICRS_TO_GALACTIC),
}

/** The rotation that takes a vector's components from one frame to another. */
export function rotation(from: Frame, to: Frame): Matrix {
  return multiply(FROM_ICRS[to], transpose(FROM_ICRS[from]))
}

/**
 * A direction of one frame in another; longitude in [0, 360) deg.
 *
 * @throws RangeError when the longitude is not finite or the latitude not within ±90 deg
 * @example convert(10.684792, 41.269056, 'equatorial', 'galactic') // => { lon: 121.174..., lat: -21.573... }
 */
export function convert(lon: Degrees, lat: Degrees, from: Frame, to: Frame): Direction {
  return directionOf(turn(rotation(from, to), unitVector(lon, lat)))
}

/**
 * Supergalactic Cartesian coordinates, Mpc, observer at the origin.
 *
 * @param ra, dec - ICRS, deg
 * @param distance - Mpc, above 0
 */
export function supergalacticPosition(ra: Degrees, dec: Degrees, distance: Mpc): Vector {
  requirePositive(distance, 'distance (Mpc)')
  const u = turn(FROM_ICRS.supergalactic, unitVector(ra, dec))
  return [distance * u[0], distance * u[1], distance * u[2]]
}

/**
 * The angles, deg, by which `d3.geoProjection.rotate` shows equatorial data (lon = right ascension) in another frame.
 *
 * @param centre - longitude of the frame that is to stand in the middle, deg
 */
export function d3Rotation(frame: Frame, centre: Degrees = 0): [number, number, number] {
  const c = radians(centre)
  const turned = multiply([[Math.cos(c), Math.sin(c), 0], [-Math.sin(c), Math.cos(c), 0], [0, 0, 1]], FROM_ICRS[frame])
  return [
    degrees(Math.atan2(-turned[0][1], turned[0][0])),
    degrees(Math.asin(Math.max(-1, Math.min(1, -turned[0][2])))),
    degrees(Math.atan2(turned[1][2], turned[2][2])),
  ]
}
