/** Whose place among the others may change when some galaxies do: everybody else keeps his row, and need not be looked at. */
import { mayHost, pull, ROOM } from './disturber.ts'
import type { Neighbourhood, Place } from './neighbourhood.ts'

/**
 * The galaxies whose relation has to be computed anew.
 *
 * Those that changed; those that one of them disturbs now; and those that one of them, as it will be, would disturb at least as much as
 * whoever does so now. (Equal pulls fall by order, so they have to be looked at too.)
 *
 * @param before, after - the neighbourhood with the galaxies as they were, and as they will be
 * @param changed - ids of the galaxies that differ between the two, also those added or taken away
 * @param placeOf - the place of a galaxy before, or undefined for a new one
 */
export function affectedBy(before: Neighbourhood, after: Neighbourhood, changed: ReadonlySet<number>, placeOf: (id: number) => Place | undefined, massRatio: number): Set<number> {
  const affected = new Set(changed)
  const settled = settle(before, after, changed, placeOf, affected)
  for (const id of changed) {
    const mover = after.indexOf.get(id)
    if (mover !== undefined) addOvertaken(settled, after, mover, massRatio, affected)
  }
  return affected
}

/** Galaxies that did not change and hang on none that did, with the pulls that they feel. */
interface Settled {
  /** Index in the neighbourhood as it will be. */
  index: Int32Array
  indexPull: Float64Array
  mainPull: Float64Array
  size: number
}

/** @param affected - gets those that hang on a changed one */
function settle(before: Neighbourhood, after: Neighbourhood, changed: ReadonlySet<number>, placeOf: (id: number) => Place | undefined, affected: Set<number>): Settled {
  const settled = { index: new Int32Array(after.size), indexPull: new Float64Array(after.size), mainPull: new Float64Array(after.size), size: 0 }
  for (let i = 0; i < after.size; i++) {
    const id = after.ids[i] ?? 0
    if (changed.has(id)) continue
    const place = placeOf(id)
    if (!place || hangsOn(place, changed)) {
      affected.add(id)
      continue
    }
    const k = settled.size++
    settled.index[k] = i
    const strongest = pullOn(before, place.indexDisturber, id)
    settled.indexPull[k] = strongest
    settled.mainPull[k] = place.mainDisturber === place.indexDisturber ? strongest : pullOn(before, place.mainDisturber, id)
  }
  return settled
}

function hangsOn(place: Place, changed: ReadonlySet<number>): boolean {
  return (place.indexDisturber !== null && changed.has(place.indexDisturber)) || (place.mainDisturber !== null && changed.has(place.mainDisturber))
}

function pullOn(n: Neighbourhood, disturber: number | null, id: number): number {
  const j = disturber === null ? undefined : n.indexOf.get(disturber)
  const i = n.indexOf.get(id)
  return j === undefined || i === undefined ? 0 : pull(n, j, i)
}

function addOvertaken({ index, indexPull, mainPull, size }: Settled, after: Neighbourhood, mover: number, massRatio: number, affected: Set<number>): void {
  const { x, y, z, mass, ids } = after
  const m = mass[mover] ?? 0
  if (m <= 0) return
  const mx = x[mover] ?? NaN
  const my = y[mover] ?? NaN
  const mz = z[mover] ?? NaN
  const m2 = m * m * ROOM
  for (let k = 0; k < size; k++) {
    const i = index[k] ?? 0
    const dx = (x[i] ?? NaN) - mx
    const dy = (y[i] ?? NaN) - my
    const dz = (z[i] ?? NaN) - mz
    const d2 = dx * dx + dy * dy + dz * dz
    // The main disturber is one of all neighbours, so its pull is the lesser of the two: most galaxies are done with here.
    const least = mainPull[k] ?? 0
    if (m2 < least * least * d2 * d2 * d2) continue
    const strength = pull(after, mover, i)
    if (strength >= (indexPull[k] ?? 0) || (strength >= least && mayHost(after, mover, i, massRatio))) affected.add(ids[i] ?? 0)
  }
}
