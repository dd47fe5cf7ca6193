import { figureRecipeSchema, type FigureRecipe } from '../../../core/figure/recipe.ts'
import type { Figure } from '../../../core/schema/figures.ts'

/** The recipe of a kept figure; null when it is of a kind that this version cannot draw. */
export function recipeOf(figure: Figure): FigureRecipe | null {
  const parsed = figureRecipeSchema.safeParse(figure.recipe)
  return parsed.success ? parsed.data : null
}
