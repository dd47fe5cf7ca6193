import type { MeasurementCheck } from './check.ts'

/** Nobody can look up what the source does not say of itself. */
export const sourceComplete: MeasurementCheck = (_proposed, { sourceLacks, sourceLabel }) => {
  if (sourceLacks.length === 0) return null
  return { check: 'source-complete', level: 'warn', sentence: `${sourceLabel} lacks ${listed(sourceLacks)}. Complete the source, so that others find it.` }
}

function listed(parts: readonly string[]): string {
  return parts.length > 1 ? `${parts.slice(0, -1).join(', ')} and ${parts.at(-1) ?? ''}` : (parts[0] ?? '')
}
