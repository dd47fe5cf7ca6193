/** Masses of gas and stars. */
import { B_MINUS_K_EARLY_MAG, B_MINUS_K_LATE_MAG, HI_MASS_PER_MPC2_JY_KM_PER_S, SUN_ABS_K_MAG, V_MINUS_K_MAG } from './constants.ts'
import { requireFinite, requirePositive, type JyKmPerS, type Mag, type Mpc, type Msun } from './units.ts'

/**
 * H I mass: 2.356e5 D² S, optically thin.
 *
 * @see Roberts 1975, in Galaxies and the Universe; Meyer et al. 2017, PASA 34, 52
 * @example hiMass(3.6, 1000) // => 3.053376e9
 */
export function hiMass(distance: Mpc, flux: JyKmPerS): Msun {
  requirePositive(distance, 'distance (Mpc)')
  requirePositive(flux, 'H I flux (Jy km/s)')
  return HI_MASS_PER_MPC2_JY_KM_PER_S * distance ** 2 * flux
}

/**
 * Stellar mass from the absolute K magnitude, with M/L_K = 1 (Bell et al. 2003, ApJS 149, 289, as adopted in Karachentsev et al. 2013; from
 * memory) and M_sun,K = 3.27 (Willmer 2018).
 */
export function stellarMass(absK: Mag): Msun {
  requireFinite(absK, 'absolute K magnitude (mag)')
  return 10 ** (-0.4 * (absK - SUN_ABS_K_MAG))
}

/**
 * Mean colour B−K by Hubble stage: 4.10 for T < 3, 4.60 − 0.25 T to T = 8, 2.35 from 9.
 *
 * @see Karachentsev, Makarov & Kaisina 2013 (from memory)
 */
export function meanBMinusK(stage: number): Mag {
  requireFinite(stage, 'Hubble stage')
  if (stage < 3) return B_MINUS_K_EARLY_MAG
  return stage > 8 ? B_MINUS_K_LATE_MAG : 4.6 - 0.25 * stage
}

/** What is known of a galaxy's light; null where it is not. */
export interface Light {
  logMassMeasured: number | null
  absK: Mag | null
  absB: Mag | null
  absV: Mag | null
  stage: number | null
}

/** By which way a stellar mass came about. */
export type MassRoute = 'measured' | 'K' | 'B and type' | 'V'

/** log10 of the stellar mass (Msun) by the best way there is, or null without photometry. A missing stage counts as late. */
export function logStellarMass(light: Light): { value: number; route: MassRoute } | null {
  const { logMassMeasured, absK, absB, absV, stage } = light
  if (logMassMeasured !== null) return { value: logMassMeasured, route: 'measured' }
  if (absK !== null) return { value: Math.log10(stellarMass(absK)), route: 'K' }
  if (absB !== null) return { value: Math.log10(stellarMass(absB - meanBMinusK(stage ?? 10))), route: 'B and type' }
  if (absV !== null) return { value: Math.log10(stellarMass(absV - V_MINUS_K_MAG)), route: 'V' }
  return null
}
