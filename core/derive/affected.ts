/** Whose place among the others may change when some galaxies do: everybody else keeps his row, and need not be looked at. */
import { disturberSearch } from './disturber-tree.ts'
import { mayOutweigh, pullAcross, ROOM } from './disturber.ts'
import type { Neighbourhood } from './neighbourhood.ts'
import type { Places } from './places.ts'

/** One mover among 100,000 takes 0.3 ms; the search for everybody about 3 s. */
const MANY_MOVERS = 10_000

/**
 * The galaxies whose relation has to be computed anew.
 *
 * Those that changed; those that one of them disturbs now; and those that one of them, as it will be, would disturb at least as much as
 * whoever does so now. (Equal pulls fall by order, so they have to be looked at too.)
 *
 * @param before, after - the neighbourhood with the galaxies as they were, and as they will be
 * @param places - of the neighbourhood as it was
 * @param changed - ids of the galaxies that differ between the two, also those added or taken away
 * @param manyMovers - from how many changed galaxies on a search for everybody is the faster way
 */
export function affectedBy(before: Neighbourhood, places: Places, after: Neighbourhood, changed: ReadonlySet<number>, massRatio: number, manyMovers = MANY_MOVERS): Set<number> {
  const affected = new Set(changed)
  if (changed.size === 0) return affected
  for (let i = 0; i < before.size; i++) {
    if (changed.has(places.indexDisturber[i] ?? 0) || changed.has(places.mainDisturber[i] ?? 0)) affected.add(before.ids[i] ?? 0)
  }
  if (changed.size > manyMovers) {
    addThoseWithOthers(before, places, after, massRatio, affected)
    return affected
  }
  for (const id of changed) {
    const mover = after.indexOf.get(id)
    if (mover !== undefined) addOvertaken(before, places, after, mover, massRatio, affected)
  }
  return affected
}

/** When most of the catalogue moves: everybody's disturbers are searched for, which costs the same however many moved. */
function addThoseWithOthers(before: Neighbourhood, places: Places, after: Neighbourhood, massRatio: number, affected: Set<number>): void {
  const search = disturberSearch(after, massRatio)
  for (let k = 0; k < before.size; k++) {
    const id = before.ids[k] ?? 0
    const i = affected.has(id) ? undefined : after.indexOf.get(id)
    if (i === undefined) continue
    const found = search(i)
    if ((after.ids[found.index] ?? 0) !== places.indexDisturber[k] || (after.ids[found.main] ?? 0) !== places.mainDisturber[k]) affected.add(id)
  }
}

/** Those that did not change stand where they stood, so their arrays are those of before. */
function addOvertaken({ x, y, z, mass, ids, size }: Neighbourhood, { indexPull, mainPull }: Places, after: Neighbourhood, mover: number, massRatio: number, affected: Set<number>): void {
  const m = after.mass[mover] ?? 0
  if (m <= 0) return
  const mx = after.x[mover] ?? NaN
  const my = after.y[mover] ?? NaN
  const mz = after.z[mover] ?? NaN
  const moverId = after.ids[mover] ?? 0
  const m2 = m * m * ROOM
  for (let i = 0; i < size; i++) {
    const dx = (x[i] ?? NaN) - mx
    const dy = (y[i] ?? NaN) - my
    const dz = (z[i] ?? NaN) - mz
    const d2 = dx * dx + dy * dy + dz * dz
    // Most galaxies are done with here: even their lesser pull is stronger. (m/d³ > p is m² > p² d⁶.)
    const least = mainPull[i] ?? 0
    if (m2 < least * least * d2 * d2 * d2) continue
    const id = ids[i] ?? 0
    const strength = pullAcross(m, d2)
    if (strength >= (indexPull[i] ?? 0) || (strength >= least && mayOutweigh(m, moverId, mass[i] ?? 0, id, massRatio))) affected.add(id)
  }
}
