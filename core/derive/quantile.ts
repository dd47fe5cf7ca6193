/** Bins that a list is dealt into: about as many as there are numbers in a usual list, so that few share one. */
const BINS = 1024

/**
 * Quantiles of a list, linear between neighbours (type 7 of Hyndman & Fan 1996, The American Statistician 50, 361).
 *
 * The numbers are dealt into bins of equal width, and only the bins that hold a wanted one are sorted: it is asked for every galaxy of the
 * catalogue, and this is several times as fast as sorting, or as a selection by halves.
 *
 * @param list - at least one number, none NaN or infinite; its order is changed
 * @param shares - rising, each 0 to 1
 */
export function quantilesInPlace(list: Float64Array, shares: readonly number[]): number[] {
  const n = list.length
  const { lo, hi } = range(list)
  if (!(hi > lo)) return shares.map(() => lo)
  const starts = dealIntoBins(list, lo, hi)
  let sorted = -1
  let bin = 0
  const ranked = (k: number): number => {
    while ((starts[bin + 1] ?? n) <= k) bin++
    if (sorted < bin) {
      list.subarray(starts[bin], starts[bin + 1]).sort()
      sorted = bin
    }
    return list[k] ?? NaN
  }
  return shares.map((share) => {
    const position = (n - 1) * share
    const below = Math.floor(position)
    const low = ranked(below)
    if (position === below) return low
    const kept = bin
    const next = ranked(below + 1)
    bin = kept
    return low + (position - below) * (next - low)
  })
}

function range(list: Float64Array): { lo: number; hi: number } {
  let lo = Infinity
  let hi = -Infinity
  for (let i = 0; i < list.length; i++) {
    const value = list[i] ?? NaN
    if (value < lo) lo = value
    if (value > hi) hi = value
  }
  return { lo, hi }
}

const starts = new Int32Array(BINS + 1)
const next = new Int32Array(BINS)
let copy = new Float64Array(0)
let bins = new Int32Array(0)

/** Reorders the list bin after bin. @returns where each bin starts, good until the next call */
function dealIntoBins(list: Float64Array, lo: number, hi: number): Int32Array {
  const n = list.length
  if (copy.length < n) {
    copy = new Float64Array(n)
    bins = new Int32Array(n)
  }
  const perUnit = BINS / (hi - lo)
  starts.fill(0)
  for (let i = 0; i < n; i++) {
    const value = list[i] ?? NaN
    // The largest belongs to the last bin; a width so small that the factor overflows puts everything there.
    const bin = Math.min(BINS - 1, ((value - lo) * perUnit) | 0)
    copy[i] = value
    bins[i] = bin
    starts[bin + 1] = (starts[bin + 1] ?? 0) + 1
  }
  for (let b = 0; b < BINS; b++) {
    next[b] = starts[b] ?? 0
    starts[b + 1] = (starts[b + 1] ?? 0) + (starts[b] ?? 0)
  }
  for (let i = 0; i < n; i++) {
    const bin = bins[i] ?? 0
    const place = next[bin] ?? 0
    list[place] = copy[i] ?? NaN
    next[bin] = place + 1
  }
  return starts
}
