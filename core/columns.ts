/**
 * The registry of catalogue columns. The table, the filter language, the sort, every export and the API documentation all read this one
 * list: a new column is one entry here, its derivation, and a migration. Keys are fixed: links, scripts and downloads depend on them.
 *
 * UCDs are UCD1+ words of the IVOA list; units are VOUnits.
 */
import { GALAXY_CLASSES, GALAXY_STATUSES } from './classes.ts'
import { METHOD_KEYS } from './methods.ts'

export type ColumnType = 'text' | 'choice' | 'real' | 'integer' | 'time'

export interface Column {
  key: string
  label: string
  /** As in a table head, where room is short. */
  head: string
  /** VOUnit; empty for none. */
  unit: string
  ucd: string
  type: ColumnType
  /** The choices of a `choice` column, where they are known beforehand. */
  choices?: readonly string[]
  /** Decimals printed; the full value is kept in exports that carry numbers as numbers. */
  decimals: number
  description: string
  /** Under which heading of the column chooser. */
  group: 'identity' | 'position' | 'distance' | 'velocity' | 'photometry' | 'structure' | 'gas and stars' | 'environment' | 'bookkeeping'
}

type Group = Column['group']

const text = (group: Group, key: string, label: string, head: string, ucd: string, description: string): Column =>
  ({ key, label, head, unit: '', ucd, type: 'text', decimals: 0, description, group })
const choice = (group: Group, key: string, label: string, head: string, ucd: string, choices: readonly string[] | undefined, description: string): Column =>
  ({ key, label, head, unit: '', ucd, type: 'choice', choices, decimals: 0, description, group })
const real = (group: Group, key: string, label: string, head: string, unit: string, decimals: number, ucd: string, description: string): Column =>
  ({ key, label, head, unit, ucd, type: 'real', decimals, description, group })
const integer = (group: Group, key: string, label: string, head: string, ucd: string, description: string): Column =>
  ({ key, label, head, unit: '', ucd, type: 'integer', decimals: 0, description, group })

export const HOST_RELATIONS = ['host', 'satellite', 'field'] as const
export type HostRelation = (typeof HOST_RELATIONS)[number]

export const COLUMNS: readonly Column[] = [
  text('identity', 'slug', 'Identifier', 'id', 'meta.id;meta.main', 'Stable identifier of the galaxy, as in its address'),
  text('identity', 'name', 'Name', 'Name', 'meta.id', 'Preferred designation'),
  choice('identity', 'status', 'Status', 'Status', 'meta.code.status', GALAXY_STATUSES, 'Confirmed, candidate or withdrawn'),
  choice('identity', 'class', 'Class', 'Class', 'src.morph.type', GALAXY_CLASSES, 'Class of galaxy'),
  text('identity', 'morphology', 'Morphological type', 'Type', 'src.morph.type', 'Adopted morphological type, as published'),
  real('identity', 'morph_t', 'Hubble stage T', 'T', '', 1, 'src.morph.type', 'Hubble stage on the RC3 scale'),

  real('position', 'ra', 'Right ascension', 'RA', 'deg', 5, 'pos.eq.ra;meta.main', 'Right ascension, ICRS'),
  real('position', 'dec', 'Declination', 'Dec', 'deg', 5, 'pos.eq.dec;meta.main', 'Declination, ICRS'),
  real('position', 'glon', 'Galactic longitude', 'l', 'deg', 4, 'pos.galactic.lon', 'Galactic longitude'),
  real('position', 'glat', 'Galactic latitude', 'b', 'deg', 4, 'pos.galactic.lat', 'Galactic latitude'),
  real('position', 'sgl', 'Supergalactic longitude', 'SGL', 'deg', 4, 'pos.supergalactic.lon', 'Supergalactic longitude'),
  real('position', 'sgb', 'Supergalactic latitude', 'SGB', 'deg', 4, 'pos.supergalactic.lat', 'Supergalactic latitude'),

  real('distance', 'dm', 'Distance modulus', 'μ', 'mag', 3, 'phot.mag.distMod', 'Adopted distance modulus'),
  real('distance', 'dm_err', 'Statistical error of the distance modulus', 'σ(μ)', 'mag', 3, 'stat.error;phot.mag.distMod', 'Statistical error of the adopted distance modulus'),
  real('distance', 'dm_err_sys', 'Systematic error of the distance modulus', 'σsys(μ)', 'mag', 3, 'stat.error.sys;phot.mag.distMod', 'Systematic error of the adopted distance modulus: method and anchor'),
  real('distance', 'distance', 'Distance', 'D', 'Mpc', 3, 'pos.distance', 'Adopted distance'),
  real('distance', 'distance_lo', 'Distance, lower bound', 'D−', 'Mpc', 3, 'pos.distance;stat.min', 'Adopted distance less one standard deviation, both parts'),
  real('distance', 'distance_hi', 'Distance, upper bound', 'D+', 'Mpc', 3, 'pos.distance;stat.max', 'Adopted distance plus one standard deviation, both parts'),
  choice('distance', 'distance_method', 'Distance method', 'Method', 'meta.code', METHOD_KEYS, 'Method with the largest weight in the adopted distance'),
  integer('distance', 'n_distance', 'Distance measurements used', 'n', 'meta.number', 'Distance measurements used in the adopted value'),
  integer('distance', 'n_distance_all', 'Distance measurements', 'n all', 'meta.number', 'Distance measurements held, used or not'),
  real('distance', 'sgx', 'SGX', 'SGX', 'Mpc', 3, 'pos.cartesian.x;pos.supergalactic', 'Supergalactic Cartesian x, observer at the origin'),
  real('distance', 'sgy', 'SGY', 'SGY', 'Mpc', 3, 'pos.cartesian.y;pos.supergalactic', 'Supergalactic Cartesian y, observer at the origin'),
  real('distance', 'sgz', 'SGZ', 'SGZ', 'Mpc', 3, 'pos.cartesian.z;pos.supergalactic', 'Supergalactic Cartesian z, observer at the origin'),

  real('velocity', 'v_hel', 'Heliocentric velocity', 'v☉', 'km/s', 1, 'spect.dopplerVeloc;pos.heliocentric', 'Adopted heliocentric velocity'),
  real('velocity', 'v_hel_err', 'Error of the heliocentric velocity', 'σ(v☉)', 'km/s', 1, 'stat.error;spect.dopplerVeloc', 'Error of the adopted heliocentric velocity'),
  real('velocity', 'v_gsr', 'Velocity, Galactic standard of rest', 'v GSR', 'km/s', 1, 'spect.dopplerVeloc', 'Velocity in the Galactic standard of rest'),
  real('velocity', 'v_lg', 'Velocity, Local Group rest frame', 'v LG', 'km/s', 1, 'spect.dopplerVeloc', 'Velocity relative to the Local Group centroid'),
  real('velocity', 'v_cmb', 'Velocity, CMB rest frame', 'v CMB', 'km/s', 1, 'spect.dopplerVeloc', 'Velocity in the frame of the cosmic microwave background'),

  real('photometry', 'b_mag', 'B magnitude', 'B', 'mag', 2, 'phot.mag;em.opt.B', 'Apparent B magnitude, Vega, not corrected for extinction'),
  real('photometry', 'v_mag', 'V magnitude', 'V', 'mag', 2, 'phot.mag;em.opt.V', 'Apparent V magnitude, Vega, not corrected for extinction'),
  real('photometry', 'k_mag', 'K magnitude', 'K', 'mag', 2, 'phot.mag;em.IR.K', 'Apparent K magnitude, Vega, not corrected for extinction'),
  real('photometry', 'i_mag', 'I magnitude', 'I', 'mag', 2, 'phot.mag;em.opt.I', 'Apparent I magnitude (Landolt), Vega, not corrected for extinction'),
  real('photometry', 'g_mag', 'g magnitude', 'g', 'mag', 2, 'phot.mag;em.opt.B', 'Apparent g magnitude (SDSS), AB, not corrected for extinction'),
  real('photometry', 'r_mag', 'r magnitude', 'r', 'mag', 2, 'phot.mag;em.opt.R', 'Apparent r magnitude (SDSS), AB, not corrected for extinction'),
  real('photometry', 'ebv', 'Colour excess E(B−V)', 'E(B−V)', 'mag', 3, 'phot.color.excess', 'Adopted foreground colour excess, in the convention that its source states'),
  real('photometry', 'abs_b', 'Absolute B magnitude', 'M_B', 'mag', 2, 'phys.magAbs;em.opt.B', 'Absolute B magnitude, corrected for foreground extinction'),
  real('photometry', 'abs_b_err', 'Error of the absolute B magnitude', 'σ(M_B)', 'mag', 2, 'stat.error;phys.magAbs', 'Error of the absolute B magnitude: photometry, distance (both parts) and reddening'),
  real('photometry', 'abs_v', 'Absolute V magnitude', 'M_V', 'mag', 2, 'phys.magAbs;em.opt.V', 'Absolute V magnitude, corrected for foreground extinction'),
  real('photometry', 'abs_v_err', 'Error of the absolute V magnitude', 'σ(M_V)', 'mag', 2, 'stat.error;phys.magAbs', 'Error of the absolute V magnitude: photometry, distance (both parts) and reddening'),
  real('photometry', 'abs_k', 'Absolute K magnitude', 'M_K', 'mag', 2, 'phys.magAbs;em.IR.K', 'Absolute K magnitude, corrected for foreground extinction'),
  real('photometry', 'abs_k_err', 'Error of the absolute K magnitude', 'σ(M_K)', 'mag', 2, 'stat.error;phys.magAbs', 'Error of the absolute K magnitude: photometry, distance (both parts) and reddening'),
  real('photometry', 'abs_i', 'Absolute I magnitude', 'M_I', 'mag', 2, 'phys.magAbs;em.opt.I', 'Absolute I magnitude, corrected for foreground extinction'),
  real('photometry', 'abs_i_err', 'Error of the absolute I magnitude', 'σ(M_I)', 'mag', 2, 'stat.error;phys.magAbs', 'Error of the absolute I magnitude: photometry, distance (both parts) and reddening'),
  real('photometry', 'abs_g', 'Absolute g magnitude', 'M_g', 'mag', 2, 'phys.magAbs;em.opt.B', 'Absolute g magnitude, corrected for foreground extinction'),
  real('photometry', 'abs_g_err', 'Error of the absolute g magnitude', 'σ(M_g)', 'mag', 2, 'stat.error;phys.magAbs', 'Error of the absolute g magnitude: photometry, distance (both parts) and reddening'),
  real('photometry', 'abs_r', 'Absolute r magnitude', 'M_r', 'mag', 2, 'phys.magAbs;em.opt.R', 'Absolute r magnitude, corrected for foreground extinction'),
  real('photometry', 'abs_r_err', 'Error of the absolute r magnitude', 'σ(M_r)', 'mag', 2, 'stat.error;phys.magAbs', 'Error of the absolute r magnitude: photometry, distance (both parts) and reddening'),

  real('structure', 'r_half', 'Half-light radius', 'r½', 'arcmin', 2, 'phys.angSize;stat.median', 'Semi-major half-light radius on the sky'),
  real('structure', 'axis_ratio', 'Axis ratio', 'b/a', '', 2, 'phys.size.axisRatio', 'Minor over major axis'),
  real('structure', 'position_angle', 'Position angle', 'PA', 'deg', 0, 'pos.posAng', 'Position angle of the major axis, north through east'),
  real('structure', 'r_half_pc', 'Half-light radius, semi-major', 'a½', 'pc', 0, 'phys.size.radius', 'Semi-major half-light radius'),
  real('structure', 'r_half_pc_err', 'Error of the half-light radius', 'σ(a½)', 'pc', 0, 'stat.error;phys.size.radius', 'Error of the semi-major half-light radius: angle and distance'),
  real('structure', 'r_circ_pc', 'Half-light radius, circularised', 'r½ circ', 'pc', 0, 'phys.size.radius', 'Circularised half-light radius, semi-major times the root of the axis ratio'),
  real('structure', 'r_circ_pc_err', 'Error of the circularised half-light radius', 'σ(r½ circ)', 'pc', 0, 'stat.error;phys.size.radius', 'Error of the circularised half-light radius: angle, axis ratio and distance'),
  real('structure', 'mu_half', 'Mean surface brightness', '⟨μ⟩½', 'mag/arcsec**2', 2, 'phot.mag.sb;em.opt.V', 'Mean V surface brightness inside the half-light radius, corrected for extinction'),
  real('structure', 'mu_half_err', 'Error of the mean surface brightness', 'σ⟨μ⟩½', 'mag/arcsec**2', 2, 'stat.error;phot.mag.sb', 'Error of the mean surface brightness: photometry, reddening, size and axis ratio; the distance does not enter'),
  real('structure', 'diameter', 'Isophotal diameter', 'D₂₅', 'arcmin', 2, 'phys.angSize', 'Major diameter on the sky at B = 25 mag/arcsec²'),
  real('structure', 'diameter_kpc', 'Isophotal diameter, linear', 'A₂₅', 'kpc', 2, 'phys.size.diameter', 'Major diameter at B = 25 mag/arcsec²'),
  real('structure', 'diameter_kpc_err', 'Error of the isophotal diameter', 'σ(A₂₅)', 'kpc', 2, 'stat.error;phys.size.diameter', 'Error of the isophotal diameter: angle and distance'),

  real('gas and stars', 'hi_flux', 'H I flux', 'S(H I)', 'Jy.km/s', 2, 'phot.flux', 'Integrated H I flux'),
  real('gas and stars', 'w50', 'H I line width', 'W₅₀', 'km/s', 0, 'spect.line.width', 'H I line width at half the peak'),
  real('gas and stars', 'log_mhi', 'H I mass, log', 'log M(H I)', '', 2, 'phys.mass', 'Decimal logarithm of the H I mass in solar masses'),
  real('gas and stars', 'log_mhi_err', 'Error of the H I mass, log', 'σ(log M(H I))', '', 2, 'stat.error;phys.mass', 'Error of the logarithm of the H I mass: flux and distance'),
  real('gas and stars', 'log_mstar', 'Stellar mass, log', 'log M★', '', 2, 'phys.mass', 'Decimal logarithm of the stellar mass in solar masses'),
  real('gas and stars', 'log_mstar_err', 'Error of the stellar mass, log', 'σ(log M★)', '', 2, 'stat.error;phys.mass', 'Error of the logarithm of the stellar mass: photometry and distance; mass-to-light ratio and mean colours are taken as exact'),
  real('gas and stars', 'metallicity', 'Metallicity [Fe/H]', '[Fe/H]', '', 2, 'phys.abund.Fe', 'Mean stellar metallicity, dex'),

  choice('environment', 'host', 'Host', 'Host', 'meta.id.parent', undefined, 'Identifier of the host that the galaxy is a satellite of'),
  choice('environment', 'host_relation', 'Host or satellite', 'Relation', 'meta.code', HOST_RELATIONS, 'Host of satellites, satellite, or in the field'),
  real('environment', 'host_probability', 'Membership probability', 'P', '', 2, 'stat.probability', 'Fraction of draws from the distance errors in which the assignment (satellite of this host, or in the field) holds'),
  real('environment', 'tidal_index', 'Tidal index', 'Θ', '', 2, 'stat.value', 'Tidal index over all neighbours; above 0 within a neighbour’s reach'),
  choice('environment', 'main_disturber', 'Main disturber', 'Disturber', 'meta.id.assoc', undefined, 'Galaxy with the largest tidal influence among those enough more massive'),
  real('environment', 'host_sep', 'Separation from the host', 'r', 'kpc', 0, 'pos.distance', '3-D separation from the main disturber, of the adopted distances'),
  real('environment', 'host_sep_median', 'Separation, median', 'r½', 'kpc', 0, 'pos.distance;stat.median', 'Median of the 3-D separation from the main disturber, distance errors drawn'),
  real('environment', 'host_sep_lo', 'Separation, lower bound', 'r−', 'kpc', 0, 'pos.distance;stat.min', '16th percentile of the separation'),
  real('environment', 'host_sep_hi', 'Separation, upper bound', 'r+', 'kpc', 0, 'pos.distance;stat.max', '84th percentile of the separation'),
  real('environment', 'host_angle', 'Angle from the host', 'θ', 'deg', 2, 'pos.angDistance', 'Angle on the sky from the main disturber'),
  real('environment', 'host_dv', 'Velocity against the host', 'Δv', 'km/s', 1, 'spect.dopplerVeloc', 'Velocity less that of the main disturber, Galactic standard of rest'),
  real('environment', 'host_dv_err', 'Error of the velocity against the host', 'σ(Δv)', 'km/s', 1, 'stat.error;spect.dopplerVeloc', 'Error of the velocity difference, from those of both velocities'),

  integer('bookkeeping', 'n_measurements', 'Measurements', 'Meas.', 'meta.number', 'Measurements held, all quantities'),
  integer('bookkeeping', 'n_sources', 'Sources', 'Sources', 'meta.number', 'Sources that the measurements come from'),
  integer('bookkeeping', 'revision', 'Last changed in revision', 'Rev.', 'meta.version', 'Revision in which this row last changed'),
  { key: 'updated_at', label: 'Last changed', head: 'Changed', unit: '', ucd: 'time.processing', type: 'time', decimals: 0, description: 'When this row last changed, UTC', group: 'bookkeeping' },
]

export type CatalogueValue = string | number | null

/** One row of the catalogue: a value or null under every column key, missing where a request did not ask for the column. */
export type CatalogueRow = Record<string, CatalogueValue>

const byKey = new Map(COLUMNS.map((c) => [c.key, c]))

/** The column with this key, or undefined. */
export function columnOf(key: string): Column | undefined {
  return byKey.get(key)
}

/** The columns that a table shows before anybody chooses. */
export const DEFAULT_COLUMNS: readonly string[] = [
  'name', 'class', 'distance', 'distance_method', 'abs_v', 'abs_b', 'host', 'host_relation', 'host_sep', 'host_probability', 'tidal_index', 'v_lg', 'n_measurements',
]
