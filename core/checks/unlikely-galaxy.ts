import { adopt } from '../adoption/adopt.ts'
import { distanceOf } from '../astro/distance.ts'
import { meanSurfaceBrightness } from '../astro/magnitudes.ts'
import { hiMass } from '../astro/masses.ts'
import { semiMajorPc } from '../astro/sizes.ts'
import type { Measurement } from '../catalogue/types.ts'
import type { QuantityKey } from '../quantities.ts'
import { heldWith } from './canonical.ts'
import type { MeasurementCheck } from './check.ts'
import { printed } from './printed.ts'

/** No galaxy is known outside these: common practice, no source. */
const ABSOLUTE_MAG = [-25, 1] as const
const HALF_LIGHT_PC = [3, 30_000] as const
const LOG_HI_MASS = [2, 11] as const
const MEAN_SURFACE_BRIGHTNESS = [16, 31.5] as const

const MAGNITUDES: readonly QuantityKey[] = ['b_mag', 'v_mag', 'k_mag', 'i_mag', 'g_mag', 'r_mag']

/** With this value the galaxy would be brighter, larger or richer in gas than any galaxy is: a slip that nothing else held could show. */
export const unlikelyGalaxy: MeasurementCheck = (proposed, surroundings) => {
  const key = proposed.measurement.quantity
  const held = heldWith(proposed, surroundings)
  if (held === null || proposed.measurement.limitFlag !== null) return null
  const of = (k: Measurement['quantity']): number | null => adopt(k, held.filter((m) => m.quantity === k), surroundings.scale)?.value ?? null
  const faint = surfaceBrightness(key, of)
  if (faint !== null && outside(faint, MEAN_SURFACE_BRIGHTNESS)) {
    return { check: 'unlikely-galaxy', level: 'warn', sentence: `This makes a mean surface brightness of ${printed(faint, 1)} mag/arcsec² inside the half-light radius. No galaxy is known like that: check magnitude, size and unit.` }
  }
  const modulus = of('distance_modulus')
  if (modulus === null) return null
  const asked = (k: QuantityKey): number | null => (k === key || key === 'distance_modulus' ? of(k) : null)
  const distance = distanceOf(modulus)
  const warn = (words: string): ReturnType<MeasurementCheck> => ({ check: 'unlikely-galaxy', level: 'warn', sentence: `${words}, at ${distance.toFixed(3)} Mpc. No galaxy is known like that: check the value, its unit and the distance.` })
  for (const band of MAGNITUDES) {
    const m = asked(band)
    if (m !== null && outside(m - modulus, ABSOLUTE_MAG)) return warn(`This makes an absolute ${band.charAt(0).toUpperCase()} magnitude of ${printed(m - modulus, 1)}`)
  }
  const radius = asked('r_half')
  if (radius !== null && radius > 0 && outside(semiMajorPc(distance, radius), HALF_LIGHT_PC)) return warn(`This makes a half-light radius of ${Number(semiMajorPc(distance, radius).toPrecision(3))} pc`)
  const flux = asked('hi_flux')
  if (flux !== null && flux > 0 && outside(Math.log10(hiMass(distance, flux)), LOG_HI_MASS)) return warn(`This makes an H I mass of 10^${Math.log10(hiMass(distance, flux)).toFixed(1)} solar masses`)
  return null
}

/** In V, where the proposed value has a part in it; a missing axis ratio counts as 1. */
function surfaceBrightness(key: QuantityKey, of: (key: QuantityKey) => number | null): number | null {
  const [v, radius] = [of('v_mag'), of('r_half')]
  if ((key !== 'v_mag' && key !== 'r_half' && key !== 'axis_ratio') || v === null || radius === null || radius <= 0) return null
  return meanSurfaceBrightness(v, radius, of('axis_ratio') ?? 1)
}

const outside = (value: number, [lo, hi]: readonly [number, number]): boolean => value < lo || value > hi
