import { canonicalOf, othersOf } from './canonical.ts'
import type { MeasurementCheck } from './check.ts'

/** The same source has said the same already. */
export const enteredBefore: MeasurementCheck = (proposed, surroundings) => {
  const { measurement: m } = proposed
  const own = canonicalOf(proposed)
  const same = othersOf(proposed, surroundings).filter((o) => o.sourceId === m.sourceId && o.method === m.method)
  const equal = same.find((o) => (own === null ? o.textValue === m.textValue : o.value !== null && Math.abs(o.value - own.value) < 1e-9))
  if (equal) return { check: 'entered-before', level: 'stop', sentence: `${surroundings.galaxy} has this very value from ${surroundings.sourceLabel} already. Remove this change.` }
  if (same.length > 0) return { check: 'entered-before', level: 'warn', sentence: `${surroundings.galaxy} has another value from ${surroundings.sourceLabel} by the same method; both would count.` }
  return { check: 'entered-before', level: 'ok', sentence: 'Not entered before.' }
}
