import { combine, requireMeasured, type Combined } from './paule-mandel.ts'

export interface ScaledMean extends Combined {
  /** S = sqrt(χ² / (N − 1)), at least 1, from the precise inputs only. */
  scaleFactor: number
}

/**
 * The weighted mean with the scale factor of the Particle Data Group: the error of the mean is enlarged by S where the values scatter more
 * than they should. S counts only inputs with an error below 3 sqrt(N) times that of the mean, since a coarse value can neither make nor
 * hide a disagreement.
 *
 * @see Particle Data Group, Review of Particle Physics, introduction, section 5.2
 */
export function weightedMean(values: readonly number[], errors: readonly number[]): ScaledMean {
  requireMeasured(values, errors)
  const plain = combine(values, errors, 0)
  const limit = 3 * Math.sqrt(values.length) * plain.error
  const precise = values.flatMap((value, i) => {
    const error = errors[i] ?? 0
    return error < limit ? [{ value, error }] : []
  })
  const chi2 = precise.reduce((total, p) => total + ((p.value - plain.mean) / p.error) ** 2, 0)
  const scaleFactor = precise.length > 1 ? Math.max(1, Math.sqrt(chi2 / (precise.length - 1))) : 1
  return { ...plain, error: plain.error * scaleFactor, scaleFactor }
}
