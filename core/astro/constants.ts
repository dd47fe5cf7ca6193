/** Every physical constant of the application, once: unit in the name, source beside it. */

/** Speed of light, km/s: exact by definition of the metre (SI). */
export const SPEED_OF_LIGHT_KM_PER_S = 299_792.458

/** Million light-years a Mpc: the au and parsec of IAU 2012 B2 and 2015 B2, the Julian year of 365.25 days. */
export const MLY_PER_MPC = 3.2615637771674333

/**
 * Gravitational constant, Mpc (km/s)² per solar mass: from GM_sun = 1.3271244e20 m³/s² (IAU 2015 resolution B3) and
 * 1 pc = 3.0856775814913673e16 m (IAU 2012 B2, 2015 B2).
 */
export const GRAVITATION_MPC_KM2_PER_S2_MSUN = 4.300917270036e-9

/** 1 / (km/s/Mpc) in units of 10⁹ years of 365.25 days. */
export const HUBBLE_TIME_GYR_KM_PER_S_MPC = 977.7922216807891

/** One radian in arcseconds: 180 × 3600 / π. */
export const ARCSEC_PER_RAD = 206_264.80624709636

/** Galactic coordinates of the supergalactic pole, deg: de Vaucouleurs et al. 1991, Third Reference Catalogue (RC3). */
export const SUPERGALACTIC_POLE_GALACTIC_DEG = { lon: 47.37, lat: 6.32 } as const

/** Hubble constant, km/s/Mpc, and matter density of a flat universe: Planck Collaboration VI 2020, A&A 641, A6 (from memory). */
export const PLANCK_HUBBLE_KM_PER_S_MPC = 67.4
export const PLANCK_OMEGA_MATTER = 0.315

/** Absolute magnitude of the Sun, Vega system: Willmer 2018, ApJS 236, 47. */
export const SUN_ABS_B_MAG = 5.44
export const SUN_ABS_V_MAG = 4.81
export const SUN_ABS_K_MAG = 3.27

/** H I mass per distance² and flux, solar masses / (Mpc² Jy km/s): Roberts 1975; Meyer et al. 2017, PASA 34, 52. */
export const HI_MASS_PER_MPC2_JY_KM_PER_S = 2.356e5

/** Constant of the tidal index for stellar masses in Msun and separations in Mpc: Karachentsev et al. 2013, AJ 145, 101 (from memory). */
export const TIDAL_INDEX_CONSTANT = -10.96

/** Velocity of the Sun in the Galactic standard of rest, km/s (toward the centre, rotation, the pole): Drimmel & Poggio 2018, RNAAS 2, 210. */
export const SUN_GSR_KM_PER_S = [12.9, 245.6, 7.78] as const

/** Solar apex in the Local Group: Karachentsev & Makarov 1996, AJ 111, 794. */
export const SUN_LOCAL_GROUP = { speedKmPerS: 316, lonDeg: 93, latDeg: -4 } as const

/** Dipole of the cosmic microwave background: Planck Collaboration I 2020, A&A 641, A1. */
export const SUN_CMB = { speedKmPerS: 369.82, lonDeg: 264.021, latDeg: 48.253 } as const

/**
 * A/E(B−V) for a true reddening with R_V = 3.1: Cardelli, Clayton & Mathis 1989, ApJ 345, 245. B and K from its curve, from memory; I, g and r are
 * 3.1 times the A/A(V) of Schlegel, Finkbeiner & Davis 1998, ApJ 500, 525, table 6 (0.594, 1.161, 0.843; from memory).
 */
export const EXTINCTION_PER_TRUE_REDDENING = { B: 4.1, V: 3.1, I: 1.841, K: 0.354, g: 3.599, r: 2.613 } as const

/** A/E(B−V) for the value of the SFD map, R_V = 3.1: Schlafly & Finkbeiner 2011, ApJ 737, 103, table 6 (Landolt, SDSS); UKIRT K from memory. */
export const EXTINCTION_PER_SFD_VALUE = { B: 3.626, V: 2.742, I: 1.505, K: 0.302, g: 3.303, r: 2.285 } as const

/**
 * Mean colour B−K by Hubble stage T and V−K, for stellar masses where K was not measured: Karachentsev, Makarov & Kaisina 2013, AJ 145, 101
 * (from memory).
 */
export const B_MINUS_K_EARLY_MAG = 4.1
export const B_MINUS_K_LATE_MAG = 2.35
export const V_MINUS_K_MAG = 2.3
