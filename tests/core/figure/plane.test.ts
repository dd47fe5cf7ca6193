import { describe, expect, it } from 'vitest'
import { MLY_PER_MPC } from '../../../core/astro/constants.ts'
import { convert } from '../../../core/astro/frames.ts'
import { directionOf } from '../../../core/astro/sphere.ts'
import { cutCircle, cutPolygon } from '../../../core/figure/cut.ts'
import type { FigureGalaxy } from '../../../core/figure/galaxy.ts'
import { decimalsOf, roundStep } from '../../../core/figure/plane-map.ts'
import { figureRecipeSchema } from '../../../core/figure/recipe.ts'
import { sceneOf } from '../../../core/figure/scene-of.ts'
import { textsOf, type GroupMark, type Scene } from '../../../core/figure/scene.ts'
import { AXES_OF } from '../../../core/figure/words.ts'
import { zoneWedges } from '../../../core/figure/zone.ts'
import { inventedGalaxies } from './invented.ts'

const group = (scene: Scene, name: string): GroupMark | undefined => scene.marks.find((mark): mark is GroupMark => mark.kind === 'group' && mark.name === name)

function at(sgx: number, sgy: number, sgz: number): FigureGalaxy {
  const [galaxy] = inventedGalaxies(1)
  if (!galaxy) throw new Error('no galaxy')
  return { ...galaxy, sgx, sgy, sgz }
}

describe('a section', () => {
  it('has one scale on both axes, first axis to the right, second upward', () => {
    for (const axes of ['sgx-sgy', 'sgx-sgz', 'sgy-sgz'] as const) {
      const place = { sgx: 1, sgy: 2, sgz: -3 }
      const scene = sceneOf([at(place.sgx, place.sgy, place.sgz)], figureRecipeSchema.parse({ view: 'plane', plane: { axes, radius: 5 } }))
      const { minX, minY, maxX, maxY } = scene.map
      expect(maxX - minX).toBeCloseTo(maxY - minY, 9)
      const [across, up] = AXES_OF[axes]
      const mm = (maxX - minX) / 10
      expect(scene.hits[0]?.x).toBeCloseTo((minX + maxX) / 2 + place[across] * mm, 9)
      expect(scene.hits[0]?.y).toBeCloseTo((minY + maxY) / 2 - place[up] * mm, 9)
    }
  })

  it('leaves out what is outside of the cube and what has no distance, and says so', () => {
    const galaxies = [at(1, 1, 1), at(1, 1, 9), at(20, 0, 0), { ...at(1, 1, 1), sgx: null, sgy: null, sgz: null }]
    const scene = sceneOf(galaxies, figureRecipeSchema.parse({ view: 'plane', plane: { radius: 5 } }))
    expect(scene.hits).toHaveLength(1)
    expect([...textsOf(scene.marks)].some((text) => text.text.startsWith('1 of 4 galaxies'))).toBe(true)
  })

  it('numbers its axes where they say, in either unit', () => {
    for (const units of ['Mpc', 'Mly'] as const) {
      const scene = sceneOf([], figureRecipeSchema.parse({ view: 'plane', units, plane: { radius: 11 } }))
      const axes = group(scene, 'axes')
      const numbers = [...textsOf(axes?.marks ?? [])].filter((text) => text.anchor === 'middle' && /^[\u2212\d]/.test(text.text))
      expect(numbers.length).toBeGreaterThanOrEqual(5)
      const mm = (scene.map.maxX - scene.map.minX) / 22 / (units === 'Mly' ? MLY_PER_MPC : 1)
      for (const number of numbers) expect(number.x).toBeCloseTo((scene.map.minX + scene.map.maxX) / 2 + Number(number.text.replace('\u2212', '-')) * mm, 6)
    }
  })

  it('its scale bar is as long as it says', () => {
    const scene = sceneOf([], figureRecipeSchema.parse({ view: 'plane', plane: { radius: 11 } }))
    const marks = group(scene, 'scale bar')?.marks ?? []
    const path = marks.find((mark) => mark.kind === 'path')
    const [x1 = NaN, , x2 = NaN] = path?.kind === 'path' ? (path.subpaths[0]?.points ?? []) : []
    const [label] = [...textsOf(marks)]
    expect(label?.text).toBe('2\u00a0Mpc')
    expect((x2 - x1) / (scene.map.maxX - scene.map.minX)).toBeCloseTo(2 / 22, 9)
  })
})

describe('the zone of avoidance in a section', () => {
  it.each(['sgx-sgy', 'sgy-sgz'] as const)('its edges are at |b| = 10°: %s', (axes) => {
    const [across, up] = AXES_OF[axes]
    const wedges = zoneWedges(across, up)
    expect(wedges).toHaveLength(2)
    for (const [from, to] of wedges) {
      for (const [angle, outside] of [[from, from - 0.01], [to, to + 0.01]] as const) {
        const latitude = (t: number): number => {
          const axis = { sgx: 0, sgy: 0, sgz: 0, [across]: Math.cos(t), [up]: Math.sin(t) }
          const { lon, lat } = directionOf([axis.sgx, axis.sgy, axis.sgz])
          return Math.abs(convert(lon, lat, 'supergalactic', 'galactic').lat)
        }
        expect(latitude(angle)).toBeCloseTo(10, 9)
        expect(latitude((from + to) / 2)).toBeLessThan(1e-9)
        expect(latitude(outside)).toBeGreaterThan(10)
      }
    }
  })

  it('is not drawn where the whole section lies in it', () => {
    expect(zoneWedges('sgx', 'sgz')).toEqual([])
    const scene = sceneOf([], figureRecipeSchema.parse({ view: 'plane', plane: { axes: 'sgx-sgz' } }))
    expect([...textsOf(scene.marks)].some((text) => text.text.includes('avoidance'))).toBe(false)
  })
})

describe('shapes cut to a rectangle', () => {
  const box = { minX: 0, minY: 0, maxX: 10, maxY: 10 }

  it('of a circle, the arcs inside', () => {
    expect(cutCircle(5, 5, 3, box)).toHaveLength(1)
    expect(cutCircle(5, 5, 3, box)[0]?.closed).toBe(true)
    expect(cutCircle(5, 5, 6, box)).toHaveLength(4)
    expect(cutCircle(5, 5, 8, box)).toEqual([])
    expect(cutCircle(-50, 5, 3, box)).toEqual([])
    const [quarter, ...others] = cutCircle(0, 0, 5, box)
    expect(others).toEqual([])
    const points = quarter?.points ?? []
    for (let i = 0; i < points.length; i += 2) {
      expect(Math.hypot(points[i] ?? NaN, points[i + 1] ?? NaN)).toBeCloseTo(5, 9)
      expect(Math.min(points[i] ?? NaN, points[i + 1] ?? NaN)).toBeGreaterThan(-1e-9)
    }
  })

  it('of a polygon, the part inside', () => {
    expect(cutPolygon([[-5, -5], [5, -5], [5, 5], [-5, 5]], box)?.map(String).sort()).toEqual(['0,0', '0,5', '5,0', '5,5'])
    expect(cutPolygon([[-5, -5], [-1, -5], [-1, -1]], box)).toBeNull()
  })
})

it('steps are round', () => {
  expect([0.013, 0.16, 2.4, 4.9, 7.7, 36].map(roundStep).map((step) => Number(step.toPrecision(6)))).toEqual([0.01, 0.2, 2, 5, 10, 50])
  expect([0.01, 0.2, 1, 50].map(decimalsOf)).toEqual([2, 1, 0, 0])
})
