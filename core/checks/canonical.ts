import type { Measurement } from '../catalogue/types.ts'
import { quantity, toCanonical } from '../quantities.ts'
import { rescaling } from '../adoption/rescale.ts'
import type { MeasurementSurroundings, ProposedMeasurement } from './check.ts'

export interface Canonical {
  value: number
  errPlus: number | null
  errMinus: number | null
}

/** The proposed value in the canonical unit; null for a text, or a value that its own rules refuse. */
export function canonicalOf({ measurement: m }: ProposedMeasurement): Canonical | null {
  if (m.value === null) return null
  try {
    return toCanonical(quantity(m.quantity), { ...m, value: m.value })
  } catch {
    return null
  }
}

/** The proposed value on the catalogue's scale. */
export function scaledOf(proposed: ProposedMeasurement, { scale }: MeasurementSurroundings): number | null {
  const own = canonicalOf(proposed)
  return own === null ? null : own.value + (rescaling(proposed.measurement, scale.anchors) ?? 0)
}

/** What else is held of the same quantity, without the measurement that is mended, and without excluded ones. */
export function othersOf({ measurement, replaces }: ProposedMeasurement, { held }: MeasurementSurroundings): Measurement[] {
  return held.filter((m) => m.quantity === measurement.quantity && m.id !== replaces && m.excludedReason === null)
}
