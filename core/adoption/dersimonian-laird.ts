import { combine, requireMeasured, type Combined } from './paule-mandel.ts'

/**
 * The random-effects mean with τ² from the first moment, in one step.
 *
 * @see DerSimonian & Laird 1986, Controlled Clinical Trials 7, 177
 */
export function derSimonianLaird(values: readonly number[], errors: readonly number[]): Combined {
  requireMeasured(values, errors)
  const weights = errors.map((e) => 1 / e ** 2)
  const sum = weights.reduce((a, b) => a + b, 0)
  const squares = weights.reduce((a, w) => a + w ** 2, 0)
  const { chi2, dof } = combine(values, errors, 0)
  const spread = sum - squares / sum
  return combine(values, errors, spread > 0 ? Math.max(0, (chi2 - dof) / spread) : 0)
}
