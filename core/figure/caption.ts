import type { Block, BlockPlace } from './furniture.ts'
import type { FigureRecipe } from './recipe.ts'
import type { FigureStyle } from './style.ts'
import { wrapText } from './text-metrics.ts'

const LINE = 1.3

/** The caption, set in lines as wide as the figure; nothing when there is none. */
export function captionBlock(recipe: FigureRecipe, style: FigureStyle, { x, y, width }: BlockPlace): Block {
  const lines = wrapText(recipe.caption.trim(), 'serif', style.caption, width)
  return {
    group: {
      kind: 'group',
      name: 'caption',
      marks: lines.map((text, i) => ({ kind: 'text', x, y: y + (i + 0.8) * LINE * style.caption, text, face: 'serif', size: style.caption, anchor: 'start', colour: style.colours.ink })),
    },
    height: lines.length * LINE * style.caption,
  }
}
