/** Apparent and absolute magnitudes, foreground extinction, surface brightness. B, V, I and K in the Vega system, g and r in the AB system. */
import type { ReddeningConvention } from '../quantities.ts'
import { ARCSEC_PER_RAD, EXTINCTION_PER_SFD_VALUE, EXTINCTION_PER_TRUE_REDDENING } from './constants.ts'
import { requireFinite, requirePositive, requireWithin, type Arcmin, type Mag } from './units.ts'

export type Band = 'B' | 'V' | 'I' | 'K' | 'g' | 'r'

/** Extinction per unit of E(B−V), by what kind of E(B−V) it is: the two differ by 13 % in A_V. */
export function extinctionPerReddening(band: Band, convention: ReddeningConvention): number {
  return (convention === 'sfd' ? EXTINCTION_PER_SFD_VALUE : EXTINCTION_PER_TRUE_REDDENING)[band]
}

/**
 * Foreground extinction in a band, mag.
 *
 * @param ebv - E(B−V), mag, not negative
 * @param convention - what kind of E(B−V) it is
 */
export function extinction(band: Band, ebv: Mag, convention: ReddeningConvention): Mag {
  requireWithin(ebv, 0, 100, 'E(B−V) (mag)')
  return ebv * extinctionPerReddening(band, convention)
}

/** M = m − μ − A. */
export function absoluteMagnitude(apparent: Mag, modulus: Mag, extinctionInBand: Mag = 0): Mag {
  requireFinite(apparent, 'apparent magnitude (mag)')
  requireFinite(modulus, 'distance modulus (mag)')
  return apparent - modulus - extinctionInBand
}

/**
 * Mean surface brightness inside the half-light ellipse, mag/arcsec²: m + 2.5 log10(2 π a b), half of the light over its area.
 *
 * @param total - total magnitude, extinction-corrected where wanted
 * @param semiMajor - half-light semi-major axis, arcmin
 * @param axisRatio - b/a, in (0, 1]
 * @see Graham & Driver 2005, PASA 22, 118
 */
export function meanSurfaceBrightness(total: Mag, semiMajor: Arcmin, axisRatio: number): Mag {
  requireFinite(total, 'total magnitude (mag)')
  requirePositive(semiMajor, 'half-light semi-major axis (arcmin)')
  requireWithin(axisRatio, Number.MIN_VALUE, 1, 'axis ratio')
  const arcsec = semiMajor * 60
  return total + 2.5 * Math.log10(2 * Math.PI * arcsec ** 2 * axisRatio)
}

/** The same from absolute magnitude and size: M + 36.5721... + 2.5 log10(2 π a² b/a), a in kpc. */
export function meanSurfaceBrightnessFromAbsolute(absolute: Mag, semiMajorKpc: number, axisRatio: number): Mag {
  requirePositive(semiMajorKpc, 'half-light semi-major axis (kpc)')
  // One kpc at 10 pc subtends 100 rad in the small-angle sense.
  const offset = 5 * Math.log10(ARCSEC_PER_RAD * 100)
  return absolute + offset + 2.5 * Math.log10(2 * Math.PI * semiMajorKpc ** 2 * axisRatio)
}
