/** A measurement as its source published it, in words. */
import { quantity } from '../../core/quantities.ts'
import type { MeasurementAnswer } from '../../core/schema/catalogue.ts'
import { formatMeasure, unitText } from './format.ts'

const MOST_DECIMALS = 6

/** Decimals that show a published number as it was written: as many as its value and errors carry. */
export function decimalsOf(...values: (number | null | undefined)[]): number {
  const carried = values.map((value) => {
    if (value == null) return 0
    const text = String(Number(value.toFixed(MOST_DECIMALS)))
    const point = text.indexOf('.')
    return point < 0 || text.includes('e') ? 0 : text.length - point - 1
  })
  return Math.max(0, ...carried)
}

const LIMITS = { upper: '≤ ', lower: '≥ ' } as const

/** "27.78 ± 0.05 mag", "≤ 0.3 Jy km/s", "dSph": in the unit that the source used. */
export function publishedWords(measurement: MeasurementAnswer): string {
  const { published, textValue, limitFlag } = measurement
  if (textValue !== null) return textValue
  const { value, errPlus, errMinus, unit } = published ?? { ...measurement, unit: quantity(measurement.quantity).unit }
  const words = formatMeasure({ value, plus: errPlus, minus: errMinus, unit: unit === '' ? undefined : unitText(unit), decimals: decimalsOf(value, errPlus, errMinus) })
  return limitFlag ? LIMITS[limitFlag] + words : words
}
