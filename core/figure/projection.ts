/**
 * Maps of the whole sky, as seen from inside: north up, east to the left. Lines and areas go through d3, which cuts them at the edge of the
 * map; places of galaxies go through project-galaxies.ts, which is faster. A test holds the two together.
 */
import { geoPath, type GeoPermissibleObjects, type GeoProjection } from 'd3-geo'
import { geoAitoff, geoHammer, geoMollweide } from 'd3-geo-projection'
import { degrees } from '../astro/units.ts'
import { turnedFrame } from './turned-frame.ts'
import type { ProjectionName, SkyRecipe } from './recipe.ts'
import type { Box, Subpath } from './scene.ts'

/** Half width of the unit map; all three are ellipses twice as wide as high. */
export const HALF_WIDTH: Readonly<Record<ProjectionName, number>> = { hammer: 2 * Math.SQRT2, aitoff: Math.PI, mollweide: 2 * Math.SQRT2 }

const D3_PROJECTIONS: Readonly<Record<ProjectionName, () => GeoProjection>> = { hammer: geoHammer, aitoff: geoAitoff, mollweide: geoMollweide }

/** How far a curve may stray from its straight pieces, mm. */
const PRECISION_MM = 0.02

export interface SkyMap {
  centreX: number
  centreY: number
  /** Half axes of the map's outline, mm. */
  halfWidth: number
  halfHeight: number
  /** Draws what is given in ICRS longitude and latitude, deg. */
  sky: (shape: GeoPermissibleObjects) => Subpath[]
  /** Draws what is given in the map's own frame. */
  frame: (shape: GeoPermissibleObjects) => Subpath[]
  /** A place of the map's own frame, deg; mm. */
  framePoint: (lon: number, lat: number) => readonly [number, number]
  /** Whether a rectangle lies wholly inside of the outline. */
  holds: (box: Box) => boolean
  /** Whether a corner of a rectangle lies inside of the outline. */
  touches: (box: Box) => boolean
}

/** @param box - where the map stands, mm; twice as wide as high, or it is fitted in the middle */
export function skyMap(sky: Pick<SkyRecipe, 'projection' | 'frame' | 'centreLon'>, box: Box): SkyMap {
  const halfWidth = Math.min((box.maxX - box.minX) / 2, box.maxY - box.minY)
  const halfHeight = halfWidth / 2
  const centreX = (box.minX + box.maxX) / 2
  const centreY = (box.minY + box.maxY) / 2
  const projection = (angles: [number, number, number]): GeoProjection =>
    D3_PROJECTIONS[sky.projection]().reflectX(true).rotate(angles).scale(halfWidth / HALF_WIDTH[sky.projection]).translate([centreX, centreY]).precision(PRECISION_MM)
  const ofSky = projection(rotateAngles(sky))
  const ofFrame = projection([-sky.centreLon, 0, 0])
  const inside = (x: number, y: number): boolean => ((x - centreX) / halfWidth) ** 2 + ((y - centreY) / halfHeight) ** 2 <= 1
  return {
    centreX,
    centreY,
    halfWidth,
    halfHeight,
    sky: (shape) => traced(ofSky, shape),
    frame: (shape) => traced(ofFrame, shape),
    framePoint: (lon, lat) => ofFrame([lon, lat]) ?? [NaN, NaN],
    touches: (b) => inside(b.minX, b.minY) || inside(b.maxX, b.minY) || inside(b.minX, b.maxY) || inside(b.maxX, b.maxY),
    holds: (b) => inside(b.minX, b.minY) && inside(b.maxX, b.minY) && inside(b.minX, b.maxY) && inside(b.maxX, b.maxY),
  }
}

/** The angles, deg, by which d3's `rotate` shows ICRS longitude and latitude in another frame, turned so that a longitude of it is in the middle. */
function rotateAngles({ frame, centreLon }: Pick<SkyRecipe, 'frame' | 'centreLon'>): [number, number, number] {
  const [a, b, c] = turnedFrame(frame, centreLon)
  return [degrees(Math.atan2(-a[1], a[0])), degrees(Math.asin(Math.max(-1, Math.min(1, -a[2])))), degrees(Math.atan2(-b[2], c[2]))]
}

/** The straight pieces that d3 draws a shape with. */
function traced(projection: GeoProjection, shape: GeoPermissibleObjects): Subpath[] {
  const subpaths: { points: number[]; closed: boolean }[] = []
  geoPath(projection, {
    beginPath: () => undefined,
    moveTo: (x, y) => subpaths.push({ points: [x, y], closed: false }),
    lineTo: (x, y) => subpaths.at(-1)?.points.push(x, y),
    arc: () => undefined,
    closePath: () => {
      const last = subpaths.at(-1)
      if (last) last.closed = true
    },
  })(shape)
  return subpaths
}
