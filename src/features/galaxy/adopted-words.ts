import { quantity } from '../../../core/quantities.ts'
import type { AdoptedAnswer, GalaxyAnswer } from '../../../core/schema/catalogue.ts'

/** What the catalogue adopted of one quantity, if anything. */
export function adoptedOf(galaxy: GalaxyAnswer, key: AdoptedAnswer['quantity']): AdoptedAnswer | undefined {
  return galaxy.adopted.find((one) => one.quantity === key)
}

/** A number of the galaxy's row; null where it is missing. */
export function rowNumber(galaxy: GalaxyAnswer, column: string): number | null {
  const value = galaxy.row[column]
  return typeof value === 'number' ? value : null
}

/** How far a bound lies from its value, not negative; null when either is missing. */
export function away(a: number | null, b: number | null): number | null {
  return a === null || b === null ? null : Math.max(0, a - b)
}

/** Decimals and unit of a quantity as shown with an error. */
export function quantityLook(key: AdoptedAnswer['quantity']): { decimals: number; unit: string | undefined } {
  const { decimals, unit } = quantity(key)
  return { decimals, unit: unit === '' ? undefined : unit }
}
