/** Sizes of letters, lines and marks: they grow with the figure, more slowly than it, and letters never fall below 6 pt. */
import type { FigureRecipe } from './recipe.ts'
import { millimetres } from './scene.ts'
import { FIGURE_COLOURS, type FigureColours } from './theme.ts'

/** Least size of letters at the printed size, pt: common practice of journals. */
export const LEAST_PT = 6

/** The width that the sizes below are chosen at, mm: two columns of a journal. */
const REFERENCE_MM = 180

export interface FigureStyle {
  colours: FigureColours
  oneInk: boolean
  /** Ems, mm. */
  title: number
  subtitle: number
  legend: number
  caption: number
  label: number
  hostLabel: number
  tick: number
  credit: number
  /** Widths of lines, mm. */
  hairline: number
  outline: number
  halo: number
  /** Factor for marks of galaxies. */
  mark: number
  /** Blank edge, and the space between blocks, mm. */
  margin: number
  gap: number
}

export function styleOf(recipe: FigureRecipe): FigureStyle {
  const ratio = recipe.widthMm / REFERENCE_MM
  const letters = Math.min(2, Math.max(0.8, Math.sqrt(ratio)))
  const em = (pt: number): number => millimetres(Math.max(LEAST_PT, pt * letters))
  const grow = Math.min(2.2, Math.max(0.6, ratio ** 0.6))
  const lines = Math.min(1.8, Math.max(0.75, Math.sqrt(ratio)))
  return {
    colours: FIGURE_COLOURS[recipe.theme],
    oneInk: recipe.colour === 'one-ink',
    title: em(13),
    subtitle: em(7.5),
    legend: em(7.5),
    caption: em(8),
    label: em(7),
    hostLabel: em(8),
    tick: em(6.5),
    credit: em(6),
    hairline: 0.13 * lines,
    outline: 0.3 * lines,
    halo: 0.42 * lines,
    mark: grow,
    margin: Math.min(12, Math.max(2.5, recipe.widthMm * 0.03)),
    gap: 3.2 * grow,
  }
}
