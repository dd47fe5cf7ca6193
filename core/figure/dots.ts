/** From galaxies with a place to their marks. */
import { CLASS_MARKS, classColour } from './classes-marks.ts'
import type { FigureGalaxy } from './galaxy.ts'
import type { FigureRecipe } from './recipe.ts'
import type { DotMark, Hit } from './scene.ts'
import type { FigureStyle } from './style.ts'

export interface PlacedGalaxy {
  galaxy: FigureGalaxy
  x: number
  y: number
  /** Side of its mark, mm. */
  size: number
}

/** Marks run from the smallest at this luminosity and fainter to the largest at that and brighter (M_V, mag). */
export const FAINTEST = -5
export const BRIGHTEST = -21.5
const LEAST_MM = 0.95
const MOST_MM = 2.9
const FIXED_MM = 1.35

/** Side of a galaxy's mark, mm: linear in magnitude, so the eye reads ranks, not fluxes. @param absV - M_V, mag; null draws as small */
export function markSize(absV: number | null, sizing: FigureRecipe['size'], style: FigureStyle): number {
  if (sizing === 'fixed') return FIXED_MM * style.mark
  const share = absV === null ? 0.15 : Math.min(1, Math.max(0, (absV - FAINTEST) / (BRIGHTEST - FAINTEST)))
  return (LEAST_MM + (MOST_MM - LEAST_MM) * share ** 1.4) * style.mark
}

/** In the order of drawing: large marks first, so that small ones are not hidden; equal ones by number, so that the order never changes. */
export function inDrawingOrder(placed: readonly PlacedGalaxy[]): PlacedGalaxy[] {
  return [...placed].sort((a, b) => b.size - a.size || a.galaxy.id - b.galaxy.id)
}

export function dotMark({ galaxy, x, y, size }: PlacedGalaxy, recipe: FigureRecipe, style: FigureStyle): DotMark {
  return { kind: 'dot', shape: CLASS_MARKS[galaxy.class].shape, x, y, size, colour: classColour(galaxy.class, style.colours, recipe.colour), halo: style.colours.sheet }
}

export function hitOf({ galaxy, x, y, size }: PlacedGalaxy): Hit {
  return { id: galaxy.id, slug: galaxy.slug, x, y, radius: size / 2 }
}
