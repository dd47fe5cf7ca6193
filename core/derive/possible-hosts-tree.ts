/**
 * The search for possible hosts when it is made for everybody: a tree over directions and distances, each box with its nearest and farthest
 * end and its longest reach. The answer is that of looking at all.
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
  const everybody = Int32Array.from({ length: n.size }, (_, i) => i)
  const massive = everybody.filter((i) => (n.mass[i] ?? 0) > 0)
  const root = massive.length === 0 ? null : boxOf(n, s, massive)
  const of = (i: number): number[] => {
    const found: number[] = []
    if (root) search(root, n, s, i, spanAt(s, i), policy.massRatio, found)
    return found.sort((a, b) => a - b)
  }
  return { of, order: ordered(s, everybody) }
}

function boxOf(n: Neighbourhood, s: Spans, members: Int32Array): Box {
  const box: Box = { lo: [Infinity, Infinity, Infinity], hi: [-Infinity, -Infinity, -Infinity], near: Infinity, far: 0, reach: 0, mass: 0, members: null, halves: null }
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
  if (members.length <= LEAF) return { ...box, members }
  const [first, second] = halved(s, members)
  return { ...box, halves: [boxOf(n, s, first), boxOf(n, s, second)] }
}

/** Divided across the widest of four: three of direction, and depth as a ratio. */
function halved(s: Spans, members: Int32Array): [Int32Array, Int32Array] {
  const depth = Float64Array.from(members, (i) => Math.log(s.near[i] ?? NaN))
  const coordinates = [s.ux, s.uy, s.uz].map((axis) => Float64Array.from(members, (i) => axis[i] ?? NaN)).concat([depth])
  const widths = coordinates.map(width)
  const along = coordinates[widths.indexOf(Math.max(...widths))] ?? depth
  const order = Int32Array.from({ length: members.length }, (_, k) => k).sort((a, b) => (along[a] ?? 0) - (along[b] ?? 0))
  const sorted = order.map((k) => members[k] ?? 0)
  const middle = sorted.length >> 1
  return [sorted.subarray(0, middle), sorted.subarray(middle)]
}

function width(list: Float64Array): number {
  let lo = Infinity
  let hi = -Infinity
  for (const value of list) {
    if (value < lo) lo = value
    if (value > hi) hi = value
  }
  return hi - lo
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

/** A walk through the halves, in their order. */
function ordered(s: Spans, members: Int32Array): Int32Array {
  if (members.length <= LEAF) return members
  const [first, second] = halved(s, members)
  const order = new Int32Array(members.length)
  order.set(ordered(s, first))
  order.set(ordered(s, second), first.length)
  return order
}
