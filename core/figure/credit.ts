import type { Block, BlockPlace, FigureContext } from './furniture.ts'
import type { FigureRecipe } from './recipe.ts'
import type { FigureStyle } from './style.ts'
import { textWidth, wrapText } from './text-metrics.ts'

const LINE = 1.35

/** Who made the data and which state of it is shown: what a reader of the printed figure needs to find it again. */
export function creditOf(recipe: FigureRecipe, context: FigureContext): string {
  const release = context.releaseLabel ? `Vicinage, ${context.releaseLabel}` : 'Vicinage'
  return recipe.credit.trim() ? `${recipe.credit.trim()} · ${release}` : release
}

/** The credit line, set at the right under a thin rule. */
export function creditBlock(recipe: FigureRecipe, style: FigureStyle, { x, y, width }: BlockPlace, context: FigureContext): Block {
  const lines = wrapText(creditOf(recipe, context), 'sans', style.credit, width)
  const rule = { kind: 'path' as const, subpaths: [{ points: [x, y, x + width, y], closed: false }], stroke: { colour: style.colours.line, width: style.hairline } }
  const marks = lines.map((text, i) => ({
    kind: 'text' as const,
    x: x + width - textWidth(text, 'sans', style.credit),
    y: y + (i + 1.05) * LINE * style.credit,
    text,
    face: 'sans' as const,
    size: style.credit,
    anchor: 'start' as const,
    colour: style.colours.muted,
  }))
  return { group: { kind: 'group', name: 'credit', marks: [rule, ...marks] }, height: (lines.length + 0.4) * LINE * style.credit }
}
