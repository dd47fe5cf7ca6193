import { adopt } from '../adoption/adopt.ts'
import { statedError } from '../adoption/eligible.ts'
import { quantity, type Quantity } from '../quantities.ts'
import { canonicalOf, othersOf, scaledOf } from './canonical.ts'
import type { MeasurementCheck } from './check.ts'
import { printed } from './printed.ts'

/** A reading has to fit this much better before it is suggested. */
const BETTER = 20

/** A sign, a decimal point or one digit was mistyped: with it the number would fit what is known far better. */
export const digitSlip: MeasurementCheck = (proposed, surroundings) => {
  const q = quantity(proposed.measurement.quantity)
  const value = scaledOf(proposed, surroundings)
  const own = canonicalOf(proposed)
  const known = adopt(q.key, othersOf(proposed, surroundings), surroundings.scale)
  if (value === null || own === null || known?.value == null || proposed.measurement.limitFlag !== null) return null
  const error = Math.hypot(statedError(own) ?? 0, known.errPlus ?? 0, known.errSys ?? 0)
  const miss = Math.abs(value - known.value)
  // What agrees needs no reading.
  if (miss <= 5 * Math.max(error, 10 ** -q.decimals)) return null
  const adopted = known.value
  const better = readingsOf(q, value).find((r) => {
    const left = Math.abs(r.value - adopted)
    return left * BETTER < miss || left <= 2 * error
  })
  if (!better) return null
  const unit = q.unit ? ` ${q.unit}` : ''
  return {
    check: 'digit-slip', level: 'warn',
    sentence: `${printed(value, q.decimals)}${unit} is far from the ${printed(known.value, q.decimals)}${unit} adopted; ${better.words} it would fit. Check it against the source.`,
  }
}

function readingsOf(q: Quantity, value: number): { value: number; words: string }[] {
  const signed = { value: -value, words: 'with the other sign' }
  // Magnitudes and moduli are logarithms: a wrong digit adds, a wrong point makes no magnitude at all.
  if (q.unit === 'mag' || q.unit === 'dex') {
    const off = [1, -1, 10, -10].map((by) => ({ value: value + by, words: `with another digit (${printed(value + by, q.decimals)})` }))
    return q.bounds[0] < 0 ? [...off, signed] : off
  }
  const points = [10, 0.1, 100, 0.01].map((by) => ({ value: value * by, words: `with the decimal point elsewhere (${String(Number((value * by).toPrecision(6))).replace('-', '\u2212')})` }))
  const off = q.unit === 'km/s' ? [100, -100, 1000, -1000].map((by) => ({ value: value + by, words: `with another digit (${printed(value + by, q.decimals)})` })) : []
  return q.bounds[0] < 0 ? [signed, ...points, ...off] : [...points, ...off]
}
