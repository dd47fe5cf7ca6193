/** What somebody proposes, and the forms of it. */
import type { ChangeForm } from '../../core/schema/changes.ts'
import type { MeasurementForm } from '../../core/schema/measurement.ts'
import type { SubmissionState } from '../../core/schema/submissions.ts'
import type { KnownGalaxy } from './known.ts'

/** A change, or one made from the numbers of those before it. */
export type Proposed = ChangeForm | ((earlier: readonly number[]) => ChangeForm)

export interface Proposal {
  title: string
  summary: string
  becomes: SubmissionState
  changes: readonly Proposed[]
  /** The author's. */
  remark?: string
  /** The reviewer's, before deciding. */
  question?: string
  /** Of the decision. */
  note?: string
}

export function add(galaxy: { slug: string } | { change: number }, measurement: MeasurementForm): ChangeForm {
  return { action: 'measurement.add', payload: { galaxy: 'slug' in galaxy ? { slug: galaxy.slug } : galaxy, measurement } }
}

/** @param off - from what is adopted, mag */
export function modulus(g: KnownGalaxy, sourceId: number, off: number): MeasurementForm {
  return { quantity: 'distance_modulus', value: Number((g.dm + off).toFixed(2)), errPlus: 0.07, errMinus: 0.07, errSys: 0.05, unit: 'mag', method: 'trgb', anchor: 'trgb-absolute-i', anchorValueAssumed: -4.049, sourceId }
}

/** @param velocity - km/s */
export function velocityForm(velocity: number, sourceId: number, locator = 'table 2'): MeasurementForm {
  return { quantity: 'velocity', value: Number(velocity.toFixed(1)), errPlus: 2.5, errMinus: 2.5, unit: 'km/s', sourceId, locator }
}

/** An angle as a paper prints it, deg. */
export const printed = (angle: number): number => Number(angle.toFixed(4))

export const turned = (ra: number): number => printed(ra % 360)
