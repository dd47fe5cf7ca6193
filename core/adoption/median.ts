/** The median, and its error from the median absolute deviation: for comparison, since it shrugs at one wild value. */

/** Makes the median absolute deviation of a normal sample its standard deviation: 1 / Φ⁻¹(3/4). */
const MAD_TO_SIGMA = 1.4826

/** @param values - at least one, finite; not changed */
export function median(values: readonly number[]): number {
  if (values.length === 0) throw new RangeError('there is no median of nothing')
  const sorted = [...values].sort((a, b) => a - b)
  const middle = Math.floor(sorted.length / 2)
  const upper = sorted[middle] ?? NaN
  return sorted.length % 2 === 1 ? upper : ((sorted[middle - 1] ?? NaN) + upper) / 2
}

/** Robust standard deviation: 1.4826 times the median absolute deviation from the median. */
export function robustSigma(values: readonly number[]): number {
  const centre = median(values)
  return MAD_TO_SIGMA * median(values.map((x) => Math.abs(x - centre)))
}

/** The median with its standard error, sqrt(π/2) σ / sqrt(n): that of a normal sample. */
export function medianWithError(values: readonly number[]): { mean: number; error: number } {
  return { mean: median(values), error: (Math.sqrt(Math.PI / 2) * robustSigma(values)) / Math.sqrt(values.length) }
}
