import { median, robustSigma } from './median.ts'

/** Residuals beyond so many robust standard deviations count as so many: the usual choice. */
const K = 1.5
const ITERATIONS = 200

/**
 * Huber's robust mean: values far out pull no harder than those at 1.5 standard deviations, the scale being that of the median absolute
 * deviation. Errors are not asked for.
 *
 * @param values - at least one
 * @returns the mean, and its standard error from the residuals so bounded
 * @see Huber 1964, Annals of Mathematical Statistics 35, 73; Venables & Ripley, Modern Applied Statistics with S, section 5.5
 */
export function huberMean(values: readonly number[]): { mean: number; error: number } {
  const scale = robustSigma(values)
  let mean = median(values)
  if (scale === 0) return { mean, error: 0 }
  const bounded = (x: number): number => Math.min(mean + K * scale, Math.max(mean - K * scale, x))
  for (let i = 0; i < ITERATIONS; i++) {
    const next = values.reduce((sum, x) => sum + bounded(x), 0) / values.length
    const moved = Math.abs(next - mean)
    mean = next
    if (moved < 1e-12 * scale) break
  }
  const within = values.filter((x) => Math.abs(x - mean) <= K * scale).length
  const squares = values.reduce((sum, x) => sum + (bounded(x) - mean) ** 2, 0)
  return { mean, error: within === 0 ? scale : Math.sqrt(squares) / within }
}
