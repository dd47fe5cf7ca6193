import { quantity } from '../quantities.ts'
import { canonicalOf } from './canonical.ts'
import type { MeasurementCheck } from './check.ts'

/** No error bar, or one that nobody reaches. */
export const errorBar: MeasurementCheck = (proposed) => {
  const q = quantity(proposed.measurement.quantity)
  const own = canonicalOf(proposed)
  if (own === null || !q.errorBounds) return null
  const sizes = [own.errPlus, own.errMinus].filter((e): e is number => e !== null)
  const what = q.label.toLowerCase()
  if (sizes.length === 0) return { check: 'error-bar', level: 'warn', sentence: `No error is given; the policy's own stands in for it.` }
  const [least, most] = q.errorBounds
  const odd = sizes.find((e) => e < least || e > most)
  if (odd === undefined) return { check: 'error-bar', level: 'ok', sentence: 'The error is of a likely size.' }
  return {
    check: 'error-bar', level: 'warn',
    sentence: `An error of ${Number(odd.toPrecision(3))} ${q.unit} is ${odd < least ? 'smaller' : 'larger'} than a ${what} usually has (${least} to ${most} ${q.unit}). Check it.`,
  }
}
