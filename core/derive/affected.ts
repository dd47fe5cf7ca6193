/** Whose place among the others may change when some galaxies do: everybody else keeps his row, and need not be looked at. */
import { mayHost, pull } from './disturber.ts'
import type { Neighbourhood, Place } from './neighbourhood.ts'

/**
 * The galaxies whose relation has to be computed anew.
 *
 * Those that changed; those that one of them disturbs now; and those that one of them, as it will be, would disturb more than whoever does so now.
 *
 * @param before, after - the neighbourhood with the galaxies as they were, and as they will be
 * @param changed - ids of the galaxies that differ between the two, also those added or taken away
 * @param placeOf - the place of a galaxy before, or undefined for a new one
 */
export function affectedBy(before: Neighbourhood, after: Neighbourhood, changed: ReadonlySet<number>, placeOf: (id: number) => Place | undefined, massRatio: number): Set<number> {
  const affected = new Set(changed)
  const movers = [...changed].flatMap((id) => {
    const index = after.indexOf.get(id)
    return index === undefined ? [] : [index]
  })
  for (let i = 0; i < after.size; i++) {
    const id = after.ids[i] ?? 0
    if (changed.has(id)) continue
    const place = placeOf(id)
    if (!place || hangsOn(place, changed) || movers.some((j) => overtakes(before, after, j, i, place, massRatio))) affected.add(id)
  }
  return affected
}

function hangsOn(place: Place, changed: ReadonlySet<number>): boolean {
  return (place.indexDisturber !== null && changed.has(place.indexDisturber)) || (place.mainDisturber !== null && changed.has(place.mainDisturber))
}

function overtakes(before: Neighbourhood, after: Neighbourhood, mover: number, i: number, place: Place, massRatio: number): boolean {
  const strength = pull(after, mover, i)
  if (strength <= 0) return false
  // Equal pulls fall by order, so "as much" has to be looked at too.
  if (strength >= pullOf(before, place.indexDisturber, after.ids[i] ?? 0)) return true
  return mayHost(after, mover, i, massRatio) && strength >= pullOf(before, place.mainDisturber, after.ids[i] ?? 0)
}

function pullOf(n: Neighbourhood, disturber: number | null, id: number): number {
  const j = disturber === null ? undefined : n.indexOf.get(disturber)
  const i = n.indexOf.get(id)
  return j === undefined || i === undefined ? 0 : pull(n, j, i)
}
