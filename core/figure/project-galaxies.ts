/**
 * Places of many galaxies on a map at once, in typed arrays, from unit vectors: 100,000 in about a millisecond, so that a map can follow the
 * pointer. Formulas: Snyder 1987, "Map Projections: A Working Manual" (USGS Professional Paper 1395) for Hammer and Mollweide; Snyder 1993,
 * "Flattening the Earth", for Aitoff.
 */
import { unitVector } from '../astro/sphere.ts'
import { HALF_WIDTH } from './projection.ts'
import type { ProjectionName, SkyRecipe } from './recipe.ts'
import { turnedFrame } from './turned-frame.ts'

const known = new WeakMap<object, Float64Array>()

/** Unit vectors, ICRS, three numbers a galaxy; kept for a list that is asked for again, as it is for every frame of a drag. @param ra, dec - deg */
export function unitVectors(galaxies: readonly { readonly ra: number; readonly dec: number }[]): Float64Array {
  const kept = known.get(galaxies)
  if (kept?.length === galaxies.length * 3) return kept
  const vectors = new Float64Array(galaxies.length * 3)
  for (const [i, { ra, dec }] of galaxies.entries()) vectors.set(unitVector(ra, dec), i * 3)
  known.set(galaxies, vectors)
  return vectors
}

/** One direction, seen from the middle of the map, to the unit map: x grows to the east, y to the north. */
type Forward = (x: number, y: number, z: number, out: Float64Array, at: number) => void

/** cos φ cos(λ/2) and cos φ sin(λ/2) without trigonometry: of (r + x) and (r − x) the one that does not cancel, then the other by their product. */
function halved(x: number, y: number): [number, number] {
  const r = Math.hypot(x, y)
  if (r === 0) return [0, 0]
  if (x >= 0) {
    const c = Math.sqrt((r * (r + x)) / 2)
    return [c, (r * y) / (2 * c)]
  }
  const s = Math.sqrt((r * (r - x)) / 2) * (y < 0 ? -1 : 1)
  return [(r * y) / (2 * s), s]
}

const hammer: Forward = (x, y, z, out, at) => {
  const [c, s] = halved(x, y)
  const scale = Math.sqrt(2 / (1 + c))
  out[at] = 2 * scale * s
  out[at + 1] = scale * z
}

const aitoff: Forward = (x, y, z, out, at) => {
  const [c, s] = halved(x, y)
  const sinAlpha = Math.hypot(s, z)
  const scale = sinAlpha === 0 ? 1 : Math.atan2(sinAlpha, c) / sinAlpha
  out[at] = 2 * scale * s
  out[at + 1] = scale * z
}

const MOLLWEIDE_STEPS = 60
const MOLLWEIDE_CLOSE = 1e-15

const mollweide: Forward = (x, y, z, out, at) => {
  // 2θ + sin 2θ = π sin φ, by Newton's method from φ; it slows toward the poles, where the sine hides the rest.
  const target = Math.PI * z
  let twice = 2 * Math.asin(Math.max(-1, Math.min(1, z)))
  for (let i = 0; i < MOLLWEIDE_STEPS; i += 1) {
    const slope = 1 + Math.cos(twice)
    if (slope === 0) break
    const step = (twice + Math.sin(twice) - target) / slope
    twice -= step
    if (Math.abs(step) < MOLLWEIDE_CLOSE) break
  }
  out[at] = ((2 * Math.SQRT2) / Math.PI) * Math.atan2(y, x) * Math.cos(twice / 2)
  out[at + 1] = Math.SQRT2 * Math.sin(twice / 2)
}

const FORWARD: Readonly<Record<ProjectionName, Forward>> = { hammer, aitoff, mollweide }

/** One direction on the unit map (x to the east, y to the north), as PROJ gives it for a sphere of radius 1. @param lon, lat - deg */
export function unitMap(projection: ProjectionName, lon: number, lat: number): [number, number] {
  const out = new Float64Array(2)
  const [x, y, z] = unitVector(lon, lat)
  FORWARD[projection](x, y, z, out, 0)
  return [out[0] ?? NaN, out[1] ?? NaN]
}

/**
 * Places on the map, x and y alternating, mm (or any unit that the outline is given in); y downward, east to the left.
 *
 * @param vectors - unit vectors, ICRS, as `unitVectors` makes them
 * @param map - middle and half width of the map's outline
 * @param out - filled and returned when given; two numbers a galaxy
 */
export function projectGalaxies(
  sky: Pick<SkyRecipe, 'projection' | 'frame' | 'centreLon'>,
  vectors: Float64Array,
  map: { centreX: number; centreY: number; halfWidth: number },
  out = new Float64Array((vectors.length / 3) * 2),
): Float64Array {
  const [a, b, c] = turnedFrame(sky.frame, sky.centreLon)
  const forward = FORWARD[sky.projection]
  const scale = map.halfWidth / HALF_WIDTH[sky.projection]
  for (let i = 0, at = 0; i < vectors.length; i += 3, at += 2) {
    const x = vectors[i] ?? 0
    const y = vectors[i + 1] ?? 0
    const z = vectors[i + 2] ?? 0
    forward(a[0] * x + a[1] * y + a[2] * z, b[0] * x + b[1] * y + b[2] * z, c[0] * x + c[1] * y + c[2] * z, out, at)
    out[at] = map.centreX - scale * (out[at] ?? 0)
    out[at + 1] = map.centreY - scale * (out[at + 1] ?? 0)
  }
  return out
}
