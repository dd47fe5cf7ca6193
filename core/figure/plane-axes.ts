/** Ticks, numbers and names of a section's axes, in the recipe's unit. */
import { decimalsOf, roundStep, type PlaneMap } from './plane-map.ts'
import type { FigureRecipe } from './recipe.ts'
import type { GroupMark, Mark } from './scene.ts'
import type { FigureStyle } from './style.ts'
import { CAP_HEIGHT, textWidth } from './text-metrics.ts'
import { numeral } from './words.ts'

/** About so many numbers an axis, fewer where they would touch. */
const NUMBERS = 9
const LEAST_BETWEEN_EMS = 4.2

/** How far the last number may reach beyond the square, mm: less than the narrowest margin. */
const OVERHANG_MM = 0.9

/** Small ticks between two numbered ones. */
const BETWEEN = 5

export function planeAxes(map: PlaneMap, recipe: FigureRecipe, style: FigureStyle): GroupMark {
  const { box } = map
  const side = box.maxX - box.minX
  const span = 2 * map.radius * map.unitsPerMpc
  const step = roundStep(Math.max(span / NUMBERS, (span * LEAST_BETWEEN_EMS * style.tick) / side))
  const digits = decimalsOf(step)
  const stroke = { colour: style.colours.ink, width: style.outline * 0.7 }
  const numbers = { face: 'sans' as const, size: style.tick, colour: style.colours.muted }
  const marks: Mark[] = []
  const ticks: { points: number[]; closed: false }[] = []
  const long = 0.45 * style.tick
  for (const [i, at] of multiples(map.centre[map.across] * map.unitsPerMpc, span, step / BETWEEN)) {
    const x = map.x(at / map.unitsPerMpc)
    const numbered = i % BETWEEN === 0
    const reach = numbered ? long : long / 2
    ticks.push({ points: [x, box.maxY, x, box.maxY - reach], closed: false }, { points: [x, box.minY, x, box.minY + reach], closed: false })
    if (!numbered) continue
    const text = numeral(at, digits)
    const beyond = x + textWidth(text, 'sans', style.tick) / 2 - box.maxX - OVERHANG_MM
    marks.push({ kind: 'text', ...numbers, x: x - Math.max(0, beyond), y: box.maxY + 0.7 * style.tick + CAP_HEIGHT * style.tick, text, anchor: 'middle' })
  }
  for (const [i, at] of multiples(map.centre[map.up] * map.unitsPerMpc, span, step / BETWEEN)) {
    const y = map.y(at / map.unitsPerMpc)
    const numbered = i % BETWEEN === 0
    const reach = numbered ? long : long / 2
    ticks.push({ points: [box.minX, y, box.minX + reach, y], closed: false }, { points: [box.maxX, y, box.maxX - reach, y], closed: false })
    if (numbered) marks.push({ kind: 'text', ...numbers, x: box.minX - 0.5 * style.tick, y: y + (CAP_HEIGHT * style.tick) / 2, text: numeral(at, digits), anchor: 'end' })
  }
  const name = { kind: 'text' as const, face: 'sans' as const, size: style.tick * 1.08, anchor: 'middle' as const, colour: style.colours.ink }
  marks.push(
    { kind: 'path', subpaths: ticks, stroke },
    { ...name, x: (box.minX + box.maxX) / 2, y: box.maxY + 3.05 * style.tick, text: `${map.across.toUpperCase()} / ${recipe.units}` },
    { ...name, x: box.minX - 3.3 * style.tick, y: (box.minY + box.maxY) / 2, text: `${map.up.toUpperCase()} / ${recipe.units}`, turn: -90 },
  )
  return { kind: 'group', name: 'axes', marks }
}

/** Multiples of a step within a span about a middle: which multiple, and its value. */
function multiples(middle: number, span: number, step: number): [index: number, value: number][] {
  const slack = step * 1e-6
  const first = Math.ceil((middle - span / 2 - slack) / step)
  const last = Math.floor((middle + span / 2 + slack) / step)
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => [first + i, (first + i) * step])
}
