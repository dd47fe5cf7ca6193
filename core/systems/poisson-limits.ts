/** Confidence limits of a small count. */

export interface CountLimits {
  lo: number
  hi: number
}

/**
 * The expected counts for which what was counted lies one standard deviation (84.13 % one-sided) off: 0.17 and 3.29 about a count of 1.
 * Approximations, good to 1 % of the exact limits.
 *
 * @param count - whole number, at least 0
 * @throws RangeError when it is not
 * @see Gehrels 1986, ApJ 303, 336, equations 9 and 14 (from memory; tested against the exact limits)
 */
export function poissonLimits(count: number): CountLimits {
  if (!Number.isInteger(count) || count < 0) throw new RangeError(`a count is a whole number from 0, not ${count}`)
  const next = count + 1
  const hi = next * (1 - 1 / (9 * next) + 1 / (3 * Math.sqrt(next))) ** 3
  const lo = count === 0 ? 0 : count * (1 - 1 / (9 * count) - 1 / (3 * Math.sqrt(count))) ** 3
  return { lo, hi }
}
