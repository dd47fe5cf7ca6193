/**
 * The search for possible hosts when it is made for everybody: trees over directions and distances, one for each class of reach, each box with
 * its nearest and farthest end. The answer is that of looking at all.
 */
import type { Policy } from '../scale/policy.ts'
import { mayOutweigh, ROOM } from './disturber.ts'
import type { Neighbourhood } from './neighbourhood.ts'
import { reaches, spanAt, spansOf, type Span, type Spans } from './possible-hosts.ts'

/** Galaxies in a box that is not divided any more. */
const LEAF = 8

interface Box {
  lo: [number, number, number]
  hi: [number, number, number]
  near: number
  far: number
  reach: number
  mass: number
  /** Galaxies of a leaf, by index; or two boxes. */
  members: Int32Array | null
  halves: readonly [Box, Box] | null
}

export interface PossibleHostSearch {
  /** Possible hosts of the galaxy with an index, as `possibleHostsOf` gives them. */
  of: (i: number) => number[]
  /** Indices of everybody, those near one another in the sky and in depth following one another: whoever goes by it meets the same hosts again soon. */
  order: Int32Array
}

export function possibleHostSearch(n: Neighbourhood, policy: Policy['host']): PossibleHostSearch {
  const s = spansOf(n, policy)
  const order = alongCurve(s, n.size)
  // A box reaches as far as the farthest in it: who reaches about as far is kept together.
  const classes = new Map<number, number[]>()
  for (const i of order) {
    if ((n.mass[i] ?? 0) <= 0) continue
    const key = Math.floor(2 * Math.log2(s.reach[i] ?? NaN))
    const list = classes.get(key)
    if (list) list.push(i)
    else classes.set(key, [i])
  }
  const roots = [...classes.values()].map((members) => boxOf(n, s, Int32Array.from(members)))
  const of = (i: number): number[] => {
    const found: number[] = []
    const own = spanAt(s, i)
    for (const root of roots) search(root, n, s, i, own, policy.massRatio, found)
    return found.sort((a, b) => a - b)
  }
  return { of, order }
}

/** @param members - along the curve, so that each half is a neighbourhood of its own */
function boxOf(n: Neighbourhood, s: Spans, members: Int32Array): Box {
  if (members.length > LEAF) {
    const middle = members.length >> 1
    const a = boxOf(n, s, members.subarray(0, middle))
    const b = boxOf(n, s, members.subarray(middle))
    return {
      lo: [Math.min(a.lo[0], b.lo[0]), Math.min(a.lo[1], b.lo[1]), Math.min(a.lo[2], b.lo[2])],
      hi: [Math.max(a.hi[0], b.hi[0]), Math.max(a.hi[1], b.hi[1]), Math.max(a.hi[2], b.hi[2])],
      near: Math.min(a.near, b.near), far: Math.max(a.far, b.far), reach: Math.max(a.reach, b.reach), mass: Math.max(a.mass, b.mass), members: null, halves: [a, b],
    }
  }
  const box: Box = { lo: [Infinity, Infinity, Infinity], hi: [-Infinity, -Infinity, -Infinity], near: Infinity, far: 0, reach: 0, mass: 0, members, halves: null }
  const axes = [s.ux, s.uy, s.uz] as const
  for (const i of members) {
    for (let k = 0; k < 3; k++) {
      const value = axes[k]?.[i] ?? NaN
      box.lo[k] = Math.min(box.lo[k] ?? NaN, value)
      box.hi[k] = Math.max(box.hi[k] ?? NaN, value)
    }
    box.near = Math.min(box.near, s.near[i] ?? NaN)
    box.far = Math.max(box.far, s.far[i] ?? NaN)
    box.reach = Math.max(box.reach, s.reach[i] ?? NaN)
    box.mass = Math.max(box.mass, n.mass[i] ?? 0)
  }
  return box
}

function search(box: Box, n: Neighbourhood, s: Spans, i: number, own: Span, massRatio: number, found: number[]): void {
  const mass = n.mass[i] ?? 0
  if (box.mass * ROOM < massRatio * mass || !mayReach(box, own)) return
  if (box.members) {
    for (const j of box.members) {
      if (j !== i && reaches(s, j, own) && mayOutweigh(n.mass[j] ?? 0, n.ids[j] ?? 0, mass, n.ids[i] ?? 0, massRatio)) found.push(j)
    }
    return
  }
  if (!box.halves) return
  search(box.halves[0], n, s, i, own, massRatio, found)
  search(box.halves[1], n, s, i, own, massRatio, found)
}

/** Whether anybody in a box might be a possible host: if not even its longest reach from its nearest ends would do, nobody is. */
function mayReach({ lo, hi, near, far, reach }: Box, own: Span): boolean {
  const gap = own.near > far ? own.near - far : near > own.far ? near - own.far : 0
  const dx = outside(own.ux, lo[0], hi[0])
  const dy = outside(own.uy, lo[1], hi[1])
  const dz = outside(own.uz, lo[2], hi[2])
  return gap * gap + own.near * near * (dx * dx + dy * dy + dz * dz) <= reach * reach * ROOM
}

function outside(x: number, lo: number, hi: number): number {
  return x < lo ? lo - x : x > hi ? x - hi : 0
}

/** Steps of each coordinate of the curve: four of them fill the 52 bits of a number. */
const STEPS = 2 ** 13

/** Everybody along a Z-order curve through direction and depth (Morton 1966): near one another on it is, mostly, near one another in space. */
function alongCurve(s: Spans, size: number): Int32Array {
  const keys = new Float64Array(size)
  const cell = (share: number): number => Math.min(STEPS - 1, Math.max(0, Math.floor(share * STEPS)))
  for (let i = 0; i < size; i++) {
    const cells = [cell(((s.ux[i] ?? 0) + 1) / 2), cell(((s.uy[i] ?? 0) + 1) / 2), cell(((s.uz[i] ?? 0) + 1) / 2), cell(Math.log2(1 + (s.near[i] ?? 0)) / 6)]
    let key = 0
    for (let bit = STEPS / 2; bit >= 1; bit /= 2) for (const c of cells) key = 2 * key + ((c & bit) === 0 ? 0 : 1)
    keys[i] = key
  }
  return Int32Array.from({ length: size }, (_, i) => i).sort((a, b) => (keys[a] ?? 0) - (keys[b] ?? 0) || a - b)
}
