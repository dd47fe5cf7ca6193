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

/** Newer than all that is held. */
const NEWEST = Number.MAX_SAFE_INTEGER

/** All that would be held of the galaxy with the proposed measurement; null for one that its own rules refuse. */
export function heldWith(proposed: ProposedMeasurement, { held, sourceLabel }: Pick<MeasurementSurroundings, 'held' | 'sourceLabel'>): Measurement[] | null {
  const { measurement: m, replaces } = proposed
  const own = canonicalOf(proposed)
  if (own === null && m.textValue === null) return null
  const id = replaces ?? NEWEST
  const added: Measurement = {
    id, versionId: id, galaxyId: 0, quantity: m.quantity, value: own?.value ?? null, errPlus: own?.errPlus ?? null, errMinus: own?.errMinus ?? null, errSys: m.errSys, textValue: m.textValue,
    limitFlag: m.limitFlag, method: m.method, anchor: m.anchor, anchorValueAssumed: m.anchorValueAssumed, convention: m.convention, published: null, sourceId: m.sourceId, sourceLabel,
    sourceYear: 9999, locator: m.locator, note: m.note, excludedReason: null, supersedes: m.supersedes,
  }
  return [...held.filter((h) => h.id !== replaces), added]
}
