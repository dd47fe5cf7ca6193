import type { Measurement } from '../catalogue/types.ts'
import type { Chosen } from './adopted.ts'

/**
 * Why a measurement takes no part in adoption whatever its value, in words; null when it may. A limit says what the value is not, so it is
 * shown and never averaged.
 */
export function barred(measurement: Measurement, all: readonly Measurement[], override: Chosen | null): string | null {
  if (override && !override.measurements.includes(measurement.id)) return `set aside by an override: ${override.reason}`
  if (override) return null
  if (measurement.excludedReason !== null) return `excluded: ${measurement.excludedReason}`
  const newer = all.find((m) => m.supersedes === measurement.id && m.excludedReason === null)
  if (newer) return `superseded by ${newer.sourceLabel}`
  if (measurement.limitFlag !== null) return `${measurement.limitFlag} limit`
  return null
}

/** Asymmetric errors enter as their mean; one that is given alone counts for both; 0 and none are missing. */
export function statedError(measurement: Pick<Measurement, 'errPlus' | 'errMinus'>): number | null {
  const { errPlus, errMinus } = measurement
  const mean = errPlus !== null && errMinus !== null ? (errPlus + errMinus) / 2 : (errPlus ?? errMinus)
  return mean !== null && mean > 0 ? mean : null
}
