import { adopt } from '../adoption/adopt.ts'
import type { Adopted } from '../adoption/adopted.ts'
import { statedError } from '../adoption/eligible.ts'
import { hangsOnAnchor, rescaling } from '../adoption/rescale.ts'
import { quantity } from '../quantities.ts'
import { canonicalOf, othersOf, scaledOf } from './canonical.ts'
import type { MeasurementCheck, MeasurementSurroundings, ProposedMeasurement } from './check.ts'
import { printed } from './printed.ts'

/** How far it lies from what the rest says, in standard deviations of both. */
export const agreement: MeasurementCheck = (proposed, surroundings) => {
  const q = quantity(proposed.measurement.quantity)
  const scaled = scaledOf(proposed, surroundings)
  const own = canonicalOf(proposed)
  const known = adopt(q.key, othersOf(proposed, surroundings), surroundings.scale)
  if (scaled === null || own === null || known === null || known.value === null || proposed.measurement.limitFlag !== null) return null
  const error = Math.hypot(statedError(own) ?? 0, unscaled(proposed, surroundings), known.errPlus ?? 0, ...systematics(proposed, known, surroundings))
  if (error <= 0) return null
  const z = Math.abs(scaled - known.value) / error
  const words = `${z.toFixed(1)} σ from the ${printed(known.value, q.decimals)}${q.unit ? ` ${q.unit}` : ''} of the other ${known.nUsed === 1 ? 'value' : `${known.nUsed} values`}`
  if (z <= surroundings.scale.policy.tension) return { check: 'agreement', level: 'ok', sentence: `${words}.` }
  return { check: 'agreement', level: 'warn', sentence: `${words}: look at the source again, and say in the note why it should be believed.` }
}

/** Two distances by one method have its systematic error in common: it moves both and parts neither. Two methods have each their own. */
function systematics({ measurement }: ProposedMeasurement, known: Adopted, { held, scale }: MeasurementSurroundings): number[] {
  if (measurement.quantity !== 'distance_modulus') return [known.errSys ?? 0]
  const used = new Set(known.reasons.filter((r) => r.used).map((r) => r.measurementId))
  if (held.filter((m) => used.has(m.id)).every((m) => m.method === measurement.method)) return []
  return [known.errSys ?? 0, scale.policy.methods.find((r) => r.method === measurement.method)?.systematic ?? 0]
}

/** What adoption adds where nobody knows on which anchor value a distance hangs. */
function unscaled({ measurement: m }: ProposedMeasurement, { scale }: MeasurementSurroundings): number {
  if (m.quantity !== 'distance_modulus' || m.method === null || !hangsOnAnchor(m.method, scale.anchors) || rescaling(m, scale.anchors) !== null) return 0
  return scale.policy.methods.find((r) => r.method === m.method)?.unscaled ?? 0
}
