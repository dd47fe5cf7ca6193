/** Words of figures: titles that say themselves, axis names, numbers with true minus signs and thin spaces. */
import { MLY_PER_MPC } from '../astro/constants.ts'
import type { FigureRecipe, LengthUnit, PlaneAxes, ProjectionName } from './recipe.ts'

const THIN_SPACE = '\u2009'

/** No-break: a fifth of an em in Source Sans, which is what a thin space should be; the font's own thin space is a tenth, too little at 6 pt. */
const UNIT_SPACE = '\u00a0'

const PROJECTION_NAMES: Readonly<Record<ProjectionName, string>> = { hammer: 'Hammer', aitoff: 'Aitoff', mollweide: 'Mollweide' }

export type PlaneAxis = 'sgx' | 'sgy' | 'sgz'

/** Horizontal, vertical, and along the line of sight. */
export const AXES_OF: Readonly<Record<PlaneAxes, readonly [PlaneAxis, PlaneAxis, PlaneAxis]>> = {
  'sgx-sgy': ['sgx', 'sgy', 'sgz'],
  'sgx-sgz': ['sgx', 'sgz', 'sgy'],
  'sgy-sgz': ['sgy', 'sgz', 'sgx'],
}

/** A number with a true minus. */
export function numeral(value: number, digits = 0): string {
  const size = Math.abs(value).toFixed(digits)
  return value < 0 && Number(size) !== 0 ? `−${size}` : size
}

/** A value with its unit, a thin gap between that no line breaks at. */
export function withUnit(value: string, unit: string): string {
  return `${value}${UNIT_SPACE}${unit}`
}

/** How many of the unit a Mpc is. */
export function perMpc(unit: LengthUnit): number {
  return unit === 'Mly' ? MLY_PER_MPC : 1
}

/** The title that a figure has when its maker gave none. */
export function automaticTitle(recipe: FigureRecipe): string {
  if (recipe.view === 'sky') return `The sky, ${recipe.sky.frame} frame`
  const [across, up] = AXES_OF[recipe.plane.axes]
  return `The ${across.toUpperCase()}–${up.toUpperCase()} plane`
}

export function titleOf(recipe: FigureRecipe): string {
  return recipe.title.trim() || automaticTitle(recipe)
}

/** How the map is drawn, for the line below the title. */
export function projectionWords(recipe: FigureRecipe): string {
  if (recipe.view === 'sky') return `${PROJECTION_NAMES[recipe.sky.projection]} projection, east to the left`
  const [, , depth] = AXES_OF[recipe.plane.axes]
  const radius = recipe.plane.radius * perMpc(recipe.units)
  const half = withUnit(numeral(radius, radius < 1 ? 2 : radius < 10 ? 1 : 0).replace(/\.0$/, ''), recipe.units)
  return recipe.plane.centre ? `${depth.toUpperCase()} within ${half} of the middle` : `|${depth.toUpperCase()}| < ${half}`
}

/** Thousands parted by a thin space. */
function grouped(count: number): string {
  return String(count).replace(/\B(?=(\d{3})+$)/g, THIN_SPACE)
}

/** "412 galaxies", or "388 of 412 galaxies" where not all are drawn. */
export function galaxyCount(count: number, of = count): string {
  if (count !== of) return `${grouped(count)} of ${grouped(of)} galaxies`
  return count === 1 ? '1 galaxy' : `${grouped(count)} galaxies`
}
