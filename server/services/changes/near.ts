/** Galaxies of the catalogue near given places on the sky. */
import type { Knex } from 'knex'
import { unitVector } from '../../../core/astro/sphere.ts'

export interface Place {
  /** deg, ICRS */
  ra: number
  dec: number
}

export interface NearGalaxy {
  galaxy: number
  slug: string
  name: string
  separationArcsec: number
}

/**
 * The galaxies within a radius of each place, nearest first, at most `most` of them; places with none are left out.
 *
 * @param places - by any key
 * @param radius - deg
 */
export async function galaxiesNear(knex: Knex, places: ReadonlyMap<string, Place>, radius: number, most = 1): Promise<Map<string, NearGalaxy[]>> {
  if (places.size === 0) return new Map()
  const entries = [...places].map(([key, { ra, dec }]) => ({ key, vector: unitVector(ra, dec) }))
  const chord = 2 * Math.sin(((radius / 2) * Math.PI) / 180)
  const { rows } = (await knex.raw(
    `SELECT p.key, r.galaxy, r.slug, r.name, r.unit_vector <-> cube(ARRAY[p.x, p.y, p.z]) AS chord
     FROM unnest(?::text[], ?::float8[], ?::float8[], ?::float8[]) AS p (key, x, y, z)
     CROSS JOIN LATERAL (
       SELECT galaxy, slug, name, unit_vector FROM catalogue_rows
       WHERE rev_to IS NULL AND unit_vector <@ cube_enlarge(cube(ARRAY[p.x, p.y, p.z]), ?, 3)
       ORDER BY unit_vector <-> cube(ARRAY[p.x, p.y, p.z]) LIMIT ?) AS r
     ORDER BY p.key, chord`,
    [entries.map((e) => e.key), entries.map((e) => e.vector[0]), entries.map((e) => e.vector[1]), entries.map((e) => e.vector[2]), chord, most],
  )) as { rows: { key: string; galaxy: number; slug: string; name: string; chord: number }[] }
  const near = new Map<string, NearGalaxy[]>()
  for (const { key, chord: distance, ...galaxy } of rows) {
    // The box about a place is larger than the circle in it.
    if (distance > chord) continue
    const separationArcsec = ((2 * Math.asin(Math.min(1, distance / 2)) * 180) / Math.PI) * 3600
    near.set(key, [...(near.get(key) ?? []), { ...galaxy, separationArcsec }])
  }
  return near
}
