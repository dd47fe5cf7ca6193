/**
 * The columns that follow from a galaxy's own adopted values. A missing value makes what depends on it null, never a number.
 */
import type { Adopted } from '../adoption/adopted.ts'
import { distanceOf } from '../astro/distance.ts'
import { convert, supergalacticPosition } from '../astro/frames.ts'
import { absoluteMagnitude, extinction, meanSurfaceBrightness, type Band } from '../astro/magnitudes.ts'
import { hiMass, logStellarMass } from '../astro/masses.ts'
import { circularisedPc, semiMajorPc } from '../astro/sizes.ts'
import { velocityCmb, velocityGsr, velocityLocalGroup } from '../astro/velocities.ts'
import type { Galaxy, Measurement } from '../catalogue/types.ts'
import type { CatalogueValue } from '../columns.ts'
import type { QuantityKey, ReddeningConvention } from '../quantities.ts'

/** Columns of core/columns.ts that do not depend on other galaxies. */
export type OwnColumns = Readonly<Record<string, CatalogueValue>>

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
    ...gas(value('distance_modulus'), value('hi_flux')),
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

function light(adopted: AdoptedValues, measurements: readonly Measurement[]): OwnColumns {
  const value = (key: QuantityKey): number | null => adopted.get(key)?.value ?? null
  const modulus = value('distance_modulus')
  const ebv = value('ebv')
  const convention = conventionOf(adopted.get('ebv'), measurements)
  const dust = (band: Band): number => (ebv === null || convention === null ? 0 : extinction(band, ebv, convention))
  const absolute = (band: Band, m: number | null): number | null => (m === null || modulus === null ? null : absoluteMagnitude(m, modulus, dust(band)))
  const absB = absolute('B', value('b_mag'))
  const absV = absolute('V', value('v_mag'))
  const absK = absolute('K', value('k_mag'))
  const mass = logStellarMass({ logMassMeasured: value('log_mstar'), absK, absB, absV, stage: value('morph_t') })
  const semiMajor = value('r_half')
  const ratio = value('axis_ratio')
  const v = value('v_mag')
  const distance = modulus === null ? null : distanceOf(modulus)
  const sized = distance !== null && semiMajor !== null && semiMajor > 0
  return {
    b_mag: value('b_mag'), v_mag: v, k_mag: value('k_mag'), ebv, abs_b: absB, abs_v: absV, abs_k: absK,
    r_half: semiMajor, axis_ratio: ratio, position_angle: value('position_angle'),
    r_half_pc: sized ? semiMajorPc(distance, semiMajor) : null,
    r_circ_pc: sized && ratio !== null && ratio > 0 ? circularisedPc(distance, semiMajor, ratio) : null,
    mu_half: v !== null && semiMajor !== null && semiMajor > 0 && ratio !== null && ratio > 0 ? meanSurfaceBrightness(v - dust('V'), semiMajor, ratio) : null,
    log_mstar: mass?.value ?? null,
  }
}

function gas(modulus: number | null, flux: number | null): OwnColumns {
  return { hi_flux: flux, log_mhi: modulus !== null && flux !== null && flux > 0 ? Math.log10(hiMass(distanceOf(modulus), flux)) : null }
}

/** The convention that the adopted E(B−V) follows: that of the measurement it comes from. */
function conventionOf(adopted: Adopted | undefined, measurements: readonly Measurement[]): ReddeningConvention | null {
  const used = adopted?.reasons.find((r) => r.used)
  return measurements.find((m) => m.id === used?.measurementId)?.convention ?? null
}
