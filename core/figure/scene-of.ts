import type { SceneOptions } from './furniture.ts'
import type { FigureGalaxy } from './galaxy.ts'
import { planeScene } from './plane-scene.ts'
import type { FigureRecipe } from './recipe.ts'
import type { Scene } from './scene.ts'
import { skyScene } from './sky-scene.ts'

/** The scene of a recipe. The same recipe, galaxies and options give the same scene. */
export function sceneOf(galaxies: readonly FigureGalaxy[], recipe: FigureRecipe, options?: SceneOptions): Scene {
  return recipe.view === 'sky' ? skyScene(galaxies, recipe, options) : planeScene(galaxies, recipe, options)
}
