/**
 * The columns that follow from a galaxy's own adopted values. A missing value makes what depends on it null, never a number.
 */
import type { Adopted } from '../adoption/adopted.ts'
import { distanceOf } from '../astro/distance.ts'
import { convert, supergalacticPosition } from '../astro/frames.ts'
import { absoluteMagnitude, extinction, extinctionPerReddening, meanSurfaceBrightness, type Band } from '../astro/magnitudes.ts'
import { hiMass, logStellarMass } from '../astro/masses.ts'
import { circularisedPc, diameterKpc, semiMajorPc } from '../astro/sizes.ts'
import { velocityCmb, velocityGsr, velocityLocalGroup } from '../astro/velocities.ts'
import type { Galaxy, Measurement } from '../catalogue/types.ts'
import type { CatalogueValue } from '../columns.ts'
import type { QuantityKey, ReddeningConvention } from '../quantities.ts'
import { correctionError, errorOf, inQuadrature, relativeLengthError, times } from './carried-errors.ts'

/** Columns of core/columns.ts that do not depend on other galaxies. */
export type OwnColumns = Readonly<Record<string, CatalogueValue>>

/** What a relative error of a light or an area is in magnitudes. */
const MAG_PER_RELATIVE = 2.5 / Math.LN10

export type AdoptedValues = ReadonlyMap<QuantityKey, Adopted>

/** @param measurements - all that are held of this galaxy, used or not */
export function deriveOwn(galaxy: Galaxy, adopted: AdoptedValues, measurements: readonly Measurement[]): OwnColumns {
  const value = (key: QuantityKey): number | null => adopted.get(key)?.value ?? null
  return {
    slug: galaxy.slug,
    name: galaxy.designation,
    status: galaxy.status,
    class: galaxy.class,
    morphology: adopted.get('morphology')?.textValue ?? null,
    morph_t: value('morph_t'),
    ...positions(galaxy),
    ...distances(galaxy, adopted.get('distance_modulus'), measurements),
    ...velocities(galaxy, adopted.get('velocity')),
    ...light(adopted, measurements),
    ...gas(adopted.get('distance_modulus'), adopted.get('hi_flux')),
    w50: value('w50'),
    metallicity: value('metallicity'),
    n_measurements: measurements.length,
    n_sources: new Set(measurements.map((m) => m.sourceId)).size,
  }
}

function positions({ ra, dec }: Galaxy): OwnColumns {
  const galactic = convert(ra, dec, 'equatorial', 'galactic')
  const supergalactic = convert(ra, dec, 'equatorial', 'supergalactic')
  return { ra, dec, glon: galactic.lon, glat: galactic.lat, sgl: supergalactic.lon, sgb: supergalactic.lat }
}

function distances({ ra, dec }: Galaxy, adopted: Adopted | undefined, measurements: readonly Measurement[]): OwnColumns {
  const all = measurements.filter((m) => m.quantity === 'distance_modulus').length
  const modulus = adopted?.value ?? null
  if (!adopted || modulus === null) {
    return {
      dm: null, dm_err: null, dm_err_sys: null, distance: null, distance_lo: null, distance_hi: null, distance_method: null, n_distance: 0, n_distance_all: all,
      sgx: null, sgy: null, sgz: null,
    }
  }
  const distance = distanceOf(modulus)
  const [sgx, sgy, sgz] = supergalacticPosition(ra, dec, distance)
  const both = (stat: number | null): number => Math.hypot(stat ?? 0, adopted.errSys ?? 0)
  return {
    dm: modulus, dm_err: adopted.errPlus, dm_err_sys: adopted.errSys, distance, distance_lo: distanceOf(modulus - both(adopted.errMinus)),
    distance_hi: distanceOf(modulus + both(adopted.errPlus)), distance_method: adopted.method, n_distance: adopted.nUsed, n_distance_all: all, sgx, sgy, sgz,
  }
}

function velocities({ ra, dec }: Galaxy, adopted: Adopted | undefined): OwnColumns {
  const v = adopted?.value ?? null
  if (v === null) return { v_hel: null, v_hel_err: null, v_gsr: null, v_lg: null, v_cmb: null }
  const { lon, lat } = convert(ra, dec, 'equatorial', 'galactic')
  return { v_hel: v, v_hel_err: adopted?.errPlus ?? null, v_gsr: velocityGsr(v, lon, lat), v_lg: velocityLocalGroup(v, lon, lat), v_cmb: velocityCmb(v, lon, lat) }
}

/** The bands, with what their columns are called. */
const BANDS = [['B', 'b'], ['V', 'v'], ['K', 'k'], ['I', 'i'], ['g', 'g'], ['r', 'r']] as const satisfies readonly (readonly [Band, string])[]

function light(adopted: AdoptedValues, measurements: readonly Measurement[]): OwnColumns {
  const modulus = adopted.get('distance_modulus')
  const ebv = adopted.get('ebv')
  const convention = conventionOf(ebv, measurements)
  const dust = (band: Band): number => (ebv?.value == null || convention === null ? 0 : extinction(band, ebv.value, convention))
  const perReddening = (band: Band): number => (ebv?.value == null || convention === null ? 0 : extinctionPerReddening(band, convention))
  const columns: Record<string, number | null> = { ebv: ebv?.value ?? null }
  for (const [band, key] of BANDS) {
    const apparent = adopted.get(`${key}_mag`)
    const m = apparent?.value ?? null
    const mu = modulus?.value ?? null
    columns[`${key}_mag`] = m
    columns[`abs_${key}`] = m === null || mu === null ? null : absoluteMagnitude(m, mu, dust(band))
    columns[`abs_${key}_err`] = columns[`abs_${key}`] === null ? null : inQuadrature(errorOf(apparent), errorOf(modulus), perReddening(band) * correctionError(ebv))
  }
  return { ...columns, ...structure(adopted, dust('V'), perReddening('V')), ...stars(adopted, columns) }
}

/** @param dustV, perReddening - A_V, and A_V / E(B−V); 0 where there is no reddening to correct for */
function structure(adopted: AdoptedValues, dustV: number, perReddening: number): OwnColumns {
  const modulus = adopted.get('distance_modulus')
  const distance = modulus?.value == null ? null : distanceOf(modulus.value)
  const half = adopted.get('r_half')
  const shape = adopted.get('axis_ratio')
  const semiMajor = half?.value ?? null
  const ratio = shape?.value ?? null
  const lengths = semiMajor !== null && semiMajor > 0 && distance !== null ? semiMajorPc(distance, semiMajor) : null
  const circularised = lengths !== null && semiMajor !== null && distance !== null && ratio !== null && ratio > 0 ? circularisedPc(distance, semiMajor, ratio) : null
  const relative = semiMajor === null ? null : relativeLengthError(errorOf(modulus), errorOf(half), semiMajor)
  return {
    r_half: semiMajor, axis_ratio: ratio, position_angle: adopted.get('position_angle')?.value ?? null,
    r_half_pc: lengths, r_half_pc_err: lengths === null ? null : times(relative, lengths),
    r_circ_pc: circularised,
    // It goes with the root of the axis ratio.
    r_circ_pc_err: circularised === null || ratio === null ? null : times(inQuadrature(relative, correctionError(shape) / (2 * ratio)), circularised),
    ...surfaceBrightness(adopted, dustV, perReddening),
    ...isophotal(adopted, distance),
  }
}

function surfaceBrightness(adopted: AdoptedValues, dustV: number, perReddening: number): OwnColumns {
  const [v, half, shape, ebv] = [adopted.get('v_mag'), adopted.get('r_half'), adopted.get('axis_ratio'), adopted.get('ebv')]
  const [m, semiMajor, ratio] = [v?.value ?? null, half?.value ?? null, shape?.value ?? null]
  if (m === null || semiMajor === null || ratio === null || semiMajor <= 0 || ratio <= 0) return { mu_half: null, mu_half_err: null }
  return {
    mu_half: meanSurfaceBrightness(m - dustV, semiMajor, ratio),
    // 2.5 log10(a² b/a); the distance does not enter.
    mu_half_err: inQuadrature(errorOf(v), perReddening * correctionError(ebv), times(errorOf(half), MAG_PER_RELATIVE * 2 / semiMajor), (MAG_PER_RELATIVE * correctionError(shape)) / ratio),
  }
}

function isophotal(adopted: AdoptedValues, distance: number | null): OwnColumns {
  const measured = adopted.get('diameter')
  const diameter = measured?.value ?? null
  if (diameter === null || diameter <= 0 || distance === null) return { diameter, diameter_kpc: null, diameter_kpc_err: null }
  const length = diameterKpc(distance, diameter / 60)
  return { diameter, diameter_kpc: length, diameter_kpc_err: times(relativeLengthError(errorOf(adopted.get('distance_modulus')), errorOf(measured), diameter), length) }
}

/** @param columns - absolute magnitudes with their errors */
function stars(adopted: AdoptedValues, columns: Readonly<Record<string, number | null>>): OwnColumns {
  const measured = adopted.get('log_mstar')
  const mass = logStellarMass({
    logMassMeasured: measured?.value ?? null, absK: columns.abs_k ?? null, absB: columns.abs_b ?? null, absV: columns.abs_v ?? null, stage: adopted.get('morph_t')?.value ?? null,
  })
  if (!mass) return { log_mstar: null, log_mstar_err: null }
  // log M = −0.4 M_band + a constant; what a measured mass took for the distance is its authors'.
  const err = { 'measured': errorOf(measured), 'K': times(columns.abs_k_err ?? null, 0.4), 'B and type': times(columns.abs_b_err ?? null, 0.4), 'V': times(columns.abs_v_err ?? null, 0.4) }[mass.route]
  return { log_mstar: mass.value, log_mstar_err: err }
}

function gas(modulus: Adopted | undefined, measured: Adopted | undefined): OwnColumns {
  const flux = measured?.value ?? null
  if (modulus?.value == null || flux === null || flux <= 0) return { hi_flux: flux, log_mhi: null, log_mhi_err: null }
  // log D² = 0.4 μ + a constant.
  return { hi_flux: flux, log_mhi: Math.log10(hiMass(distanceOf(modulus.value), flux)), log_mhi_err: inQuadrature(times(errorOf(modulus), 0.4), times(errorOf(measured), 1 / (flux * Math.LN10))) }
}

/** The convention that the adopted E(B−V) follows: that of the measurement it comes from. */
function conventionOf(adopted: Adopted | undefined, measurements: readonly Measurement[]): ReddeningConvention | null {
  const used = adopted?.reasons.find((r) => r.used)
  return measurements.find((m) => m.id === used?.measurementId)?.convention ?? null
}
