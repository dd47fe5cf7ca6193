/** Directions on the sphere. */
import { degrees, radians, requireFinite, requireWithin, wrap360, type Degrees, type Radians } from './units.ts'
import { cross, dot, length, type Vector } from './vector.ts'

/** A direction in some frame: longitude in deg, latitude in [−90, 90] deg. */
export interface Direction {
  lon: Degrees
  lat: Degrees
}

/**
 * The unit vector of a direction.
 *
 * @throws RangeError when the longitude is not finite or the latitude not within ±90 deg
 */
export function unitVector(lon: Degrees, lat: Degrees): Vector {
  requireFinite(lon, 'longitude (deg)')
  requireWithin(lat, -90, 90, 'latitude (deg)')
  const l = radians(lon)
  const b = radians(lat)
  return [Math.cos(b) * Math.cos(l), Math.cos(b) * Math.sin(l), Math.sin(b)]
}

/** The direction of a vector that is not null: longitude in [0, 360); at a pole, 0. */
export function directionOf(v: Vector): Direction {
  return { lon: wrap360(degrees(Math.atan2(v[1], v[0]))), lat: degrees(Math.atan2(v[2], Math.hypot(v[0], v[1]))) }
}

/**
 * Angle between two vectors, in [0, π] rad. Stable at every separation, unlike the arc cosine of a product.
 *
 * @see Vincenty 1975, Survey Review 23, 88
 */
export function angleBetween(a: Vector, b: Vector): Radians {
  return Math.atan2(length(cross(a, b)), dot(a, b))
}

/**
 * Great-circle separation of two directions of one frame, deg.
 *
 * @example separation({ lon: 0, lat: 0 }, { lon: 0, lat: 90 }) // => 90
 */
export function separation(a: Direction, b: Direction): Degrees {
  return degrees(angleBetween(unitVector(a.lon, a.lat), unitVector(b.lon, b.lat)))
}

/** Distance between two points given by direction (unit vectors) and distance; same unit as the distances. */
export function distanceBetween(directionA: Vector, distanceA: number, directionB: Vector, distanceB: number): number {
  // The half-angle form keeps its digits when the points are close to one another.
  const half = Math.sin(angleBetween(directionA, directionB) / 2)
  return Math.hypot(distanceA - distanceB, 2 * Math.sqrt(distanceA * distanceB) * half)
}
