/**
 * Whose satellite a galaxy might be, its distance and theirs being as uncertain as they are: those enough more massive in whose tidal reach
 * the two may lie when each distance is off by up to three standard deviations. A galaxy that is none of them cannot matter to its
 * membership, so the draws look no further, and a change of it leaves the galaxy alone.
 */
import { TIDAL_INDEX_CONSTANT } from '../astro/constants.ts'
import { RELATIVE_PER_MAG } from '../astro/distance.ts'
import type { Policy } from '../scale/policy.ts'
import { mayOutweigh } from './disturber.ts'
import type { Neighbour, Neighbourhood } from './neighbourhood.ts'

/** Standard deviations of a modulus, its two parts together, that a possible host may need. */
const DEVIATIONS = 3

/** Where a galaxy may be along its line of sight, and how far its influence counts. */
export interface Span {
  /** Unit vector towards it, supergalactic. */
  ux: number
  uy: number
  uz: number
  /** Mpc */
  near: number
  far: number
  /** How far from it the term of the tidal index is above 0, Mpc; 0 without mass. */
  reach: number
}

/** The same of a whole neighbourhood, by index. */
export type Spans = Readonly<Record<keyof Span, Float64Array>>

/** How far the term of the tidal index of a stellar mass (Msun) is above 0, Mpc. */
export function tidalReach(mass: number): number {
  return Math.cbrt(mass * 10 ** TIDAL_INDEX_CONSTANT)
}

export function spanOf(g: Neighbour, policy: Pick<Policy['host'], 'unknownError'>): Span {
  const d = Math.sqrt(g.x * g.x + g.y * g.y + g.z * g.z)
  const stretch = Math.exp(RELATIVE_PER_MAG * DEVIATIONS * Math.hypot(g.statistical ?? policy.unknownError, g.systematic ?? 0))
  return { ux: g.x / d, uy: g.y / d, uz: g.z / d, near: d / stretch, far: d * stretch, reach: tidalReach(g.mass) }
}

const kept = new WeakMap<Neighbourhood, { unknownError: number; spans: Spans }>()
const KEYS = ['ux', 'uy', 'uz', 'near', 'far', 'reach'] as const

/** Kept as long as the neighbourhood is: previews ask for the same one again and again. */
export function spansOf(n: Neighbourhood, policy: Pick<Policy['host'], 'unknownError'>): Spans {
  const known = kept.get(n)
  if (known?.unknownError === policy.unknownError) return known.spans
  const list = (): Float64Array => new Float64Array(n.size)
  const spans = { ux: list(), uy: list(), uz: list(), near: list(), far: list(), reach: list() }
  n.galaxies.forEach((g, i) => setSpan(spans, i, spanOf(g, policy)))
  kept.set(n, { unknownError: policy.unknownError, spans })
  return spans
}

/** Spans of a neighbourhood that differs from another in a few galaxies, without working all of them out again. */
export function spansAfter(before: Neighbourhood, after: Neighbourhood, changed: Iterable<number>, policy: Pick<Policy['host'], 'unknownError'>): Spans {
  if (before.ids !== after.ids) return spansOf(after, policy)
  const old = spansOf(before, policy)
  const spans = { ux: old.ux.slice(), uy: old.uy.slice(), uz: old.uz.slice(), near: old.near.slice(), far: old.far.slice(), reach: old.reach.slice() }
  for (const id of changed) {
    const i = after.indexOf.get(id)
    const galaxy = after.galaxies[i ?? -1]
    if (i !== undefined && galaxy) setSpan(spans, i, spanOf(galaxy, policy))
  }
  kept.set(after, { unknownError: policy.unknownError, spans })
  return spans
}

function setSpan(spans: Spans, i: number, span: Span): void {
  for (const key of KEYS) spans[key][i] = span[key]
}

export function spanAt(s: Spans, i: number): Span {
  return { ux: s.ux[i] ?? NaN, uy: s.uy[i] ?? NaN, uz: s.uz[i] ?? NaN, near: s.near[i] ?? NaN, far: s.far[i] ?? NaN, reach: s.reach[i] ?? NaN }
}

/**
 * The least separation, squared (Mpc²), that two galaxies may have. That of two points at distances t and s is (t − s)² + t s chord², so it is
 * at least that of the gap between the two spans and of their near ends. Whichever of the two is asked first, the digits are the same.
 */
export function leastSeparationSquared(own: Span, s: Spans, j: number): number {
  const near = s.near[j] ?? NaN
  const far = s.far[j] ?? NaN
  const gap = own.near > far ? own.near - far : near > own.far ? near - own.far : 0
  const dx = (s.ux[j] ?? NaN) - own.ux
  const dy = (s.uy[j] ?? NaN) - own.uy
  const dz = (s.uz[j] ?? NaN) - own.uz
  return gap * gap + own.near * near * (dx * dx + dy * dy + dz * dz)
}

/** Possible hosts of the galaxy with an index, by looking at all; indices, rising. */
export function possibleHostsOf(n: Neighbourhood, i: number, policy: Policy['host']): number[] {
  const s = spansOf(n, policy)
  const own = spanAt(s, i)
  const mass = n.mass[i] ?? 0
  const least = policy.massRatio * mass
  const found: number[] = []
  for (let j = 0; j < n.size; j++) {
    if (j === i || (n.mass[j] ?? 0) < least) continue
    if (reaches(s, j, own) && mayOutweigh(n.mass[j] ?? 0, n.ids[j] ?? 0, mass, n.ids[i] ?? 0, policy.massRatio)) found.push(j)
  }
  return found
}

/** Whether a galaxy may lie within the tidal reach of galaxy j. */
export function reaches(s: Spans, j: number, own: Span): boolean {
  const reach = s.reach[j] ?? NaN
  return leastSeparationSquared(own, s, j) <= reach * reach
}
