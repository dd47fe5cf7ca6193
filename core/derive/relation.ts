/** The columns that depend on other galaxies. */
import { TIDAL_INDEX_CONSTANT } from '../astro/constants.ts'
import { angleBetween } from '../astro/sphere.ts'
import { degrees } from '../astro/units.ts'
import type { CatalogueValue, HostRelation } from '../columns.ts'
import type { Policy } from '../scale/policy.ts'
import { disturbersOf, type Disturbers } from './disturber.ts'
import { disturberSearch } from './disturber-tree.ts'
import { membershipFinder, reachOf, type Membership, type MembershipFinder } from './membership.ts'
import type { Neighbour, Neighbourhood, Place } from './neighbourhood.ts'
import { possibleHostsOf } from './possible-hosts.ts'
import { possibleHostSearch } from './possible-hosts-tree.ts'
import { restOf } from './rest.ts'

/** A host that a galaxy may belong to, and how likely, as it is stored. */
export interface PossibleHost {
  host: string
  p: number
}

export interface Relation extends Place {
  columns: Readonly<Record<string, CatalogueValue>>
  /** Most likely first; what is less likely than 1 in 200 is left out. */
  possibleHosts: readonly PossibleHost[]
}

/** What people decided against the rule: the host (id) of a galaxy (id), or that it has none. One that has no distance cannot be a host. */
export type HostOverrides = ReadonlyMap<number, number | null>

const NO_OVERRIDES: HostOverrides = new Map()
const WORTH_TELLING = 0.005

/** The place of a galaxy without a distance, or without anybody who disturbs it. */
export const NOWHERE: Relation = {
  indexDisturber: null,
  mainDisturber: null,
  isSatellite: false,
  columns: {
    host: null, host_probability: null, tidal_index: null, main_disturber: null, host_sep: null, host_sep_median: null, host_sep_lo: null, host_sep_hi: null, host_angle: null,
    host_dv: null, host_dv_err: null,
  },
  possibleHosts: [],
}

/** What the place of one galaxy is found with, over and over. */
interface Ground {
  n: Neighbourhood
  overrides: HostOverrides
  membership: MembershipFinder
}

/** Where a galaxy stands among the others. Without a distance it stands nowhere; without neighbours of any mass it has no index. */
export function relationOf(n: Neighbourhood, id: number, policy: Policy, overrides: HostOverrides = NO_OVERRIDES): Relation {
  return relationFinder(n, policy, overrides)(id)
}

/** Finds one place after the other: for a handful of galaxies, by looking at all neighbours of each. */
export function relationFinder(n: Neighbourhood, policy: Policy, overrides: HostOverrides = NO_OVERRIDES): (id: number) => Relation {
  const ground: Ground = { n, overrides, membership: membershipFinder(policy.host) }
  return (id) => {
    const i = n.indexOf.get(id)
    return i === undefined ? NOWHERE : relationAt(ground, i, disturbersOf(n, i, policy.host.massRatio), () => possibleHostsOf(n, i, policy.host))
  }
}

/**
 * The same for many galaxies, far faster: the neighbours are searched through trees, and galaxies that share hosts follow one another, so
 * that the draws of a host are made once for nearly all of them. The answer does not depend on who else is asked for.
 *
 * @param onProgress - called now and then with how many are done
 */
export function relationsOf(n: Neighbourhood, ids: Iterable<number>, policy: Policy, overrides: HostOverrides = NO_OVERRIDES, onProgress?: (done: number) => void): Map<number, Relation> {
  const ground: Ground = { n, overrides, membership: membershipFinder(policy.host) }
  const disturbers = disturberSearch(n, policy.host.massRatio)
  const possible = possibleHostSearch(n, policy.host)
  // The order of the answer is that of the question.
  const relations = new Map<number, Relation>()
  for (const id of ids) relations.set(id, NOWHERE)
  let done = 0
  for (const i of possible.order) {
    const id = n.ids[i] ?? 0
    if (!relations.has(id)) continue
    relations.set(id, relationAt(ground, i, disturbers(i), () => possible.of(i)))
    if (++done % PROGRESS_EVERY === 0) onProgress?.(done)
  }
  return relations
}

const PROGRESS_EVERY = 500

function relationAt({ n, overrides, membership: find }: Ground, i: number, found: Disturbers, possibleHosts: () => readonly number[]): Relation {
  const galaxy = n.galaxies[i]
  if (!galaxy) return NOWHERE
  const index = n.galaxies[found.index]
  const tidalIndex = index ? Math.log10(found.indexPull) + TIDAL_INDEX_CONSTANT : null
  const override = overrides.get(galaxy.id)
  const chosen = override == null ? undefined : n.galaxies[n.indexOf.get(override) ?? -1]
  const main = chosen ?? n.galaxies[found.main]
  if (!main) return { ...NOWHERE, indexDisturber: index?.id ?? null, columns: { ...NOWHERE.columns, tidal_index: tidalIndex } }
  const others = possibleHosts().flatMap((j) => n.galaxies[j] ?? []).filter((g) => g !== main)
  const membership = overridden(find(galaxy, main, others), chosen, override)
  return {
    indexDisturber: index?.id ?? null,
    mainDisturber: main.id,
    isSatellite: membership.isSatellite,
    columns: {
      host: membership.isSatellite ? main.slug : null,
      host_probability: membership.probability,
      tidal_index: tidalIndex,
      main_disturber: main.slug,
      host_sep: membership.separation * 1000,
      host_sep_median: membership.separationMedian * 1000,
      host_sep_lo: membership.separationLo * 1000,
      host_sep_hi: membership.separationHi * 1000,
      host_angle: degrees(angleBetween([galaxy.x, galaxy.y, galaxy.z], [main.x, main.y, main.z])),
      ...velocityDifference(galaxy, main),
    },
    possibleHosts: membership.hosts.filter((h) => h.probability >= WORTH_TELLING).map((h) => ({ host: h.slug, p: h.probability })),
  }
}

/** The assignment is what somebody decided; its probability stays that of the draws, so that nobody is made to look surer than he is. */
function overridden(membership: Membership, chosen: Neighbour | undefined, override: number | null | undefined): Membership {
  const isSatellite = chosen ? true : override === null ? false : membership.isSatellite
  if (isSatellite === membership.isSatellite) return membership
  const share = membership.hosts.reduce((sum, h) => sum + h.probability, 0)
  const own = membership.hosts.find((h) => h.slug === chosen?.slug)?.probability ?? 0
  return { ...membership, isSatellite, probability: isSatellite ? own : 1 - share }
}

/** The host of a galaxy by the rule, or by decree: the assignment alone, without any draw. null for none, or without a distance. */
export function assignedHost(n: Neighbourhood, id: number, policy: Policy, overrides: HostOverrides = NO_OVERRIDES): Neighbour | null {
  const i = n.indexOf.get(id)
  const galaxy = n.galaxies[i ?? -1]
  if (i === undefined || !galaxy) return null
  const override = overrides.get(id)
  if (override === null) return null
  const chosen = override === undefined ? undefined : n.galaxies[n.indexOf.get(override) ?? -1]
  if (chosen) return chosen
  const main = n.galaxies[disturbersOf(n, i, policy.host.massRatio).main]
  return main && Math.hypot(galaxy.x - main.x, galaxy.y - main.y, galaxy.z - main.z) <= reachOf(main.mass, policy.host) ? main : null
}

function velocityDifference(galaxy: Neighbour, main: Neighbour): { host_dv: number | null; host_dv_err: number | null } {
  const rest = restOf(main.vGsr, Math.hypot(main.x, main.y, main.z))
  if (galaxy.vGsr === null || rest === null) return { host_dv: null, host_dv_err: null }
  // Who is at rest by definition is so without an error.
  const mainError = main.vGsr === null ? 0 : main.vError
  return { host_dv: galaxy.vGsr - rest, host_dv_err: galaxy.vError === null || mainError === null ? null : Math.hypot(galaxy.vError, mainError) }
}

/** Host of satellites, satellite, or in the field; a satellite that has satellites of its own is a satellite. */
export function relationWord(isSatellite: boolean, hasSatellites: boolean): HostRelation {
  if (isSatellite) return 'satellite'
  return hasSatellites ? 'host' : 'field'
}
