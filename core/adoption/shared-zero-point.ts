import { combine, requireMeasured } from './paule-mandel.ts'

export interface SharedZeroPointMean {
  mean: number
  /** Statistical and the groups' systematic errors together. */
  error: number
  /** Shares of the mean, in the order given, summing to 1. */
  weights: number[]
  chi2: number
}

/**
 * Generalised least squares for values whose groups (methods) share an additive error each: the covariance is diagonal but for the square of the
 * group's systematic error between all its members. It is the same as the weighted mean of each group with its systematic error added, then the
 * weighted mean of those; without the shared part the error comes out far too small.
 *
 * @param groups - of each value, any key
 * @param systematic - by group, same unit as the values, 0 or more
 * @see Aitken 1935, Proceedings of the Royal Society of Edinburgh 55, 42 (generalised least squares, from memory)
 */
export function sharedZeroPointMean(values: readonly number[], errors: readonly number[], groups: readonly string[], systematic: ReadonlyMap<string, number>): SharedZeroPointMean {
  requireMeasured(values, errors)
  const keys = [...new Set(groups)]
  const within = keys.map((key) => {
    const members = values.flatMap((_, i) => (groups[i] === key ? [i] : []))
    const own = combine(members.map((i) => values[i] ?? NaN), members.map((i) => errors[i] ?? NaN), 0)
    return { members, own, error: Math.hypot(own.error, systematic.get(key) ?? 0) }
  })
  const across = combine(within.map((g) => g.own.mean), within.map((g) => g.error), 0)
  const weights = values.map(() => 0)
  within.forEach((g, k) => g.members.forEach((i, at) => (weights[i] = (across.weights[k] ?? 0) * (g.own.weights[at] ?? 0))))
  return { mean: across.mean, error: across.error, weights, chi2: across.chi2 + within.reduce((sum, g) => sum + g.own.chi2, 0) }
}
