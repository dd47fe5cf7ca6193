/** Runs in a thread of its own: a picture takes seconds of reckoning, and the pages must not wait for it. */
import { galaxiesFromPoints } from '../../core/figure/galaxy.ts'
import type { FigureRecipe } from '../../core/figure/recipe.ts'
import type { Points } from '../../core/schema/catalogue.ts'
import type { FigureFormat } from '../../core/schema/figures.ts'
import { FigureTooLarge, renderFigure } from './render.ts'

export interface DrawTask {
  recipe: FigureRecipe
  /** The galaxies, as the JSON text of the points query. */
  points: string
  format: FigureFormat
  releaseLabel: string
  date: Date
}

/** What comes back from the thread; errors of our own lose their kind on the way, so this one is said as a value. */
export type DrawResult = { bytes: Uint8Array; mediaType: string; fileName: string } | { tooLarge: string }

export default async function draw({ recipe, points, ...options }: DrawTask): Promise<DrawResult> {
  try {
    return await renderFigure(recipe, galaxiesFromPoints(JSON.parse(points) as Points), options)
  } catch (error) {
    if (error instanceof FigureTooLarge) return { tooLarge: error.message }
    throw error
  }
}
