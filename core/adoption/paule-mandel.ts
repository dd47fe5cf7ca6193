/**
 * The random-effects mean: values that differ by more than their errors allow are given the extra scatter τ that makes them consistent.
 *
 * τ² ≥ 0 solves Σ (x − m)² / (σ² + τ²) = n − 1, with weights 1 / (σ² + τ²).
 *
 * @see Paule & Mandel 1982, Journal of Research of the National Bureau of Standards 87, 377
 */
export interface Combined {
  mean: number
  /** Standard error of the mean. */
  error: number
  /** Shares of the mean, summing to 1, in the order given. */
  weights: number[]
  /** Scatter beyond the errors, same unit as the values; 0 where the errors explain everything. */
  tau: number
  /** About the mean, with the errors as given. */
  chi2: number
  dof: number
}

const ITERATIONS = 200

/**
 * @param values, errors - same unit and length, at least one; errors above 0
 * @throws RangeError when the lists are empty, differ in length, or an error is not above 0
 */
export function pauleMandel(values: readonly number[], errors: readonly number[]): Combined {
  requireMeasured(values, errors)
  const n = values.length
  const excess = (tau2: number): number => {
    const { mean, weights, sum } = weigh(values, errors, tau2)
    return weights.reduce((total, w, i) => total + w * sum * ((values[i] ?? 0) - mean) ** 2, 0) - (n - 1)
  }
  let low = 0
  if (n > 1 && excess(0) > 0) {
    // The excess falls with τ², so the root lies between 0 and a bound that is doubled until it is beyond.
    let high = Math.max(...errors) ** 2
    while (excess(high) > 0) high *= 4
    for (let i = 0; i < ITERATIONS && high - low > 1e-15 * high; i++) {
      const middle = (low + high) / 2
      if (excess(middle) > 0) low = middle
      else high = middle
    }
  }
  return combine(values, errors, low)
}

/** The mean for a given τ²; 0 is the plain inverse-variance mean. */
export function combine(values: readonly number[], errors: readonly number[], tau2: number): Combined {
  const { mean, weights, sum } = weigh(values, errors, tau2)
  const chi2 = values.reduce((total, x, i) => total + ((x - mean) / (errors[i] ?? 1)) ** 2, 0)
  return { mean, error: 1 / Math.sqrt(sum), weights, tau: Math.sqrt(tau2), chi2, dof: values.length - 1 }
}

function weigh(values: readonly number[], errors: readonly number[], tau2: number): { mean: number; weights: number[]; sum: number } {
  const raw = errors.map((e) => 1 / (e ** 2 + tau2))
  const sum = raw.reduce((a, b) => a + b, 0)
  const weights = raw.map((w) => w / sum)
  // About the first value, so that no digits are lost on moduli that differ in their third decimal.
  const first = values[0] ?? 0
  const mean = first + weights.reduce((total, w, i) => total + w * ((values[i] ?? 0) - first), 0)
  return { mean, weights, sum }
}

/** @throws RangeError as `pauleMandel` says */
export function requireMeasured(values: readonly number[], errors: readonly number[]): void {
  if (values.length === 0) throw new RangeError('there is nothing to combine')
  if (values.length !== errors.length) throw new RangeError('every value needs its error')
  if (!values.every(Number.isFinite)) throw new RangeError('every value must be finite')
  if (!errors.every((e) => e > 0 && e < Infinity)) throw new RangeError('every error must be above 0')
}
