/** From the measurements of one quantity of one galaxy to its adopted value, with weights and reasons. */
import type { Measurement } from '../catalogue/types.ts'
import { quantity, type QuantityKey } from '../quantities.ts'
import { adoptDistance } from './adopt-distance.ts'
import type { Adopted, Chosen, Reason, Scale } from './adopted.ts'
import { barred, statedError } from './eligible.ts'
import { weightedMean } from './weighted-mean.ts'

/**
 * @param measurements - all of this quantity of one galaxy, in any order
 * @param override - what somebody chose against the policy, with the reason
 * @returns null when there is nothing that can be adopted
 */
export function adopt(key: QuantityKey, measurements: readonly Measurement[], scale: Scale, override: Chosen | null = null): Adopted | null {
  // The order in which rows come from a database must not matter, not even in the last digit.
  const sorted = [...measurements].sort((a, b) => a.id - b.id)
  switch (quantity(key).adoption) {
    case 'distance':
      return adoptDistance(sorted, scale, override)
    case 'weighted-mean':
      return adoptMean(key, sorted, scale, override)
    case 'smallest-error':
      return adoptOne(key, sorted, override, bySmallestError, 'the smallest stated error')
    case 'newest':
      return adoptOne(key, sorted, override, byNewest, 'the newest')
  }
}

/** Velocities: the weighted mean with scale factor. Without any stated error, the newest. */
function adoptMean(key: QuantityKey, measurements: readonly Measurement[], scale: Scale, override: Chosen | null): Adopted | null {
  const free = measurements.filter((m) => m.value !== null && barred(m, measurements, override) === null)
  const withErrors = free.flatMap((m) => {
    const error = statedError(m)
    return m.value !== null && error !== null ? [{ m, value: m.value, error }] : []
  })
  if (withErrors.length === 0) return adoptOne(key, measurements, override, byNewest, 'the newest, none states an error')
  const mean = weightedMean(withErrors.map((c) => c.value), withErrors.map((c) => c.error))
  const reasons = measurements.map((m): Reason => {
    const i = withErrors.findIndex((c) => c.m === m)
    const entry = withErrors[i]
    if (!entry) return unused(m, barred(m, measurements, override) ?? 'states no error')
    const residual = (entry.value - mean.mean) / entry.error
    return { measurementId: m.id, used: true, weight: mean.weights[i] ?? 0, shift: 0, scaled: entry.value, error: entry.error, residual, tension: Math.abs(residual) > scale.policy.tension, reason: 'used', flags: [] }
  })
  return {
    quantity: key, value: mean.mean, textValue: null, errPlus: mean.error, errMinus: mean.error, errSys: null, nUsed: withErrors.length, nAll: measurements.length, chi2: mean.chi2,
    dof: mean.dof, scatter: null, method: null, reasons, override: override?.reason ?? null,
    sentence: meanSentence(withErrors.map((c) => c.m.sourceLabel), mean.scaleFactor, override),
  }
}

function meanSentence(sources: readonly string[], scaleFactor: number, override: Chosen | null): string {
  const n = sources.length
  const from = n === 1 ? `one value (${sources[0] ?? ''})` : `${n} values`
  const first = override ? `Set by an override from ${from}: ${override.reason}.` : `${n === 1 ? 'From' : 'Weighted from'} ${from}.`
  return scaleFactor > 1 ? `${first} The error is enlarged ${scaleFactor.toFixed(1)} times, since they scatter more than their errors allow.` : first
}

/** The one measurement that comes first in an order. */
function adoptOne(key: QuantityKey, measurements: readonly Measurement[], override: Chosen | null, order: (a: Measurement, b: Measurement) => number, words: string): Adopted | null {
  const free = measurements.filter((m) => barred(m, measurements, override) === null)
  const best = [...free].sort(order)[0]
  if (!best) return null
  const reasons = measurements.map((m): Reason => {
    if (m !== best) return unused(m, barred(m, measurements, override) ?? `not ${words}`)
    return { measurementId: m.id, used: true, weight: 1, shift: 0, scaled: m.value, error: statedError(m), residual: null, tension: false, reason: 'used', flags: statedError(m) === null && m.value !== null ? ['no error stated'] : [] }
  })
  return {
    quantity: key, value: best.value, textValue: best.textValue, errPlus: best.errPlus, errMinus: best.errMinus, errSys: best.errSys, nUsed: 1, nAll: measurements.length,
    chi2: null, dof: null, scatter: null, method: null, reasons, override: override?.reason ?? null,
    sentence: override ? `Set by an override, from ${best.sourceLabel}: ${override.reason}.` : measurements.length === 1 ? `From one value (${best.sourceLabel}).` : `From ${best.sourceLabel}: ${words} of ${measurements.length} values.`,
  }
}

function unused(m: Measurement, reason: string): Reason {
  return { measurementId: m.id, used: false, weight: 0, shift: 0, scaled: m.value, error: statedError(m), residual: null, tension: false, reason, flags: [] }
}

/** Smallest stated error first, those without any last; among equals the newest. */
function bySmallestError(a: Measurement, b: Measurement): number {
  const difference = (statedError(a) ?? Infinity) - (statedError(b) ?? Infinity)
  return Number.isNaN(difference) || difference === 0 ? byNewest(a, b) : difference
}

function byNewest(a: Measurement, b: Measurement): number {
  return b.sourceYear - a.sourceYear || b.id - a.id
}
