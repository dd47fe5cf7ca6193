/** Runs in the browser: draws a recipe on the page's canvas. */
import type { FigureGalaxy } from '../../../core/figure/galaxy.ts'
import { paintCanvas } from '../../../core/figure/paint-canvas.ts'
import type { FigureRecipe } from '../../../core/figure/recipe.ts'
import { sceneOf } from '../../../core/figure/scene-of.ts'

function canvasOf(width: number, height: number): { canvas: HTMLCanvasElement; ink: CanvasRenderingContext2D } {
  const canvas = document.querySelector('canvas')
  const ink = canvas?.getContext('2d')
  if (!canvas || !ink) throw new Error('the page has no canvas')
  canvas.width = Math.round(width)
  canvas.height = Math.round(height)
  return { canvas, ink }
}

/** @returns the picture as a data address */
export function drawFigure(recipe: FigureRecipe, galaxies: FigureGalaxy[], pxPerMm: number): string {
  const scene = sceneOf(galaxies, recipe, { releaseLabel: 'release 2026.2' })
  const { canvas, ink } = canvasOf(scene.widthMm * pxPerMm, scene.heightMm * pxPerMm)
  paintCanvas(scene, ink, pxPerMm)
  return canvas.toDataURL('image/png')
}
