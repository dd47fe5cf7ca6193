/** Whom each galaxy of a neighbourhood hangs on, in arrays beside those of the neighbourhood. */
import { pull } from './disturber.ts'
import type { Neighbourhood, Place } from './neighbourhood.ts'

export interface Places {
  /** Ids, by index in the neighbourhood; 0 for none. */
  readonly indexDisturber: Int32Array
  readonly mainDisturber: Int32Array
  /** What these two exert, Msun/Mpc³; 0 where there is none. The main disturber is one of all neighbours, so its pull is the lesser. */
  readonly indexPull: Float64Array
  readonly mainPull: Float64Array
  /** 1 for a satellite of its main disturber. */
  readonly satellite: Uint8Array
}

/** @param known - places by galaxy id; those of galaxies that the neighbourhood lacks do not matter */
export function placesOf(n: Neighbourhood, known: ReadonlyMap<number, Place>): Places {
  const places = blank(n.size)
  for (let i = 0; i < n.size; i++) {
    setPlace(places, i, known.get(n.ids[i] ?? 0))
    setPulls(places, n, i)
  }
  return places
}

/** The place of one galaxy, or undefined when it has no distance. */
export function placeIn(n: Neighbourhood, places: Places, id: number): Place | undefined {
  const i = n.indexOf.get(id)
  if (i === undefined) return undefined
  return { indexDisturber: places.indexDisturber[i] || null, mainDisturber: places.mainDisturber[i] || null, isSatellite: places.satellite[i] === 1 }
}

/**
 * Places in a neighbourhood that has changed; the old ones are left as they were.
 *
 * @param before, after - the neighbourhood that `old` belongs to, and the new one
 * @param moved - ids of the galaxies that differ between the two
 * @param known - the places that are new
 */
export function placesAfter(before: Neighbourhood, old: Places, after: Neighbourhood, moved: Iterable<number>, known: ReadonlyMap<number, Place>): Places {
  const places = before.ids === after.ids ? copied(old) : carriedOver(before, old, after)
  const stale = new Set([...moved, ...known.keys()])
  for (const [id, place] of known) {
    const i = after.indexOf.get(id)
    if (i !== undefined) setPlace(places, i, place)
  }
  for (let i = 0; i < after.size; i++) {
    // A pull changes with either end of it.
    if (stale.has(after.ids[i] ?? 0) || stale.has(places.indexDisturber[i] ?? 0) || stale.has(places.mainDisturber[i] ?? 0)) setPulls(places, after, i)
  }
  return places
}

function blank(size: number): Places {
  return {
    indexDisturber: new Int32Array(size), mainDisturber: new Int32Array(size), indexPull: new Float64Array(size), mainPull: new Float64Array(size), satellite: new Uint8Array(size),
  }
}

function copied(p: Places): Places {
  return { indexDisturber: p.indexDisturber.slice(), mainDisturber: p.mainDisturber.slice(), indexPull: p.indexPull.slice(), mainPull: p.mainPull.slice(), satellite: p.satellite.slice() }
}

function carriedOver(before: Neighbourhood, old: Places, after: Neighbourhood): Places {
  const places = blank(after.size)
  for (let i = 0, k = 0; i < after.size; i++) {
    const id = after.ids[i] ?? 0
    while (k < before.size && (before.ids[k] ?? 0) < id) k++
    if (before.ids[k] !== id) continue
    places.indexDisturber[i] = old.indexDisturber[k] ?? 0
    places.mainDisturber[i] = old.mainDisturber[k] ?? 0
    places.indexPull[i] = old.indexPull[k] ?? 0
    places.mainPull[i] = old.mainPull[k] ?? 0
    places.satellite[i] = old.satellite[k] ?? 0
  }
  return places
}

function setPlace(places: Places, i: number, place: Place | undefined): void {
  places.indexDisturber[i] = place?.indexDisturber ?? 0
  places.mainDisturber[i] = place?.mainDisturber ?? 0
  places.satellite[i] = place?.isSatellite ? 1 : 0
}

function setPulls(places: Places, n: Neighbourhood, i: number): void {
  places.indexPull[i] = pullOf(n, places.indexDisturber[i] ?? 0, i)
  places.mainPull[i] = pullOf(n, places.mainDisturber[i] ?? 0, i)
}

function pullOf(n: Neighbourhood, disturber: number, i: number): number {
  const j = disturber === 0 ? undefined : n.indexOf.get(disturber)
  return j === undefined ? 0 : pull(n, j, i)
}
