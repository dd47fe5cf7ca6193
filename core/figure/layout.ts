/** Puts the blocks of a figure one below the other about its map, and measures the whole. */
import { captionBlock } from './caption.ts'
import { creditBlock } from './credit.ts'
import type { Block, FigureContext } from './furniture.ts'
import { legendBlock, type LegendContent } from './legend.ts'
import type { FigureRecipe } from './recipe.ts'
import type { Box, GroupMark } from './scene.ts'
import type { FigureStyle } from './style.ts'
import { titleBlock } from './title.ts'

export interface LayoutRequest {
  recipe: FigureRecipe
  style: FigureStyle
  context: FigureContext
  /** Height of the map for the width it gets, mm. */
  mapHeight: (width: number) => number
  content: LegendContent
  bare: boolean
}

export interface Layout {
  map: Box
  widthMm: number
  heightMm: number
  above: GroupMark[]
  below: GroupMark[]
}

export function layOut({ recipe, style, context, mapHeight, content, bare }: LayoutRequest): Layout {
  const widthMm = recipe.widthMm
  const margin = bare ? Math.min(style.margin, 1) : style.margin
  const place = (y: number): { x: number; y: number; width: number } => ({ x: margin, y, width: widthMm - 2 * margin })
  const above: GroupMark[] = []
  const below: GroupMark[] = []
  let y = margin
  const stack = (into: GroupMark[], block: Block, gap: number): void => {
    if (block.height === 0) return
    into.push(block.group)
    y += block.height + gap
  }
  if (!bare && recipe.heading) stack(above, titleBlock(recipe, style, place(y), context), style.gap)
  const { x, width } = place(y)
  const map: Box = { minX: x, minY: y, maxX: x + width, maxY: y + mapHeight(width) }
  y = map.maxY
  if (!bare) {
    y += style.gap
    if (recipe.legend) stack(below, legendBlock(content, recipe, style, place(y)), style.gap * 0.8)
    stack(below, captionBlock(recipe, style, place(y)), style.gap * 0.8)
    stack(below, creditBlock(recipe, style, place(y), context), 0)
    // The credit's own space below its baseline is part of the margin.
    y -= style.credit * 0.4
  }
  return { map, widthMm, heightMm: y + margin, above, below }
}
