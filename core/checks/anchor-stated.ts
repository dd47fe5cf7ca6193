import { hangsOnAnchor } from '../adoption/rescale.ts'
import { method } from '../methods.ts'
import type { MeasurementCheck } from './check.ts'

/** The method hangs on an anchor, and the authors' value of it is not given. */
export const anchorStated: MeasurementCheck = ({ measurement: m }, { scale }) => {
  if (m.quantity !== 'distance_modulus' || m.method === null || !hangsOnAnchor(m.method, scale.anchors)) return null
  if (m.anchorValueAssumed !== null) {
    const known = scale.anchors.find((a) => a.key === m.anchor)
    if (known) return { check: 'anchor-stated', level: 'ok', sentence: `Can be put on our scale: ${known.label} assumed ${signed(m.anchorValueAssumed)}, ours ${signed(known.value)}.` }
    return { check: 'anchor-stated', level: 'warn', sentence: `The catalogue has no anchor called "${m.anchor ?? ''}", so the value is taken as published.` }
  }
  return { check: 'anchor-stated', level: 'warn', sentence: `A ${method(m.method).inWords} distance hangs on an anchor, and the value its authors assumed is not given: it is taken as published, with a larger error.` }
}

/** With a true minus sign. */
const signed = (value: number): string => String(value).replace('-', '\u2212')
