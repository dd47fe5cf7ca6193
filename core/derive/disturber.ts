/** Who disturbs whom: the search over all neighbours. */
import type { Neighbourhood } from './neighbourhood.ts'

/** Two galaxies at one point still have a finite influence: closer than this they count as so far apart, Mpc. */
export const CLOSEST_MPC = 1e-4
/** What a bound is widened by, so that rounding never hides a neighbour. */
export const ROOM = 1 + 1e-9

export interface Disturbers {
  /** Index of the neighbour with the largest M★/d³ over all, and that value (Msun/Mpc³); −1 and 0 without any. */
  index: number
  indexPull: number
  /** The same among those at least the mass ratio times as massive. */
  main: number
  mainPull: number
}

/** M★ / d³ of galaxy j at galaxy i, Msun/Mpc³; its logarithm plus the constant is the term of the tidal index. */
export function pull(n: Neighbourhood, j: number, i: number): number {
  const dx = at(n.x, j) - at(n.x, i)
  const dy = at(n.y, j) - at(n.y, i)
  const dz = at(n.z, j) - at(n.z, i)
  return pullAcross(at(n.mass, j), dx * dx + dy * dy + dz * dz)
}

/** The same from the mass, Msun, and the square of the separation, Mpc². */
export function pullAcross(mass: number, separationSquared: number): number {
  const d = Math.max(CLOSEST_MPC, Math.sqrt(separationSquared))
  return mass / (d * d * d)
}

/**
 * Whether galaxy j may be the main disturber of galaxy i. Over all neighbours the largest companion would become the host of its host; asking
 * for more mass makes hosts a forest, since mass rises along every chain. Equal masses, possible with a ratio of 1, fall by id.
 */
export function mayHost(n: Neighbourhood, j: number, i: number, massRatio: number): boolean {
  return mayOutweigh(at(n.mass, j), at(n.ids, j), at(n.mass, i), at(n.ids, i), massRatio)
}

/** The same from masses and ids. */
export function mayOutweigh(massJ: number, idJ: number, massI: number, idI: number, massRatio: number): boolean {
  return massJ > 0 && massJ >= massRatio * massI && (massJ > massI || idJ < idI)
}

/**
 * The disturbers of one galaxy, among all.
 *
 * @param i - its index
 * @param massRatio - what a main disturber has to outweigh it by, at least 1
 */
export function disturbersOf(n: Neighbourhood, i: number, massRatio: number): Disturbers {
  const { x, y, z, mass, size } = n
  const xi = at(x, i)
  const yi = at(y, i)
  const zi = at(z, i)
  const least = massRatio * at(mass, i)
  const found = nobody()
  for (let j = 0; j < size; j++) {
    const m = at(mass, j)
    if (j === i || m <= 0) continue
    const dx = at(x, j) - xi
    const dy = at(y, j) - yi
    const dz = at(z, j) - zi
    const d2 = dx * dx + dy * dy + dz * dz
    // Most neighbours are too far or too light: a bound without roots comes first, with room for rounding. (m/d³ > p is m² > p² d⁶.)
    const d6 = d2 * d2 * d2
    const m2 = m * m * ROOM
    const beatsIndex = m2 >= found.indexPull * found.indexPull * d6
    const beatsMain = m >= least && m2 >= found.mainPull * found.mainPull * d6
    if (!beatsIndex && !beatsMain) continue
    consider(found, n, j, i, massRatio)
  }
  return found
}

/** The start of a search. */
export function nobody(): Disturbers {
  return { index: -1, indexPull: 0, main: -1, mainPull: 0 }
}

/** Lets galaxy j stand for a disturber of galaxy i. Of equal pulls the lower index counts, so that the order of the search does not. */
export function consider(found: Disturbers, n: Neighbourhood, j: number, i: number, massRatio: number): void {
  const p = pull(n, j, i)
  if (p > found.indexPull || (p === found.indexPull && j < found.index)) {
    found.index = j
    found.indexPull = p
  }
  if ((p > found.mainPull || (p === found.mainPull && j < found.main)) && mayHost(n, j, i, massRatio)) {
    found.main = j
    found.mainPull = p
  }
}

function at(list: Float64Array | Int32Array, i: number): number {
  return list[i] ?? NaN
}
