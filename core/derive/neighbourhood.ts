/**
 * All galaxies with a distance, as the search for hosts wants them: in typed arrays, so that one galaxy's neighbours among 100,000 are
 * found in a fraction of a millisecond. Withdrawn galaxies take no part.
 */
import type { CatalogueValue } from '../columns.ts'

export interface Neighbour {
  id: number
  slug: string
  name: string
  /** Supergalactic Cartesian, Mpc. */
  x: number
  y: number
  z: number
  /** Stellar mass, Msun; 0 without photometry: it hosts nothing and counts as lightest. */
  mass: number
  /** mag */
  modulus: number
  /** Its statistical and systematic errors, mag; null where none is known. */
  statistical: number | null
  systematic: number | null
  /** km/s, Galactic standard of rest. */
  vGsr: number | null
  /** Its error, km/s. */
  vError: number | null
}

/** What is known of a galaxy's place among the others, by their ids; null for none. */
export interface Place {
  /** Whose term of the tidal index is largest, over all neighbours. */
  indexDisturber: number | null
  /** The same among those enough more massive. */
  mainDisturber: number | null
  isSatellite: boolean
}

export interface Neighbourhood {
  readonly size: number
  /** Rising. */
  readonly ids: Int32Array
  readonly x: Float64Array
  readonly y: Float64Array
  readonly z: Float64Array
  readonly mass: Float64Array
  readonly galaxies: readonly Neighbour[]
  /** Index into the arrays of a galaxy, or undefined when it has no distance. */
  readonly indexOf: { get: (id: number) => number | undefined; has: (id: number) => boolean }
}

/** @param galaxies - in any order; their ids differ */
export function neighbourhoodOf(galaxies: Iterable<Neighbour>): Neighbourhood {
  // By id, so that ties fall the same way whatever order the database gave.
  return arrange([...galaxies].sort((a, b) => a.id - b.id))
}

/** A neighbourhood with some galaxies changed, added, or (null) taken away; the old one is left as it was. */
export function withChanges(old: Neighbourhood, changes: ReadonlyMap<number, Neighbour | null>): Neighbourhood {
  if (changes.size === 0) return old
  const sameGalaxies = [...changes].every(([id, g]) => g !== null && old.indexOf.has(id))
  if (!sameGalaxies) {
    const kept = old.galaxies.filter((g) => !changes.has(g.id))
    const added = [...changes.values()].filter((g): g is Neighbour => g !== null).sort((a, b) => a.id - b.id)
    return arrange(merge(kept, added))
  }
  const next = { ...old, x: old.x.slice(), y: old.y.slice(), z: old.z.slice(), mass: old.mass.slice(), galaxies: old.galaxies.slice() }
  for (const [id, g] of changes) {
    const i = old.indexOf.get(id)
    if (i === undefined || g === null) continue
    next.x[i] = g.x
    next.y[i] = g.y
    next.z[i] = g.z
    next.mass[i] = g.mass
    next.galaxies[i] = g
  }
  return next
}

/** @param galaxies - by id, rising */
function arrange(galaxies: readonly Neighbour[]): Neighbourhood {
  const size = galaxies.length
  const ids = new Int32Array(size)
  const [x, y, z, mass] = [new Float64Array(size), new Float64Array(size), new Float64Array(size), new Float64Array(size)]
  for (let i = 0; i < size; i++) {
    const g = galaxies[i]
    if (!g) continue
    ids[i] = g.id
    x[i] = g.x
    y[i] = g.y
    z[i] = g.z
    mass[i] = g.mass
  }
  const get = (id: number): number | undefined => placeIn(ids, id)
  return { size, ids, x, y, z, mass, galaxies, indexOf: { get, has: (id) => get(id) !== undefined } }
}

/** Two lists that rise by id, as one. */
function merge(a: readonly Neighbour[], b: readonly Neighbour[]): Neighbour[] {
  const merged: Neighbour[] = []
  let k = 0
  for (const g of a) {
    for (let next = b[k]; next && next.id < g.id; next = b[++k]) merged.push(next)
    merged.push(g)
  }
  return [...merged, ...b.slice(k)]
}

/** Where a number stands in a rising list, or undefined: half of the rest is left out at each step. */
function placeIn(rising: Int32Array, wanted: number): number | undefined {
  let low = 0
  let high = rising.length - 1
  while (low <= high) {
    const middle = (low + high) >> 1
    const found = rising[middle] ?? NaN
    if (found === wanted) return middle
    if (found < wanted) low = middle + 1
    else high = middle - 1
  }
  return undefined
}

/** A catalogue row (own columns are enough) as a neighbour; null when it has no distance or is withdrawn. */
export function neighbourFrom(id: number, row: Readonly<Record<string, CatalogueValue>>): Neighbour | null {
  const number = (key: string): number | null => (typeof row[key] === 'number' ? row[key] : null)
  const x = number('sgx')
  const y = number('sgy')
  const z = number('sgz')
  const modulus = number('dm')
  if (row.status === 'withdrawn' || x === null || y === null || z === null || modulus === null) return null
  const logMass = number('log_mstar')
  return {
    id, slug: String(row.slug), name: String(row.name), x, y, z, modulus, mass: logMass === null ? 0 : 10 ** logMass, statistical: number('dm_err'),
    systematic: number('dm_err_sys'), vGsr: number('v_gsr'), vError: number('v_hel_err'),
  }
}
