import type { Block, BlockPlace, FigureContext } from './furniture.ts'
import type { FigureRecipe } from './recipe.ts'
import type { TextMark } from './scene.ts'
import type { FigureStyle } from './style.ts'
import { CAP_HEIGHT, wrapText } from './text-metrics.ts'
import { galaxyCount, projectionWords, titleOf } from './words.ts'

const LINE = 1.2

/** The title, and below it how many galaxies are shown and how. */
export function titleBlock(recipe: FigureRecipe, style: FigureStyle, { x, y, width }: BlockPlace, context: FigureContext): Block {
  const marks: TextMark[] = []
  let baseline = y
  for (const [i, line] of wrapText(titleOf(recipe), 'serif-semibold', style.title, width).entries()) {
    baseline += (i === 0 ? CAP_HEIGHT + 0.05 : LINE) * style.title
    marks.push({ kind: 'text', x, y: baseline, text: line, face: 'serif-semibold', size: style.title, anchor: 'start', colour: style.colours.ink })
  }
  baseline += style.title * 0.3
  for (const line of wrapText(`${galaxyCount(context.count, context.of)} · ${projectionWords(recipe)}`, 'sans', style.subtitle, width)) {
    baseline += style.subtitle * LINE
    marks.push({ kind: 'text', x, y: baseline, text: line, face: 'sans', size: style.subtitle, anchor: 'start', colour: style.colours.muted })
  }
  return { group: { kind: 'group', name: 'title', marks }, height: baseline - y + style.subtitle * 0.3 }
}
