import { method } from '../methods.ts'
import { quantity } from '../quantities.ts'
import { canonicalOf } from './canonical.ts'
import type { MeasurementCheck } from './check.ts'

/** No error bar, or one that nobody reaches. */
export const errorBar: MeasurementCheck = (proposed) => {
  const { measurement: m } = proposed
  const q = quantity(m.quantity)
  const own = canonicalOf(proposed)
  if (own === null || !q.errorBounds || m.limitFlag !== null) return null
  const sizes = [own.errPlus, own.errMinus].filter((e): e is number => e !== null)
  const what = q.label.toLowerCase()
  if (sizes.length === 0) {
    const standing = q.adoption === 'distance' ? 'the policy’s own stands in for it' : 'any value that states one comes before it'
    return { check: 'error-bar', level: 'warn', sentence: `No error is given; ${standing}.` }
  }
  if (sizes.every((e) => e === 0)) return { check: 'error-bar', level: 'warn', sentence: 'An error of 0 counts as none: no measurement is exact. Leave it empty, or give the one that the source states.' }
  const [least, most] = q.errorBounds
  const odd = sizes.find((e) => e < least || e > most)
  if (odd !== undefined) {
    return {
      check: 'error-bar', level: 'warn',
      sentence: `An error of ${Number(odd.toPrecision(3))} ${q.unit} is ${odd < least ? 'smaller' : 'larger'} than a ${what} usually has (${least} to ${most} ${q.unit}). Check it.`,
    }
  }
  const [plus, minus] = [own.errPlus, own.errMinus]
  if (plus !== null && minus !== null && Math.max(plus, minus) > LOPSIDED * Math.min(plus, minus)) {
    return { check: 'error-bar', level: 'warn', sentence: `The two sides of the error differ more than ${LOPSIDED} times. They enter as their mean; check both.` }
  }
  // A length or a flux that may be nothing was not measured, whatever its source calls it.
  if (q.bounds[0] > 0 && q.unit !== 'mag' && sizes.some((e) => e >= own.value)) {
    return { check: 'error-bar', level: 'warn', sentence: `The error is as large as the ${what} itself: should it be a limit?` }
  }
  const best = m.method !== null && q.adoption === 'distance' ? PRECISION[m.method] : undefined
  const finest = Math.min(...sizes)
  if (best !== undefined && m.method !== null && finest < best) {
    return { check: 'error-bar', level: 'warn', sentence: `${Number(finest.toPrecision(2))} mag is finer than ${method(m.method).inWords} distances are. Is it the error of the fit alone?` }
  }
  return { check: 'error-bar', level: 'ok', sentence: 'The error is of a likely size.' }
}

const LOPSIDED = 10

/** What methods that lean on scaling relations do not reach, mag: common practice, no source. */
const PRECISION: Partial<Record<string, number>> = { 'tully-fisher': 0.1, 'fundamental-plane': 0.1, 'brightest-stars': 0.15, 'gclf': 0.08, 'supergiants': 0.08, 'hubble-flow': 0.1 }
