/**
 * Distance methods under their trade names. Tier and systematic error of each are policy (core/scale), not facts of the method.
 */
export interface Method {
  key: string
  /** What people read in a table. */
  label: string
  /** In the middle of a sentence: "3 TRGB values". */
  inWords: string
  /** Other spellings accepted on entry, lower case, without punctuation. */
  names: readonly string[]
}

export const METHODS = [
  { key: 'eclipsing-binaries', label: 'Detached eclipsing binaries', inWords: 'eclipsing-binary', names: ['eclipsing binaries', 'eclipsing binary', 'deb', 'debs'] },
  { key: 'masers', label: 'Masers', inWords: 'maser', names: ['maser', 'masers', 'water maser', 'megamaser'] },
  { key: 'geometric', label: 'Stellar orbits (geometric)', inWords: 'geometric', names: ['geometric', 'stellar orbit', 'parallax'] },
  { key: 'cepheids', label: 'Cepheids', inWords: 'Cepheid', names: ['cepheid', 'cepheids', 'ceph'] },
  { key: 'trgb', label: 'TRGB', inWords: 'TRGB', names: ['trgb', 'tip of the red giant branch'] },
  { key: 'rr-lyrae', label: 'RR Lyrae', inWords: 'RR Lyrae', names: ['rr lyrae', 'rrlyrae', 'rr lyr', 'rrl'] },
  { key: 'horizontal-branch', label: 'Horizontal branch', inWords: 'horizontal-branch', names: ['horizontal branch', 'hb'] },
  { key: 'red-clump', label: 'Red clump', inWords: 'red-clump', names: ['red clump', 'rc'] },
  { key: 'miras', label: 'Miras', inWords: 'Mira', names: ['mira', 'miras'] },
  { key: 'jagb', label: 'JAGB', inWords: 'JAGB', names: ['jagb', 'j region agb'] },
  { key: 'sbf', label: 'Surface-brightness fluctuations', inWords: 'surface-brightness-fluctuation', names: ['sbf', 'surface brightness fluctuations'] },
  { key: 'pnlf', label: 'Planetary-nebula luminosity function', inWords: 'planetary-nebula', names: ['pnlf', 'planetary nebula luminosity function'] },
  { key: 'sn-ii', label: 'Type II supernovae', inWords: 'type II supernova', names: ['sn ii', 'snii', 'type ii supernova', 'type ii supernovae', 'epm', 'scm'] },
  { key: 'sn-ia', label: 'Type Ia supernovae', inWords: 'type Ia supernova', names: ['sn ia', 'snia', 'type ia supernova', 'type ia supernovae'] },
  { key: 'tully-fisher', label: 'Tully–Fisher', inWords: 'Tully–Fisher', names: ['tully fisher', 'tf', 'btf'] },
  { key: 'fundamental-plane', label: 'Fundamental plane', inWords: 'fundamental-plane', names: ['fundamental plane', 'fp'] },
  { key: 'brightest-stars', label: 'Brightest stars', inWords: 'brightest-star', names: ['brightest stars', 'brightest star', 'bs'] },
  { key: 'supergiants', label: 'Blue and red supergiants', inWords: 'supergiant', names: ['supergiants', 'blue supergiants', 'red supergiants', 'lbv', 'fglr'] },
  { key: 'gclf', label: 'Globular cluster luminosity function', inWords: 'globular-cluster', names: ['gclf', 'globular cluster luminosity function'] },
  { key: 'compilation', label: 'Compilation or mean of methods', inWords: 'compiled', names: ['compilation', 'review mean', 'review', 'mean'] },
  { key: 'membership', label: 'Group membership', inWords: 'membership', names: ['membership', 'group membership', 'mem'] },
  { key: 'hubble-flow', label: 'Velocity in the Hubble flow', inWords: 'Hubble-flow', names: ['hubble flow', 'flow', 'redshift'] },
] as const satisfies readonly Method[]

export type MethodKey = (typeof METHODS)[number]['key']
export const METHOD_KEYS = METHODS.map((m) => m.key) as unknown as readonly [MethodKey, ...MethodKey[]]

/** The method with this key. @throws RangeError when there is none. */
export function method(key: string): Method {
  const found = METHODS.find((m) => m.key === key)
  if (!found) throw new RangeError(`no distance method has the key "${key}"`)
  return found
}

/** The method that a published or typed name means, or undefined. */
export function methodNamed(name: string): Method | undefined {
  const wanted = simplify(name)
  if (wanted === '') return undefined
  return METHODS.find((m) => m.key === name || simplify(m.label) === wanted || m.names.some((n) => n === wanted))
}

function simplify(name: string): string {
  return name.toLowerCase().replace(/[^a-z0-9]+/g, ' ').trim()
}
