/**
 * Velocity dispersion from the gaps between sorted velocities: robust for a handful of members.
 *
 * σ = sqrt(π) / (n (n − 1)) Σ i (n − i) gap_i.
 *
 * @param velocities - km/s, any order
 * @returns km/s; null for fewer than three members
 * @see Beers, Flynn & Gebhardt 1990, AJ 100, 32 (after Wainer & Thissen 1976)
 */
export function gapperDispersion(velocities: readonly number[]): number | null {
  const n = velocities.length
  if (n < 3) return null
  const sorted = [...velocities].sort((a, b) => a - b)
  let sum = 0
  for (let i = 1; i < n; i++) sum += i * (n - i) * ((sorted[i] ?? 0) - (sorted[i - 1] ?? 0))
  return (Math.sqrt(Math.PI) * sum) / (n * (n - 1))
}

export interface Dispersion {
  /** km/s */
  value: number
  /** One standard deviation by the jackknife, km/s; null for three velocities, of which no three remain when one is left out. */
  error: number | null
  /** How many velocities. */
  n: number
}

/**
 * The gapper dispersion with its error by the jackknife: each velocity is left out in turn, and
 * error² = (n − 1) / n Σ (σ₋ᵢ − mean σ₋)². Beers, Flynn & Gebhardt 1990 (section 4; from memory) recommend resampling for the error, the
 * jackknife among it. The errors of the velocities themselves are not taken out: σ is what is seen.
 *
 * @param velocities - km/s, any order
 * @returns null for fewer than three members
 */
export function dispersionOf(velocities: readonly number[]): Dispersion | null {
  const value = gapperDispersion(velocities)
  if (value === null) return null
  const n = velocities.length
  const without = velocities.map((_, left) => gapperDispersion(velocities.filter((_v, i) => i !== left))).filter((s) => s !== null)
  if (without.length < n) return { value, error: null, n }
  const mean = without.reduce((sum, s) => sum + s, 0) / n
  const spread = without.reduce((sum, s) => sum + (s - mean) ** 2, 0)
  return { value, error: Math.sqrt(((n - 1) / n) * spread), n }
}
