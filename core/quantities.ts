/**
 * The registry of what can be measured. Entry forms, import, checks, adoption and the galaxy page all read this one list.
 *
 * Values are stored in the canonical unit; what was published (other units among it) is kept beside them.
 */
export const QUANTITY_KEYS = [
  'distance_modulus',
  'velocity',
  'b_mag',
  'v_mag',
  'k_mag',
  'i_mag',
  'g_mag',
  'r_mag',
  'ebv',
  'r_half',
  'diameter',
  'axis_ratio',
  'position_angle',
  'hi_flux',
  'w50',
  'metallicity',
  'morphology',
  'morph_t',
  'log_mstar',
] as const

export type QuantityKey = (typeof QUANTITY_KEYS)[number]

/** How the adopted value comes from the measurements (core/adoption). */
export type AdoptionRule = 'distance' | 'weighted-mean' | 'smallest-error' | 'newest'

export interface AcceptedUnit {
  unit: string
  /** Other spellings, lower case. */
  names: readonly string[]
  /** From this unit to the canonical one. Must rise with its argument or fall, never both. */
  toCanonical: (value: number) => number
}

export interface Quantity {
  key: QuantityKey
  label: string
  /** As in a table head: μ, v☉, B ... */
  symbol: string
  /** Canonical unit; empty for a pure number or a text. */
  unit: string
  kind: 'number' | 'text'
  adoption: AdoptionRule
  /** Values outside are refused: no galaxy of the Local Volume can have them. Canonical unit. */
  bounds: readonly [number, number]
  /** Error bars outside are suspicious (core/checks). Canonical unit. */
  errorBounds?: readonly [number, number]
  decimals: number
  units: readonly AcceptedUnit[]
  /** Words by which a column or a row of a table means this quantity, lower case, letters and digits only. */
  names: readonly string[]
  /** Whether a measurement must name the distance method. */
  needsMethod?: boolean
  /** Whether a measurement must say which convention it follows. */
  conventions?: readonly ReddeningConvention[]
}

/**
 * E(B−V) as a true reddening (A_V = 3.1 E; Cardelli, Clayton & Mathis 1989) or as the value of the Schlegel, Finkbeiner & Davis map
 * (A_V = 2.742 E; Schlafly & Finkbeiner 2011): 13 % apart, so a measurement states which.
 */
export type ReddeningConvention = 'true' | 'sfd'

const identity = (x: number): number => x
const same = (unit: string, ...names: string[]): AcceptedUnit => ({ unit, names: [unit.toLowerCase(), ...names], toCanonical: identity })
const modulusOf = (perMpc: number) => (d: number) => 5 * Math.log10(d / perMpc) + 25

/** Total apparent magnitudes, not corrected for extinction: B, V, I (Landolt) and K in the Vega system, g and r (SDSS) in the AB system. */
const magnitude = (band: 'B' | 'V' | 'K' | 'I' | 'g' | 'r', key: QuantityKey, names: string[]): Quantity => ({
  key,
  label: `${band} magnitude`,
  symbol: band,
  unit: 'mag',
  kind: 'number',
  adoption: 'smallest-error',
  bounds: [-3, 26],
  errorBounds: [0.001, 2],
  decimals: 2,
  units: [same('mag', 'magnitude', '')],
  names,
})

export const QUANTITIES: readonly Quantity[] = [
  {
    key: 'distance_modulus', label: 'Distance modulus', symbol: 'μ', unit: 'mag', kind: 'number', adoption: 'distance',
    bounds: [14, 33], errorBounds: [0.003, 1.5], decimals: 3, needsMethod: true,
    units: [
      same('mag', 'magnitude', ''),
      { unit: 'Mpc', names: ['mpc'], toCanonical: modulusOf(1) },
      { unit: 'kpc', names: ['kpc'], toCanonical: modulusOf(1000) },
    ],
    names: ['distance modulus', 'distance', 'dm', 'mu', 'modulus', 'dist', 'm m 0', 'm m'],
  },
  {
    key: 'velocity', label: 'Heliocentric velocity', symbol: 'v', unit: 'km/s', kind: 'number', adoption: 'weighted-mean',
    bounds: [-800, 3000], errorBounds: [0.05, 100], decimals: 1,
    units: [same('km/s', 'km s-1', 'km s^-1', 'kms', ''), { unit: 'm/s', names: ['m/s'], toCanonical: (v) => v / 1000 }],
    names: ['heliocentric velocity', 'velocity', 'v hel', 'vhel', 'vh', 'v helio', 'radial velocity', 'cz', 'rv'],
  },
  magnitude('B', 'b_mag', ['b magnitude', 'b mag', 'b', 'bmag', 'bt', 'b t']),
  magnitude('V', 'v_mag', ['v magnitude', 'v mag', 'vmag', 'vt', 'v t', 'mv']),
  magnitude('K', 'k_mag', ['ks magnitude', 'k magnitude', 'k mag', 'ks mag', 'kmag', 'ksmag', 'ks', 'k', 'k s']),
  magnitude('I', 'i_mag', ['i magnitude', 'i mag', 'imag', 'ic', 'i c', 'it', 'i t']),
  magnitude('g', 'g_mag', ['g magnitude', 'g mag', 'gmag', 'g']),
  magnitude('r', 'r_mag', ['r magnitude', 'r mag', 'rmag']),
  {
    key: 'ebv', label: 'Colour excess E(B−V)', symbol: 'E(B−V)', unit: 'mag', kind: 'number', adoption: 'smallest-error',
    bounds: [0, 5], errorBounds: [0.0005, 1], decimals: 3, conventions: ['true', 'sfd'],
    units: [same('mag', 'magnitude', '')],
    names: ['ebv', 'e b v', 'reddening', 'colour excess', 'color excess'],
  },
  {
    key: 'r_half', label: 'Half-light radius (semi-major)', symbol: 'r½', unit: 'arcmin', kind: 'number', adoption: 'smallest-error',
    bounds: [0.005, 400], errorBounds: [0.0005, 60], decimals: 2,
    units: [
      same('arcmin', 'arcminute', "'", '′', ''),
      { unit: 'arcsec', names: ['arcsec', 'arcsecond', '"', '″'], toCanonical: (x) => x / 60 },
      { unit: 'deg', names: ['deg', 'degree', '°'], toCanonical: (x) => x * 60 },
    ],
    names: ['half light radius', 'r half', 'rhalf', 'rh', 'r h', 'r eff', 'reff', 're'],
  },
  {
    key: 'diameter', label: 'Isophotal diameter (major axis, B = 25 mag/arcsec²)', symbol: 'D₂₅', unit: 'arcmin', kind: 'number', adoption: 'smallest-error',
    bounds: [0.01, 800], errorBounds: [0.001, 100], decimals: 2,
    units: [
      same('arcmin', 'arcminute', "'", '′', ''),
      { unit: 'arcsec', names: ['arcsec', 'arcsecond', '"', '″'], toCanonical: (x) => x / 60 },
      { unit: 'deg', names: ['deg', 'degree', '°'], toCanonical: (x) => x * 60 },
    ],
    names: ['d25', 'd 25', 'isophotal diameter', 'angular diameter', 'major diameter', 'diameter'],
  },
  {
    key: 'axis_ratio', label: 'Axis ratio b/a', symbol: 'b/a', unit: '', kind: 'number', adoption: 'smallest-error',
    bounds: [0.02, 1], errorBounds: [0.001, 0.5], decimals: 2,
    units: [same('', 'none', 'b/a'), { unit: 'ellipticity', names: ['ellipticity', '1-b/a'], toCanonical: (e) => 1 - e }],
    names: ['axis ratio', 'b a', 'ba', 'q'],
  },
  {
    key: 'position_angle', label: 'Position angle', symbol: 'PA', unit: 'deg', kind: 'number', adoption: 'smallest-error',
    bounds: [0, 180], errorBounds: [0.1, 90], decimals: 0, units: [same('deg', 'degree', '°', '')],
    names: ['position angle', 'pa', 'posang'],
  },
  {
    key: 'hi_flux', label: 'H I flux', symbol: 'S(H I)', unit: 'Jy km/s', kind: 'number', adoption: 'smallest-error',
    bounds: [0.0001, 1e6], errorBounds: [0.00001, 1e5], decimals: 2,
    units: [same('Jy km/s', 'jykm/s', 'jy km s-1', ''), { unit: 'mJy km/s', names: ['mjy km/s'], toCanonical: (x) => x / 1000 }],
    names: ['hi flux', 'h i flux', 'fhi', 'shi', 'hi'],
  },
  {
    key: 'w50', label: 'H I line width W50', symbol: 'W₅₀', unit: 'km/s', kind: 'number', adoption: 'smallest-error',
    bounds: [1, 900], errorBounds: [0.1, 100], decimals: 0, units: [same('km/s', 'km s-1', '')],
    names: ['w50', 'w 50', 'line width', 'hi line width'],
  },
  {
    key: 'metallicity', label: 'Metallicity [Fe/H]', symbol: '[Fe/H]', unit: 'dex', kind: 'number', adoption: 'smallest-error',
    bounds: [-5, 1], errorBounds: [0.005, 1], decimals: 2, units: [same('dex', '')],
    names: ['metallicity', 'fe h', 'feh'],
  },
  {
    key: 'morphology', label: 'Morphological type', symbol: 'type', unit: '', kind: 'text', adoption: 'newest',
    bounds: [0, 0], decimals: 0, units: [same('')], names: ['morphology', 'type', 'morph', 'morphological type'],
  },
  {
    key: 'morph_t', label: 'Hubble stage T', symbol: 'T', unit: '', kind: 'number', adoption: 'newest',
    bounds: [-6, 11], decimals: 1, units: [same('')], names: ['numerical type t', 't', 't type', 'hubble stage', 'hubble stage t', 'morph t'],
  },
  {
    key: 'log_mstar', label: 'Stellar mass, log', symbol: 'log M★', unit: 'dex(Msun)', kind: 'number', adoption: 'smallest-error',
    bounds: [1, 13], errorBounds: [0.005, 1], decimals: 2,
    units: [same('dex(Msun)', 'dex', 'log msun', ''), { unit: 'Msun', names: ['msun', 'm sun', 'solar masses'], toCanonical: Math.log10 }],
    names: ['stellar mass', 'log mstar', 'mstar', 'log stellar mass', 'm star'],
  },
]

const byKey = new Map(QUANTITIES.map((q) => [q.key, q]))

/** The quantity with this key. @throws RangeError when there is none. */
export function quantity(key: string): Quantity {
  const found = byKey.get(key as QuantityKey)
  if (!found) throw new RangeError(`no quantity has the key "${key}"`)
  return found
}

/** The quantity that a column head or a word in a table means, or undefined. */
export function quantityNamed(name: string): Quantity | undefined {
  const wanted = name.toLowerCase().replace(/[^a-z0-9]+/g, ' ').trim()
  return QUANTITIES.find((q) => q.key === name || q.names.includes(wanted))
}

/** The accepted unit that a word means for this quantity (the canonical one for an empty word), or undefined. */
export function acceptedUnit(q: Quantity, word: string): AcceptedUnit | undefined {
  const wanted = word.trim().toLowerCase()
  return q.units.find((u) => u.names.includes(wanted))
}

export interface PublishedValue {
  value: number
  errPlus: number | null
  errMinus: number | null
  errSys: number | null
  unit: string
}

/**
 * A published value in the canonical unit of its quantity, error bars carried through the exact map (so a symmetric error in Mpc becomes
 * an asymmetric one in magnitudes); bars that the map would make infinite become null.
 *
 * @throws RangeError when the quantity does not accept the unit
 */
export function toCanonical(q: Quantity, published: PublishedValue): Omit<PublishedValue, 'unit'> {
  const accepted = acceptedUnit(q, published.unit)
  if (!accepted) throw new RangeError(`${q.label} is not given in "${published.unit}"`)
  const f = accepted.toCanonical
  const value = f(published.value)
  const bar = (error: number | null, sign: 1 | -1): number | null => {
    if (error == null) return null
    const size = Math.abs(f(published.value + sign * error) - value)
    return Number.isFinite(size) ? size : null
  }
  const falls = f(published.value * 1.01 + 0.01) < value
  const up = bar(published.errPlus, 1)
  const down = bar(published.errMinus, -1)
  return { value, errPlus: falls ? down : up, errMinus: falls ? up : down, errSys: bar(published.errSys, 1) }
}
