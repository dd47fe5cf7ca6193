/** The columns that depend on other galaxies. */
import { TIDAL_INDEX_CONSTANT } from '../astro/constants.ts'
import { angleBetween } from '../astro/sphere.ts'
import { degrees } from '../astro/units.ts'
import type { CatalogueValue, HostRelation } from '../columns.ts'
import type { Policy } from '../scale/policy.ts'
import { disturbersOf, type Disturbers } from './disturber.ts'
import { disturberSearch } from './disturber-tree.ts'
import { drawnDistances, membershipOf } from './membership.ts'
import type { Neighbour, Neighbourhood, Place } from './neighbourhood.ts'

export interface Relation extends Place {
  columns: Readonly<Record<string, CatalogueValue>>
}

/** The place of a galaxy without a distance, or without anybody who disturbs it. */
export const NOWHERE: Relation = {
  indexDisturber: null,
  mainDisturber: null,
  isSatellite: false,
  columns: {
    host: null, host_probability: null, tidal_index: null, main_disturber: null, host_sep: null, host_sep_lo: null, host_sep_hi: null, host_angle: null, host_dv: null,
  },
}

/** Where a galaxy stands among the others. Without a distance it stands nowhere; without neighbours of any mass it has no index. */
export function relationOf(n: Neighbourhood, id: number, policy: Policy): Relation {
  const i = n.indexOf.get(id)
  const galaxy = i === undefined ? undefined : n.galaxies[i]
  if (i === undefined || !galaxy) return NOWHERE
  return relationTo(n, galaxy, disturbersOf(n, i, policy.host.massRatio), policy)
}

/**
 * The same for many galaxies, far faster: the neighbours are searched through a tree, and the draws of a host are made once for all that
 * it disturbs.
 *
 * @param onProgress - called now and then with how many are done
 */
export function relationsOf(n: Neighbourhood, ids: Iterable<number>, policy: Policy, onProgress?: (done: number) => void): Map<number, Relation> {
  const search = disturberSearch(n, policy.host.massRatio)
  const relations = new Map<number, Relation>()
  const byMain = new Map<number, { galaxy: Neighbour; found: Disturbers }[]>()
  for (const id of ids) {
    // The order of the answer is that of the question.
    relations.set(id, NOWHERE)
    const i = n.indexOf.get(id)
    const galaxy = i === undefined ? undefined : n.galaxies[i]
    if (i === undefined || !galaxy) continue
    const found = search(i)
    const group = byMain.get(found.main)
    if (group) group.push({ galaxy, found })
    else byMain.set(found.main, [{ galaxy, found }])
  }
  let done = 0
  for (const [main, group] of byMain) {
    const host = n.galaxies[main]
    const distances = host && drawnDistances(host, policy.host)
    for (const { galaxy, found } of group) {
      relations.set(galaxy.id, relationTo(n, galaxy, found, policy, distances))
      if (++done % PROGRESS_EVERY === 0) onProgress?.(done)
    }
  }
  return relations
}

const PROGRESS_EVERY = 1000

function relationTo(n: Neighbourhood, galaxy: Neighbour, found: Disturbers, policy: Policy, mainDistances?: Float64Array): Relation {
  const index = n.galaxies[found.index]
  const main = n.galaxies[found.main]
  const tidalIndex = index ? Math.log10(found.indexPull) + TIDAL_INDEX_CONSTANT : null
  if (!main) return { ...NOWHERE, indexDisturber: index?.id ?? null, columns: { ...NOWHERE.columns, tidal_index: tidalIndex } }
  const membership = membershipOf(galaxy, main, policy.host, mainDistances)
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
      host_sep_lo: membership.separationLo * 1000,
      host_sep_hi: membership.separationHi * 1000,
      host_angle: degrees(angleBetween([galaxy.x, galaxy.y, galaxy.z], [main.x, main.y, main.z])),
      host_dv: galaxy.vGsr === null || main.vGsr === null ? null : galaxy.vGsr - main.vGsr,
    },
  }
}

/** Host of satellites, satellite, or in the field; a satellite that has satellites of its own is a satellite. */
export function relationWord(isSatellite: boolean, hasSatellites: boolean): HostRelation {
  if (isSatellite) return 'satellite'
  return hasSatellites ? 'host' : 'field'
}
