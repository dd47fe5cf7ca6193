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
  readonly ids: Int32Array
  readonly x: Float64Array
  readonly y: Float64Array
  readonly z: Float64Array
  readonly mass: Float64Array
  readonly galaxies: readonly Neighbour[]
  /** Index into the arrays of a galaxy, or undefined when it has no distance. */
  readonly indexOf: ReadonlyMap<number, number>
}

/** @param galaxies - in any order; their ids differ */
export function neighbourhoodOf(galaxies: Iterable<Neighbour>): Neighbourhood {
  // By id, so that ties fall the same way whatever order the database gave.
  const list = [...galaxies].sort((a, b) => a.id - b.id)
  return {
    size: list.length,
    ids: Int32Array.from(list, (g) => g.id),
    x: Float64Array.from(list, (g) => g.x),
    y: Float64Array.from(list, (g) => g.y),
    z: Float64Array.from(list, (g) => g.z),
    mass: Float64Array.from(list, (g) => g.mass),
    galaxies: list,
    indexOf: new Map(list.map((g, i) => [g.id, i])),
  }
}

/** A neighbourhood with some galaxies changed, added, or (null) taken away; the old one is left as it was. */
export function withChanges(old: Neighbourhood, changes: ReadonlyMap<number, Neighbour | null>): Neighbourhood {
  const sameGalaxies = [...changes].every(([id, g]) => g !== null && old.indexOf.has(id))
  if (!sameGalaxies) {
    const kept = old.galaxies.filter((g) => !changes.has(g.id))
    const added = [...changes.values()].filter((g): g is Neighbour => g !== null)
    return neighbourhoodOf([...kept, ...added])
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
    systematic: number('dm_err_sys'), vGsr: number('v_gsr'),
  }
}
