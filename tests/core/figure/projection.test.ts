import { execFileSync } from 'node:child_process'
import { readFileSync } from 'node:fs'
import { geoArea } from 'd3-geo'
import { describe, expect, it } from 'vitest'
import { FRAMES, rotation } from '../../../core/astro/frames.ts'
import { directionOf, unitVector } from '../../../core/astro/sphere.ts'
import { transpose, turn } from '../../../core/astro/vector.ts'
import { HALF_WIDTH, skyMap } from '../../../core/figure/projection.ts'
import { projectGalaxies, unitMap, unitVectors } from '../../../core/figure/project-galaxies.ts'
import { PROJECTIONS, type ProjectionName } from '../../../core/figure/recipe.ts'
import type { Subpath } from '../../../core/figure/scene.ts'
import { zoneOfAvoidance } from '../../../core/figure/zone.ts'
import { random } from '../../../core/random.ts'

/** Made with PROJ; see tests/reference/README.md. Columns: lon, lat, then x and y of each projection. */
const rows = readFileSync(new URL('../../reference/projections.csv', import.meta.url), 'utf8')
  .trim()
  .split('\n')
  .slice(1)
  .map((line) => line.split(',').map(Number))

const UNIT_BOX = { minX: -1, minY: -0.5, maxX: 1, maxY: 0.5 }

describe.each(PROJECTIONS)('%s', (name) => {
  const column = 2 + 2 * PROJECTIONS.indexOf(name)

  it('agrees with the table of PROJ', () => {
    expect(rows.length).toBeGreaterThan(30)
    for (const row of rows) {
      const [x, y] = unitMap(name, row[0] ?? NaN, row[1] ?? NaN)
      // The antimeridian is both edges of the map; which one, a direction alone cannot say.
      const side = Math.abs(row[0] ?? 0) === 180 ? Math.abs : (value: number) => value
      expect(Math.abs(side(x) - side(row[column] ?? NaN)), `x at ${row[0]}, ${row[1]}`).toBeLessThan(1e-9)
      expect(Math.abs(y - (row[column + 1] ?? NaN)), `y at ${row[0]}, ${row[1]}`).toBeLessThan(1e-9)
    }
  })

  it('agrees with PROJ itself, asked now, on random directions', () => {
    const rng = random(11)
    const places = Array.from({ length: 300 }, () => [360 * rng.uniform() - 180, (180 / Math.PI) * Math.asin(2 * rng.uniform() - 1)] as const)
    const proj = { hammer: 'hammer', aitoff: 'aitoff', mollweide: 'moll' }[name]
    const answer = execFileSync('proj', ['-f', '%.12f', `+proj=${proj}`, '+R=1'], { input: places.map(([lon, lat]) => `${lon.toFixed(12)} ${lat.toFixed(12)}`).join('\n'), encoding: 'utf8' })
    const found = answer.trim().split('\n').map((line) => line.split('\t').map(Number))
    expect(found).toHaveLength(places.length)
    for (const [i, [lon, lat]] of places.entries()) {
      const [x, y] = unitMap(name, lon, lat)
      expect(Math.abs(x - (found[i]?.[0] ?? NaN)), `x at ${lon}, ${lat}`).toBeLessThan(1e-9)
      expect(Math.abs(y - (found[i]?.[1] ?? NaN)), `y at ${lon}, ${lat}`).toBeLessThan(1e-9)
    }
  })

  it('puts galaxies where d3 draws the sky, in every frame and turn', () => {
    const rng = random(5)
    for (const frame of FRAMES) {
      for (const centreLon of [0, 90, 180, -37.5]) {
        const map = skyMap({ projection: name, frame, centreLon }, { minX: 10, minY: 20, maxX: 190, maxY: 110 })
        const galaxies = Array.from({ length: 40 }, () => ({ ra: 360 * rng.uniform(), dec: (180 / Math.PI) * Math.asin(2 * rng.uniform() - 1) }))
        const places = projectGalaxies({ projection: name, frame, centreLon }, unitVectors(galaxies), map)
        for (const [i, { ra, dec }] of galaxies.entries()) {
          const here = { x: places[2 * i] ?? NaN, y: places[2 * i + 1] ?? NaN }
          // A short line toward the pole begins at the galaxy.
          const [line] = map.sky({ type: 'LineString', coordinates: [[ra, dec], [ra, Math.min(dec + 0.01, 89.999)]] })
          expect(Math.hypot(here.x - (line?.points[0] ?? NaN), here.y - (line?.points[1] ?? NaN)), `${frame} ${centreLon}: ${ra}, ${dec}`).toBeLessThan(2e-4)
        }
      }
    }
  })

  it('shows east to the left and north up', () => {
    const map = { centreX: 0, centreY: 0, halfWidth: 100 }
    for (const frame of FRAMES) {
      const [eastX = NaN, , northX = NaN, northY = NaN] = projectGalaxies({ projection: name, frame, centreLon: 0 }, unitVectors([inFrame(frame, 20, 0), inFrame(frame, 0, 20)]), map)
      expect(eastX).toBeLessThan(-5)
      expect(Math.abs(northX)).toBeLessThan(1e-9)
      expect(northY).toBeLessThan(-5)
    }
    const drawn = skyMap({ projection: name, frame: 'galactic', centreLon: 0 }, UNIT_BOX).framePoint(20, 0)
    expect(drawn[0]).toBeLessThan(-0.05)
  })

  it('keeps all of the sky within the outline', () => {
    const rng = random(23)
    const galaxies = Array.from({ length: 2000 }, () => ({ ra: 360 * rng.uniform(), dec: (180 / Math.PI) * Math.asin(2 * rng.uniform() - 1) }))
    const places = projectGalaxies({ projection: name, frame: 'supergalactic', centreLon: 12 }, unitVectors(galaxies), { centreX: 0, centreY: 0, halfWidth: 1 })
    for (let i = 0; i < places.length; i += 2) expect((places[i] ?? 9) ** 2 + (2 * (places[i + 1] ?? 9)) ** 2).toBeLessThan(1 + 1e-9)
  })
})

/** A direction of a frame, in ICRS. */
function inFrame(frame: (typeof FRAMES)[number], lon: number, lat: number): { ra: number; dec: number } {
  const { lon: ra, lat: dec } = directionOf(turn(transpose(rotation('equatorial', frame)), unitVector(lon, lat)))
  return { ra, dec }
}

function areaOf(subpaths: readonly Subpath[]): number {
  let sum = 0
  for (const { points } of subpaths) {
    for (let i = 0; i < points.length; i += 2) {
      const j = (i + 2) % points.length
      sum += ((points[i] ?? 0) * (points[j + 1] ?? 0) - (points[j] ?? 0) * (points[i + 1] ?? 0)) / 2
    }
  }
  return Math.abs(sum)
}

describe('the zone of avoidance', () => {
  it('covers sin 10° of the sphere', () => {
    expect(geoArea(zoneOfAvoidance()) / (4 * Math.PI)).toBeCloseTo(Math.sin(Math.PI / 18), 4)
  })

  it.each(['hammer', 'mollweide'] satisfies ProjectionName[])('keeps its share of the map whatever the frame and turn: %s', (projection) => {
    const rng = random(7)
    for (let i = 0; i < 24; i += 1) {
      const sky = { projection, frame: rng.pick(FRAMES), centreLon: 720 * rng.uniform() - 360 }
      const map = skyMap(sky, { minX: 0, minY: 0, maxX: 200, maxY: 100 })
      const share = areaOf(map.sky(zoneOfAvoidance())) / (Math.PI * map.halfWidth * map.halfHeight)
      expect(share, JSON.stringify(sky)).toBeGreaterThan(Math.sin(Math.PI / 18) * 0.997)
      expect(share, JSON.stringify(sky)).toBeLessThan(Math.sin(Math.PI / 18) * 1.003)
    }
  })
})

it('half widths are those of the projections', () => {
  for (const name of PROJECTIONS) expect(unitMap(name, 180, 0)[0]).toBeCloseTo(HALF_WIDTH[name], 12)
})
