/** How many satellites are brighter than each magnitude. */
import { poissonLimits } from './poisson-limits.ts'

export interface LuminosityStep {
  slug: string
  /** Absolute V magnitude of the satellite at which the count rises, mag. */
  absV: number
  /** Satellites as bright or brighter. */
  count: number
  /** Poisson limits of the count, one standard deviation. */
  lo: number
  hi: number
}

export interface LuminosityFunction {
  /** Brightest first. */
  steps: LuminosityStep[]
  /** Satellites without an absolute magnitude: they are in no step. */
  missing: number
}

/**
 * Cumulative luminosity function N(≤ M_V) of satellites, the host left out. Nothing is corrected for what surveys do not reach; satellites of
 * one magnitude count together at each of their steps.
 *
 * @param satellites - absolute V magnitudes, mag; null where none is known
 */
export function luminosityFunction(satellites: readonly { slug: string; absV: number | null }[]): LuminosityFunction {
  const bright = satellites.flatMap(({ slug, absV }) => (absV === null ? [] : [{ slug, absV }])).sort((a, b) => a.absV - b.absV || (a.slug < b.slug ? -1 : 1))
  const steps = bright.map((satellite) => {
    const count = bright.filter((other) => other.absV <= satellite.absV).length
    return { ...satellite, count, ...poissonLimits(count) }
  })
  return { steps, missing: satellites.length - bright.length }
}
