/** The zone of avoidance: the band about the Galactic plane where dust hides galaxies. */
import { convert, rotation, type Frame } from '../astro/frames.ts'
import { radians } from '../astro/units.ts'
import { dot, type Vector } from '../astro/vector.ts'
import { cutPolygon, type Point } from './cut.ts'
import type { PlaneAxis } from './words.ts'

/** Half its width in galactic latitude, deg: common practice for optical catalogues. */
export const ZONE_HALF_WIDTH_DEG = 10

const STEP_DEG = 2

type Ring = [number, number][]

/** A circle of latitude of a frame, in ICRS. @param direction - 1 walks eastward, −1 westward */
function parallel(frame: Frame, lat: number, direction: 1 | -1): Ring {
  return Array.from({ length: 360 / STEP_DEG + 1 }, (_, i) => {
    const { lon, lat: declination } = convert((direction * i * STEP_DEG + 360) % 360, lat, frame, 'equatorial')
    return [lon, declination]
  })
}

/** |b| < 10 deg as one polygon of two rings, in ICRS. Which way the rings run decides which side of them is shaded. */
export function zoneOfAvoidance(): { type: 'Polygon'; coordinates: Ring[] } {
  return { type: 'Polygon', coordinates: [parallel('galactic', ZONE_HALF_WIDTH_DEG, 1), parallel('galactic', -ZONE_HALF_WIDTH_DEG, -1)] }
}

/** SGB = 0, in ICRS. */
export function supergalacticEquator(): { type: 'LineString'; coordinates: Ring } {
  return { type: 'LineString', coordinates: parallel('supergalactic', 0, 1) }
}

const AXIS_VECTORS: Readonly<Record<PlaneAxis, Vector>> = { sgx: [1, 0, 0], sgy: [0, 1, 0], sgz: [0, 0, 1] }

/**
 * Where a supergalactic section through the observer crosses the zone: two opposite wedges, each as the angles of its edges from the first
 * axis toward the second, rad. Empty when the whole section lies within the zone.
 */
export function zoneWedges(first: PlaneAxis, second: PlaneAxis): (readonly [from: number, to: number])[] {
  const pole = rotation('galactic', 'supergalactic').map((row) => row[2]) as unknown as Vector
  const across = dot(pole, AXIS_VECTORS[first])
  const up = dot(pole, AXIS_VECTORS[second])
  // sin b of the direction at angle t is amplitude × cos(t − toward).
  const amplitude = Math.hypot(across, up)
  const edge = Math.sin(radians(ZONE_HALF_WIDTH_DEG))
  if (amplitude <= edge) return []
  const toward = Math.atan2(up, across)
  const half = Math.asin(edge / amplitude)
  return [toward + Math.PI / 2, toward - Math.PI / 2].map((middle) => [middle - half, middle + half] as const)
}

/** The wedges as polygons within a square of a section, Mpc, first axis then second. */
export function wedgesIn(first: PlaneAxis, second: PlaneAxis, centre: Readonly<Record<PlaneAxis, number>>, radius: number): (readonly Point[])[] {
  const square = { minX: centre[first] - radius, maxX: centre[first] + radius, minY: centre[second] - radius, maxY: centre[second] + radius }
  const far = 1.5 * Math.hypot(Math.abs(centre[first]) + radius, Math.abs(centre[second]) + radius)
  const corner = (angle: number, reach: number): Point => [reach * Math.cos(angle), reach * Math.sin(angle)]
  return zoneWedges(first, second).flatMap(([from, to]) => {
    // The middle corner keeps the wedge beyond the square even where its chord would cut in.
    const wedge = cutPolygon([[0, 0], corner(from, far), corner((from + to) / 2, 1.1 * far), corner(to, far)], square)
    return wedge ? [wedge] : []
  })
}
