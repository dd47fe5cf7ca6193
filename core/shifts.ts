/** Many shifts of distance moduli at once: what they come to, in numbers. */
import type { Shift } from './effect.ts'

export interface ShiftSummary {
  count: number
  /** mag, signed */
  least: number
  greatest: number
  median: number
  hostsChanged: number
}

/** The modulus after less the one before, mag. */
export function shiftOf(shift: Pick<Shift, 'before' | 'after'>): number {
  return shift.after - shift.before
}

/** A shift in units of the error that the modulus had; null where it had none. */
export function shiftInErrors(shift: Pick<Shift, 'before' | 'after' | 'error'>): number | null {
  return shift.error > 0 ? shiftOf(shift) / shift.error : null
}

/** Mpc, after: from D = 10^((μ − 25) / 5). */
export function distanceAfter(shift: Pick<Shift, 'after'>): number {
  return 10 ** ((shift.after - 25) / 5)
}

/** What shifts come to; null when there is none. */
export function summaryOf(shifts: readonly Shift[]): ShiftSummary | null {
  if (shifts.length === 0) return null
  const sorted = Float64Array.from(shifts, shiftOf).sort()
  return { count: shifts.length, least: sorted[0] ?? 0, greatest: sorted.at(-1) ?? 0, median: ((sorted[(sorted.length - 1) >> 1] ?? 0) + (sorted[sorted.length >> 1] ?? 0)) / 2, hostsChanged: shifts.filter((s) => s.hostChanged).length }
}

export interface Bin {
  lo: number
  hi: number
  count: number
}

/** Equal bins over [lo, hi]; the last one holds its upper end. Values outside are left out. */
export function binsOf(values: readonly number[], lo: number, hi: number, bins: number): Bin[] {
  const width = (hi - lo) / bins
  const counts = new Array<number>(bins).fill(0)
  for (const value of values) {
    if (value < lo || value > hi) continue
    const i = Math.min(bins - 1, Math.floor((value - lo) / width))
    counts[i] = (counts[i] ?? 0) + 1
  }
  return counts.map((count, i) => ({ lo: lo + i * width, hi: lo + (i + 1) * width, count }))
}
