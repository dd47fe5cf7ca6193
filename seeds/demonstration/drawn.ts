/** One value as a paper of the invented literature gives it. */
import type { MethodKey } from '../../core/methods.ts'
import type { QuantityKey, ReddeningConvention } from '../../core/quantities.ts'
import type { Random } from '../../core/random.ts'
import type { InventedSource } from './literature.ts'

export interface DrawnMeasurement {
  quantity: QuantityKey
  value: number | null
  errPlus: number | null
  errMinus: number | null
  errSys: number | null
  textValue: string | null
  method: MethodKey | null
  anchor: string | null
  anchorValueAssumed: number | null
  convention: ReddeningConvention | null
  /** Index into the invented literature. */
  source: number
  locator: string
}

/** A value drawn about the truth, printed to some decimals, with the error that it was drawn with. */
export function number(draw: Random, quantity: QuantityKey, truth: number, error: number, decimals: number, source: number): DrawnMeasurement {
  const bar = error > 0 ? Math.max(10 ** -decimals, rounded(error, decimals)) : null
  const value = rounded(truth + error * draw.normal(), decimals)
  return { ...blank(source), quantity, value: quantity === 'ebv' ? Math.max(0, value) : value, errPlus: bar, errMinus: bar, locator: `table ${1 + draw.integer(5)}` }
}

export function blank(source: number): DrawnMeasurement {
  return {
    quantity: 'distance_modulus', value: null, errPlus: null, errMinus: null, errSys: null, textValue: null, method: null, anchor: null,
    anchorValueAssumed: null, convention: null, source, locator: '',
  }
}

/** Any source about a method. @throws RangeError when nobody wrote about it */
export function sourceAbout(draw: Random, sources: readonly InventedSource[], about: InventedSource['about']): number {
  return draw.pick(sources.flatMap((s, i) => (s.about === about ? [i] : [])))
}

/** @throws RangeError when no title has the word */
export function sourceTitled(sources: readonly InventedSource[], word: string): number {
  const found = sources.findIndex((s) => s.title.includes(word))
  if (found < 0) throw new RangeError(`no invented source speaks of ${word}`)
  return found
}

export function rounded(x: number, decimals: number): number {
  return Number(x.toFixed(decimals))
}
