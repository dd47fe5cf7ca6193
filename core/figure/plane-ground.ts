/** What lies under the galaxies of a section: the zone of avoidance, rings of equal distance, the observer, a scale bar. */
import type { Crowd } from './crowd.ts'
import { cutCircle } from './cut.ts'
import { decimalsOf, roundStep, type PlaneMap } from './plane-map.ts'
import type { FigureRecipe } from './recipe.ts'
import { overlapping, type Box, type Mark, type TextMark } from './scene.ts'
import type { FigureStyle } from './style.ts'
import { CAP_HEIGHT, textBox, textWidth } from './text-metrics.ts'
import { numeral, withUnit } from './words.ts'
import { wedgesIn } from './zone.ts'

/** About so many rings within the square when the observer is in its middle. */
const RINGS = 4.5
const MOST_RINGS = 40

/** Directions that the rings' distances may stand in, deg from the horizontal; earlier ones are preferred. */
const RING_DIRECTIONS = [-38, 38, 142, -142, -60, 60, 120, -120, -15, 15, 165, -165, 90, -90]

/** Places of the square, parts of its half side from the middle, that the line of labels may go through when the observer is outside. */
const RING_PLACES = [[0.5, -0.5], [-0.5, 0.5], [-0.5, -0.5], [0.5, 0.5], [0, 0.7], [0, -0.7], [0.7, 0], [-0.7, 0], [0, 0]] as const

function ringDirections(map: PlaneMap, observerInView: boolean): number[] {
  if (observerInView) return RING_DIRECTIONS.map((direction) => (direction * Math.PI) / 180)
  return RING_PLACES.map(([across, up]) => Math.atan2(map.centre[map.up] + up * map.radius, map.centre[map.across] + across * map.radius))
}

/** Directions of the zone with |b| < 10 deg, where the section crosses it. */
export function zoneMarks(map: PlaneMap, style: FigureStyle): Mark[] {
  return wedgesIn(map.across, map.up, map.centre, map.radius).map((wedge) => ({
    kind: 'path',
    subpaths: [{ points: wedge.flatMap(([across, up]) => [map.x(across), map.y(up)]), closed: true }],
    fill: style.colours.zone,
  }))
}

export interface Rings {
  circles: Mark[]
  labels: TextMark[]
}

/** @param taken - what no label may touch */
export function ringMarks(map: PlaneMap, recipe: FigureRecipe, style: FigureStyle, crowd: Crowd, taken: readonly Box[]): Rings {
  const step = roundStep((map.radius * map.unitsPerMpc) / RINGS)
  const digits = decimalsOf(step)
  const first = Math.max(1, Math.ceil((nearest(map) * map.unitsPerMpc) / step))
  const last = Math.min(first + MOST_RINGS, Math.floor((farthest(map) * map.unitsPerMpc) / step))
  const values = Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => (first + i) * step)
  const radiusOf = (value: number): number => (value / map.unitsPerMpc) * map.mmPerMpc
  const stroke = { colour: style.colours.line, width: style.hairline * 1.2 }
  const circles = values.flatMap((value): Mark[] => {
    const subpaths = cutCircle(map.x(0), map.y(0), radiusOf(value), map.box)
    return subpaths.length > 0 ? [{ kind: 'path', subpaths, stroke }] : []
  })
  const alternatives = ringDirections(map, nearest(map) === 0).map((angle, rank) => {
    const labels = values
      .map((value): TextMark => ({
        kind: 'text',
        x: map.x(0) + radiusOf(value) * Math.cos(angle),
        y: map.y(0) - radiusOf(value) * Math.sin(angle) + (CAP_HEIGHT * style.tick) / 2,
        text: withUnit(numeral(value, digits), recipe.units),
        face: 'sans',
        size: style.tick,
        anchor: 'middle',
        colour: style.colours.muted,
        halo: { colour: style.colours.sheet, width: style.halo },
      }))
      .filter((label) => {
        const box = textBox(label)
        return map.holds(roomy(box, style)) && crowd.within(box) === 0 && !taken.some((other) => overlapping(other, box))
      })
    return { labels, cost: rank * 0.12 - labels.length }
  })
  const best = alternatives.reduce((a, b) => (b.cost < a.cost ? b : a))
  return { circles, labels: apart(best.labels) }
}

/** Leaves out a label that would touch the one before. */
function apart(labels: readonly TextMark[]): TextMark[] {
  const kept: TextMark[] = []
  for (const label of labels) if (!kept.some((other) => overlapping(textBox(other), textBox(label)))) kept.push(label)
  return kept
}

function roomy(box: Box, style: FigureStyle): Box {
  const by = style.tick
  return { minX: box.minX - by, minY: box.minY - by, maxX: box.maxX + by, maxY: box.maxY + by }
}

/** Least and greatest distance from the observer to the square, in the section, Mpc. */
function nearest({ centre, across, up, radius }: PlaneMap): number {
  return Math.hypot(Math.max(0, Math.abs(centre[across]) - radius), Math.max(0, Math.abs(centre[up]) - radius))
}

function farthest({ centre, across, up, radius }: PlaneMap): number {
  return Math.hypot(Math.abs(centre[across]) + radius, Math.abs(centre[up]) + radius)
}

/** A bar of a round length in the lower left corner, and the room it takes. */
export function scaleBar(map: PlaneMap, recipe: FigureRecipe, style: FigureStyle): { marks: Mark[]; box: Box } {
  const length = roundStep((map.radius * map.unitsPerMpc) / 4)
  const width = (length / map.unitsPerMpc) * map.mmPerMpc
  const inset = 1.6 * style.tick
  const text = withUnit(numeral(length, decimalsOf(length)), recipe.units)
  // A long label over a short bar moves the bar, not itself out of the square.
  const x = map.box.minX + inset + Math.max(0, (textWidth(text, 'sans', style.tick) - width) / 2 - inset / 2)
  const y = map.box.maxY - inset
  const end = 0.28 * style.tick
  const label: TextMark = {
    kind: 'text',
    x: x + width / 2,
    y: y - 0.62 * style.tick,
    text,
    face: 'sans',
    size: style.tick,
    anchor: 'middle',
    colour: style.colours.ink,
    halo: { colour: style.colours.sheet, width: style.halo },
  }
  const bar = [
    { points: [x, y, x + width, y], closed: false },
    { points: [x, y - end, x, y + end], closed: false },
    { points: [x + width, y - end, x + width, y + end], closed: false },
  ]
  const words = textBox(label)
  return {
    marks: [{ kind: 'path', subpaths: bar, stroke: { colour: style.colours.ink, width: style.outline } }, label],
    box: { minX: Math.min(x, words.minX), minY: words.minY, maxX: Math.max(x + width, words.maxX), maxY: y + end },
  }
}
