import type { Anchor, Measurement } from '../catalogue/types.ts'

/**
 * What puts a published modulus on the catalogue's scale, mag; null when the authors do not say which anchor value they assumed.
 *
 * A modulus hangs on the anchor's modulus and moves with it. It hangs the other way on a candle's absolute magnitude, since μ = m − M: a
 * candle that is really fainter than assumed is nearer.
 */
export function rescaling(measurement: Pick<Measurement, 'anchor' | 'anchorValueAssumed'>, anchors: readonly Anchor[]): number | null {
  const anchor = anchors.find((a) => a.key === measurement.anchor)
  if (!anchor || measurement.anchorValueAssumed === null) return null
  const difference = anchor.value - measurement.anchorValueAssumed
  return anchor.kind === 'modulus' ? difference : -difference
}

/** Whether a method hangs on an anchor at all: geometry does not. */
export function hangsOnAnchor(method: string, anchors: readonly Anchor[]): boolean {
  return anchors.some((a) => (a.methods as readonly string[]).includes(method))
}
