/** Whose place among the others may change when some galaxies do: everybody else keeps his row, and need not be looked at. */
import type { Policy } from '../scale/policy.ts'
import { disturberSearch } from './disturber-tree.ts'
import { mayOutweigh, pullAcross, ROOM } from './disturber.ts'
import type { Neighbourhood } from './neighbourhood.ts'
import type { Places } from './places.ts'
import { leastSeparationSquared, spanOf, spansOf, type Spans } from './possible-hosts.ts'
import { possibleHostSearch } from './possible-hosts-tree.ts'

/** One mover among 100,000 takes about a millisecond; the search for everybody some seconds. */
const MANY_MOVERS = 5_000

/**
 * The galaxies whose relation has to be computed anew.
 *
 * Those that changed; those that one of them disturbs now; those that one of them, as it will be, would disturb at least as much as whoever
 * does so now (equal pulls fall by order, so they have to be looked at too); and those that one of them, as it was or as it will be, is a
 * possible host of, since their membership probabilities know it.
 *
 * @param before, after - the neighbourhood with the galaxies as they were, and as they will be
 * @param places - of the neighbourhood as it was
 * @param changed - ids of the galaxies that differ between the two, also those added or taken away
 * @param manyMovers - from how many changed galaxies on a search for everybody is the faster way
 */
export function affectedBy(before: Neighbourhood, places: Places, after: Neighbourhood, changed: ReadonlySet<number>, policy: Policy['host'], manyMovers = MANY_MOVERS): Set<number> {
  const affected = new Set(changed)
  if (changed.size === 0) return affected
  for (let i = 0; i < before.size; i++) {
    if (changed.has(places.indexDisturber[i] ?? 0) || changed.has(places.mainDisturber[i] ?? 0)) affected.add(before.ids[i] ?? 0)
  }
  if (changed.size > manyMovers) {
    addThoseWithOthers(before, places, after, policy, changed, affected)
    return affected
  }
  const spans = spansOf(before, policy)
  for (const id of changed) {
    const was = before.indexOf.get(id)
    if (was !== undefined) addGuests(before, spans, before, was, policy, affected)
    const mover = after.indexOf.get(id)
    if (mover === undefined) continue
    addGuests(before, spans, after, mover, policy, affected)
    addOvertaken(before, places, after, mover, policy.massRatio, affected)
  }
  return affected
}

/** When most of the catalogue moves: everybody's disturbers and possible hosts are searched for, which costs the same however many moved. */
function addThoseWithOthers(before: Neighbourhood, places: Places, after: Neighbourhood, policy: Policy['host'], changed: ReadonlySet<number>, affected: Set<number>): void {
  const search = disturberSearch(after, policy.massRatio)
  const hostsBefore = possibleHostSearch(before, policy)
  const hostsAfter = possibleHostSearch(after, policy)
  const moved = (n: Neighbourhood, found: readonly number[]): boolean => found.some((j) => changed.has(n.ids[j] ?? 0))
  for (let k = 0; k < before.size; k++) {
    const id = before.ids[k] ?? 0
    const i = affected.has(id) ? undefined : after.indexOf.get(id)
    if (i === undefined) continue
    const found = search(i)
    const others = (after.ids[found.index] ?? 0) !== places.indexDisturber[k] || (after.ids[found.main] ?? 0) !== places.mainDisturber[k]
    if (others || moved(before, hostsBefore.of(k)) || moved(after, hostsAfter.of(i))) affected.add(id)
  }
}

/** Those that a galaxy, as it stands in a neighbourhood, is a possible host of. Whoever changed is affected already. */
function addGuests({ mass, ids, size }: Neighbourhood, spans: Spans, n: Neighbourhood, host: number, { massRatio, unknownError }: Policy['host'], affected: Set<number>): void {
  const m = n.mass[host] ?? 0
  const id = n.ids[host] ?? 0
  const galaxy = n.galaxies[host]
  if (m <= 0 || !galaxy) return
  const span = spanOf(galaxy, { unknownError })
  const reach2 = span.reach * span.reach
  for (let i = 0; i < size; i++) {
    if (massRatio * (mass[i] ?? 0) > m || leastSeparationSquared(span, spans, i) > reach2) continue
    if (mayOutweigh(m, id, mass[i] ?? 0, ids[i] ?? 0, massRatio)) affected.add(ids[i] ?? 0)
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
