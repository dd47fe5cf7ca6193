/** The columns that depend on other galaxies. */
import { TIDAL_INDEX_CONSTANT } from '../astro/constants.ts'
import { angleBetween } from '../astro/sphere.ts'
import { degrees } from '../astro/units.ts'
import type { CatalogueValue, HostRelation } from '../columns.ts'
import type { Policy } from '../scale/policy.ts'
import { disturbersOf } from './disturber.ts'
import { membershipOf } from './membership.ts'
import type { Neighbourhood, Place } from './neighbourhood.ts'

export interface Relation extends Place {
  columns: Readonly<Record<string, CatalogueValue>>
}

const NOWHERE: Relation = {
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
  const found = disturbersOf(n, i, policy.host.massRatio)
  const index = n.galaxies[found.index]
  const main = n.galaxies[found.main]
  const tidalIndex = index ? Math.log10(found.indexPull) + TIDAL_INDEX_CONSTANT : null
  if (!main) return { ...NOWHERE, indexDisturber: index?.id ?? null, columns: { ...NOWHERE.columns, tidal_index: tidalIndex } }
  const membership = membershipOf(galaxy, main, policy.host)
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
