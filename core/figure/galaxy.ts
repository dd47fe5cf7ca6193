import type { GalaxyClass } from '../classes.ts'
import type { Points } from '../schema/catalogue.ts'

/** What a figure knows of a galaxy. Angles in degrees (ICRS), lengths in Mpc, magnitudes in mag; null where the catalogue has no value. */
export interface FigureGalaxy {
  id: number
  slug: string
  name: string
  class: GalaxyClass
  ra: number
  dec: number
  distance: number | null
  distanceLo: number | null
  distanceHi: number | null
  sgx: number | null
  sgy: number | null
  sgz: number | null
  absV: number | null
  /** Slug of the host. */
  host: string | null
  relation: 'host' | 'satellite' | 'field'
}

/** The answer of the points route as rows. @throws RangeError when its columns are of different lengths */
export function galaxiesFromPoints(points: Points): FigureGalaxy[] {
  const at = <T>(list: readonly T[], i: number): T => {
    if (i >= list.length) throw new RangeError(`a column has ${list.length} values, fewer than the ${points.id.length} galaxies`)
    return list[i] as T
  }
  return points.id.map((id, i) => ({
    id,
    slug: at(points.slug, i),
    name: at(points.name, i),
    class: at(points.class, i),
    ra: at(points.ra, i),
    dec: at(points.dec, i),
    distance: at(points.distance, i),
    distanceLo: at(points.distanceLo, i),
    distanceHi: at(points.distanceHi, i),
    sgx: at(points.sgx, i),
    sgy: at(points.sgy, i),
    sgz: at(points.sgz, i),
    absV: at(points.absV, i),
    host: at(points.host, i),
    relation: at(points.relation, i),
  }))
}
