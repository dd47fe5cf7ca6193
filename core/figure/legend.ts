import { classLabel, GALAXY_CLASSES, type GalaxyClass } from '../classes.ts'
import { CLASS_MARKS, classColour } from './classes-marks.ts'
import { markSize } from './dots.ts'
import type { Block, BlockPlace } from './furniture.ts'
import { observerMarks } from './observer.ts'
import type { FigureRecipe } from './recipe.ts'
import type { Mark } from './scene.ts'
import type { FigureStyle } from './style.ts'
import { CAP_HEIGHT, textWidth } from './text-metrics.ts'
import { numeral } from './words.ts'

/** One entry: its width, and its marks from a left end and a middle line. */
interface Entry {
  width: number
  draw: (x: number, middle: number) => Mark[]
}

const ROW = 1.75
const BETWEEN = 1.7
const AFTER_SWATCH = 0.45

/** Magnitudes that the key of sizes shows. */
const SIZE_KEY = [-20, -14, -8]

export interface LegendContent {
  classes: ReadonlySet<GalaxyClass>
  zone: boolean
  supergalacticPlane: boolean
  observer: boolean
}

/** The classes shown, what is shaded and dashed, and what sizes mean; in rows as wide as the map. */
export function legendBlock(content: LegendContent, recipe: FigureRecipe, style: FigureStyle, { x, y, width }: BlockPlace): Block {
  const entries = GALAXY_CLASSES.filter((key) => content.classes.has(key)).map((key) => classEntry(key, recipe, style))
  if (content.zone) entries.push(zoneEntry(style))
  if (content.supergalacticPlane) entries.push(planeEntry(style))
  if (content.observer) entries.push(observerEntry(style))
  if (recipe.size === 'luminosity' && content.classes.size > 0) entries.push(sizeEntry(recipe, style))
  const marks: Mark[] = []
  let left = x
  let row = 0
  for (const entry of entries) {
    if (left > x && left + entry.width > x + width) {
      left = x
      row += 1
    }
    marks.push(...entry.draw(left, y + (row + 0.5) * ROW * style.legend))
    left += entry.width + BETWEEN * style.legend
  }
  return { group: { kind: 'group', name: 'legend', marks }, height: entries.length === 0 ? 0 : (row + 1) * ROW * style.legend }
}

function words(text: string, x: number, middle: number, style: FigureStyle): Mark {
  return { kind: 'text', x, y: middle + (CAP_HEIGHT * style.legend) / 2, text, face: 'sans', size: style.legend, anchor: 'start', colour: style.colours.ink }
}

function classEntry(key: GalaxyClass, recipe: FigureRecipe, style: FigureStyle): Entry {
  const size = 0.82 * style.legend
  const label = classLabel(key)
  const start = size + AFTER_SWATCH * style.legend
  return {
    width: start + textWidth(label, 'sans', style.legend),
    draw: (x, middle) => [
      { kind: 'dot', shape: CLASS_MARKS[key].shape, x: x + size / 2, y: middle, size, colour: classColour(key, style.colours, recipe.colour) },
      words(label, x + start, middle, style),
    ],
  }
}

function zoneEntry(style: FigureStyle): Entry {
  const label = 'zone of avoidance, |b| < 10°'
  const swatch = 1.5 * style.legend
  const half = 0.4 * style.legend
  const start = swatch + AFTER_SWATCH * style.legend
  return {
    width: start + textWidth(label, 'sans', style.legend),
    draw: (x, middle) => [
      {
        kind: 'path',
        subpaths: [{ points: [x, middle - half, x + swatch, middle - half, x + swatch, middle + half, x, middle + half], closed: true }],
        fill: style.colours.zone,
        stroke: { colour: style.colours.line, width: style.hairline },
      },
      words(label, x + start, middle, style),
    ],
  }
}

function planeEntry(style: FigureStyle): Entry {
  const label = 'supergalactic plane'
  const swatch = 2 * style.legend
  const start = swatch + AFTER_SWATCH * style.legend
  return {
    width: start + textWidth(label, 'sans', style.legend),
    draw: (x, middle) => [
      { kind: 'path', subpaths: [{ points: [x, middle, x + swatch, middle], closed: false }], stroke: planeStroke(style) },
      words(label, x + start, middle, style),
    ],
  }
}

function observerEntry(style: FigureStyle): Entry {
  const label = 'where we are'
  const swatch = 2.6 * style.mark
  const start = swatch + AFTER_SWATCH * style.legend
  return {
    width: start + textWidth(label, 'sans', style.legend),
    draw: (x, middle) => [...observerMarks(x + swatch / 2, middle, style), words(label, x + start, middle, style)],
  }
}

/** How the supergalactic plane is drawn, on maps and in the legend. */
export function planeStroke(style: FigureStyle): { colour: string; width: number; dash: number[] } {
  return { colour: style.oneInk ? style.colours.ink : style.colours.accent, width: style.hairline * 1.6, dash: [style.hairline * 9, style.hairline * 6] }
}

/** M with a lowered V, then open circles with their magnitudes. */
function sizeEntry(recipe: FigureRecipe, style: FigureStyle): Entry {
  const em = style.legend
  const small = Math.max(em * 0.75, style.credit * 0.8)
  const lead = textWidth('M', 'sans-italic', em) + textWidth('V', 'sans', small) + AFTER_SWATCH * 1.6 * em
  const steps = SIZE_KEY.map((absV) => ({ size: markSize(absV, recipe.size, style), label: numeral(absV) }))
  const widthOf = (step: { size: number; label: string }): number => step.size + AFTER_SWATCH * em + textWidth(step.label, 'sans', em)
  return {
    width: lead + steps.reduce((sum, step) => sum + widthOf(step), 0) + (steps.length - 1) * 0.8 * em,
    draw: (x, middle) => {
      const baseline = middle + (CAP_HEIGHT * em) / 2
      const marks: Mark[] = [
        { kind: 'text', x, y: baseline, text: 'M', face: 'sans-italic', size: em, anchor: 'start', colour: style.colours.ink },
        { kind: 'text', x: x + textWidth('M', 'sans-italic', em), y: baseline + 0.18 * em, text: 'V', face: 'sans', size: small, anchor: 'start', colour: style.colours.ink },
      ]
      let left = x + lead
      for (const step of steps) {
        marks.push(
          { kind: 'dot', shape: CLASS_MARKS.spiral.shape, x: left + step.size / 2, y: middle, size: step.size, colour: style.colours.muted },
          words(step.label, left + step.size + AFTER_SWATCH * em, middle, style),
        )
        left += widthOf(step) + 0.8 * em
      }
      return marks
    },
  }
}
