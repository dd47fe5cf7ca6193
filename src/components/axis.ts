import { scaleLinear, type ScaleLinear } from 'd3-scale'

export interface Axis {
  scale: ScaleLinear<number, number>
  ticks: { at: number; text: string }[]
}

/** A linear axis over [lo, hi] on the pixels [from, to], widened to round values, with about one tick per 90 px. */
export function linearAxis(lo: number, hi: number, from: number, to: number): Axis {
  const spread = hi - lo || Math.abs(hi) * 0.1 || 1
  const scale = scaleLinear([lo - spread * 0.04, hi + spread * 0.04], [from, to])
  const count = Math.max(2, Math.round(Math.abs(to - from) / 90))
  const print = scale.tickFormat(count)
  // d3 writes a true minus already.
  return { scale, ticks: scale.ticks(count).map((value) => ({ at: scale(value), text: print(value) })) }
}
