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
