/** What other estimators would make of the values that an adopted distance was made from: to compare with, not to adopt. */
import type { Policy } from '../scale/policy.ts'
import type { Reason } from './adopted.ts'
import { derSimonianLaird } from './dersimonian-laird.ts'
import { huberMean } from './huber.ts'
import { medianWithError } from './median.ts'
import { sharedZeroPointMean } from './shared-zero-point.ts'
import { weightedMean } from './weighted-mean.ts'

export interface Estimate {
  key: 'weighted-mean' | 'dersimonian-laird' | 'shared-zero-point' | 'median' | 'huber'
  label: string
  /** mag */
  value: number
  error: number
  /** What its error holds, and what it is good for. */
  note: string
}

/**
 * @param reasons - of the adopted distance modulus
 * @param methodOf - the method of a measurement, by its id
 * @returns nothing for fewer than two used values: all agree on one
 */
export function compareEstimators(reasons: readonly Reason[], methodOf: (measurement: number) => string | null, policy: Pick<Policy, 'methods'>): Estimate[] {
  const used = reasons.flatMap((r) => (r.used && r.scaled !== null && r.error !== null && r.error > 0 ? [{ ...r, scaled: r.scaled, error: r.error }] : []))
  if (used.length < 2) return []
  const values = used.map((r) => r.scaled)
  const errors = used.map((r) => r.error)
  const groups = used.map((r) => methodOf(r.measurementId) ?? '')
  const systematic = new Map(policy.methods.map((m) => [m.method as string, m.systematic]))
  const plain = weightedMean(values, errors)
  const effects = derSimonianLaird(values, errors)
  const shared = sharedZeroPointMean(values, errors, groups, systematic)
  const middle = medianWithError(values)
  const robust = huberMean(values)
  return [
    {
      key: 'weighted-mean', label: 'Weighted mean', value: plain.mean, error: plain.error,
      note: plain.scaleFactor > 1 ? `statistical, enlarged by the scale factor ${plain.scaleFactor.toFixed(1)} (Particle Data Group)` : 'statistical; the values agree, so no scale factor',
    },
    { key: 'dersimonian-laird', label: 'Random effects, DerSimonian–Laird', value: effects.mean, error: effects.error, note: effects.tau > 0 ? `statistical, with a scatter of ${effects.tau.toFixed(3)} mag` : 'statistical; no scatter beyond the errors' },
    { key: 'shared-zero-point', label: 'Least squares, zero points shared by method', value: shared.mean, error: shared.error, note: 'with the methods’ systematic errors' },
    { key: 'median', label: 'Median', value: middle.mean, error: middle.error, note: 'from the median absolute deviation; stated errors ignored' },
    { key: 'huber', label: 'Robust mean, Huber', value: robust.mean, error: robust.error, note: 'from the bounded residuals; stated errors ignored' },
  ]
}
