/**
 * The search for disturbers when it is made for everybody: a tree of boxes, each with its largest mass. A box whose largest mass at its
 * nearest corner would not outdo what has been found is left out, so that the answer is that of the plain search over all.
 */
import { consider, nobody, ROOM, type Disturbers } from './disturber.ts'
import type { Neighbourhood } from './neighbourhood.ts'

/** Galaxies in a box that is not divided any more. */
const LEAF = 12

interface Box {
  lo: [number, number, number]
  hi: [number, number, number]
  mass: number
  /** Galaxies of a leaf, by index; or two boxes. */
  members: Int32Array | null
  halves: readonly [Box, Box] | null
}

/** Finds the disturbers of the galaxy with an index, as `disturbersOf` does. */
export type DisturberSearch = (i: number) => Disturbers

/** @param massRatio - what a main disturber has to outweigh a galaxy by, at least 1 */
export function disturberSearch(n: Neighbourhood, massRatio: number): DisturberSearch {
  const massive = Int32Array.from({ length: n.size }, (_, i) => i).filter((i) => (n.mass[i] ?? 0) > 0)
  const root = massive.length === 0 ? null : boxOf(n, massive)
  return (i) => {
    const found = nobody()
    if (root) search(root, n, i, massRatio, found)
    return found
  }
}

function boxOf(n: Neighbourhood, members: Int32Array): Box {
  const axes = [n.x, n.y, n.z] as const
  const lo: Box['lo'] = [Infinity, Infinity, Infinity]
  const hi: Box['hi'] = [-Infinity, -Infinity, -Infinity]
  let mass = 0
  for (const i of members) {
    for (let k = 0; k < 3; k++) {
      const value = axes[k]?.[i] ?? NaN
      lo[k] = Math.min(lo[k] ?? NaN, value)
      hi[k] = Math.max(hi[k] ?? NaN, value)
    }
    mass = Math.max(mass, n.mass[i] ?? 0)
  }
  if (members.length <= LEAF) return { lo, hi, mass, members, halves: null }
  const widths = [hi[0] - lo[0], hi[1] - lo[1], hi[2] - lo[2]]
  const along = axes[widths.indexOf(Math.max(...widths))] ?? n.x
  const sorted = members.slice().sort((a, b) => (along[a] ?? 0) - (along[b] ?? 0))
  const middle = sorted.length >> 1
  return { lo, hi, mass, members: null, halves: [boxOf(n, sorted.subarray(0, middle)), boxOf(n, sorted.subarray(middle))] }
}

function search(box: Box, n: Neighbourhood, i: number, massRatio: number, found: Disturbers): void {
  if (box.members) {
    for (const j of box.members) if (j !== i) consider(found, n, j, i, massRatio)
    return
  }
  if (!box.halves) return
  const [a, b] = box.halves
  const pullOfA = mostPull(a, n, i)
  const pullOfB = mostPull(b, n, i)
  // The stronger half first: what is found there rules more of the other out.
  const [first, firstPull, second, secondPull] = pullOfA >= pullOfB ? [a, pullOfA, b, pullOfB] : [b, pullOfB, a, pullOfA]
  if (mayMatter(first, firstPull, n, i, massRatio, found)) search(first, n, i, massRatio, found)
  if (mayMatter(second, secondPull, n, i, massRatio, found)) search(second, n, i, massRatio, found)
}

function mayMatter(box: Box, most: number, n: Neighbourhood, i: number, massRatio: number, found: Disturbers): boolean {
  return most >= found.indexPull || (box.mass * ROOM >= massRatio * (n.mass[i] ?? 0) && most >= found.mainPull)
}

/** What no galaxy of a box can outdo, Msun/Mpc³. */
function mostPull({ lo, hi, mass }: Box, n: Neighbourhood, i: number): number {
  const dx = outside(n.x[i] ?? 0, lo[0], hi[0])
  const dy = outside(n.y[i] ?? 0, lo[1], hi[1])
  const dz = outside(n.z[i] ?? 0, lo[2], hi[2])
  const d2 = dx * dx + dy * dy + dz * dz
  return d2 === 0 ? Infinity : (mass / (d2 * Math.sqrt(d2))) * ROOM
}

function outside(x: number, lo: number, hi: number): number {
  return x < lo ? lo - x : x > hi ? x - hi : 0
}
