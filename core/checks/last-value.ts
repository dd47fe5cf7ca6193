import { adopt } from '../adoption/adopt.ts'
import type { Scale } from '../adoption/adopted.ts'
import type { Measurement } from '../catalogue/types.ts'
import { labelInSentence } from '../formats/measure-words.ts'
import { quantity } from '../quantities.ts'
import type { Check } from './check.ts'

/** An excluded measurement was all that there was: the adopted value would be gone, and with it all that follows. */
export function lastValue(measurement: Measurement, held: readonly Measurement[], scale: Scale): Check | null {
  const same = held.filter((m) => m.quantity === measurement.quantity)
  const before = adopt(measurement.quantity, same, scale)
  const after = adopt(measurement.quantity, same.filter((m) => m.id !== measurement.id), scale)
  const label = labelInSentence(quantity(measurement.quantity).label)
  if (before !== null && after === null) {
    const lost = measurement.quantity === 'distance_modulus' ? ', nor a place among hosts' : ''
    return { check: 'last-value', level: 'warn', sentence: `It is the only ${label} that counts: without it the galaxy has none${lost}.` }
  }
  return after === null ? null : { check: 'last-value', level: 'ok', sentence: `${after.nUsed === 1 ? 'Another value of the' : `${after.nUsed} other values of the`} ${label} remain${after.nUsed === 1 ? 's' : ''}.` }
}
