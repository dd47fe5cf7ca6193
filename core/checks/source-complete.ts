import type { MeasurementCheck } from './check.ts'

/** Nobody can look up what the source does not say of itself. */
export const sourceComplete: MeasurementCheck = (_proposed, { sourceLacks, sourceLabel }) => {
  if (sourceLacks.length === 0) return null
  return { check: 'source-complete', level: 'warn', sentence: `${sourceLabel} lacks ${sourceLacks.join(' and ')}. Complete the source, so that others find it.` }
}
