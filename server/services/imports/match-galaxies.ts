/** Which galaxies of the catalogue the rows of a table mean: by any name, then by position, and never silently. */
import type { Knex } from 'knex'
import { separation, unitVector } from '../../../core/astro/sphere.ts'
import { nameKey } from '../../../core/names.ts'
import type { ReadRow } from '../../../core/formats/import-row.ts'
import { galaxiesById, namesByKey } from '../changes/current.ts'
import type { HeldGalaxy } from '../changes/current.ts'

/** Two entries closer than this are taken for one galaxy, degrees. */
const SAME_PLACE_DEG = 1 / 60
/** A name whose galaxy lies further from the row's position than this cannot be meant, degrees. Centres of the nearest galaxies differ by up to a degree. */
const ELSEWHERE_DEG = 1

export type GalaxyMatch =
  | { kind: 'held'; id: number; slug: string; name: string; byPositionArcsec: number | null }
  | { kind: 'new'; key: string; name: string; byPositionArcsec: number | null }
  | { kind: 'none'; problem: string }

interface Place {
  ra: number
  dec: number
}

/** A match for each row; a row without a name has none. */
export async function matchGalaxies(knex: Knex, rows: readonly ReadRow[], addGalaxies: boolean): Promise<(GalaxyMatch | undefined)[]> {
  const places = new Map<string, Place | null>()
  for (const row of rows) {
    const key = nameKey(row.galaxy)
    if (key !== '' && places.get(key) == null) places.set(key, row.ra !== null && row.dec !== null ? { ra: row.ra, dec: row.dec } : null)
  }
  const names = await namesByKey(knex, places.keys())
  const held = await galaxiesById(knex, names.map((n) => n.galaxy))
  const owners = new Map<string, HeldGalaxy[]>()
  for (const n of names) {
    const owner = held.get(n.galaxy)
    const known = owners.get(n.nameKey) ?? []
    if (owner && !known.includes(owner)) owners.set(n.nameKey, [...known, owner])
  }
  const near = await nearest(knex, new Map([...places].flatMap(([key, place]) => (place && !owners.has(key) ? [[key, place] as const] : []))))
  const fresh = new NewGalaxies()

  return rows.map((row): GalaxyMatch | undefined => {
    const key = nameKey(row.galaxy)
    if (row.galaxy === '') return undefined
    if (key === '') return { kind: 'none', problem: `"${row.galaxy}" is no name: it has neither letters nor digits.` }
    const place = places.get(key) ?? null
    const own = row.ra !== null && row.dec !== null ? { ra: row.ra, dec: row.dec } : null
    const named = owners.get(key)
    if (named) return matchNamed(row.galaxy, named, own ?? place)
    const by = near.get(key)
    if (by) return { kind: 'held', id: by.galaxy.id, slug: by.galaxy.slug, name: by.galaxy.designation, byPositionArcsec: by.arcsec }
    if (!place) return { kind: 'none', problem: `The catalogue knows no galaxy "${row.galaxy}", and the table gives no position to add it with.` }
    if (!addGalaxies) return { kind: 'none', problem: `The catalogue knows no galaxy "${row.galaxy}". Let the import add galaxies, or correct the name.` }
    if (own && separationDeg(own, place) > SAME_PLACE_DEG) {
      return { kind: 'none', problem: `This row puts ${row.galaxy} ${angleWords(separationDeg(own, place) * 3600)} from where an earlier row of the table has it.` }
    }
    return fresh.match(key, row.galaxy, place)
  })
}

function matchNamed(name: string, owners: readonly HeldGalaxy[], place: Place | null): GalaxyMatch {
  const [only] = owners
  const chosen = owners.length === 1 ? only : place ? owners.find((g) => separationDeg(g, place) <= SAME_PLACE_DEG) : undefined
  if (!chosen) return { kind: 'none', problem: `"${name}" may mean ${owners.map((g) => g.designation).join(' or ')}. Write the designation that is meant.` }
  const away = place ? separationDeg(chosen, place) : 0
  if (away > ELSEWHERE_DEG) {
    return { kind: 'none', problem: `${chosen.designation} of the catalogue lies ${angleWords(away * 3600)} from the position in this row: the name or the position is wrong.` }
  }
  return { kind: 'held', id: chosen.id, slug: chosen.slug, name: chosen.designation, byPositionArcsec: null }
}

/** The galaxies that a table itself brings in; two names at one place are one galaxy. */
class NewGalaxies {
  private readonly known = new Map<string, GalaxyMatch>()
  private readonly strips = new Map<number, { key: string; name: string; place: Place }[]>()

  match(key: string, name: string, place: Place): GalaxyMatch {
    const before = this.known.get(key)
    if (before) return before
    const strip = Math.floor(place.dec / SAME_PLACE_DEG)
    const close = [strip - 1, strip, strip + 1].flatMap((s) => this.strips.get(s) ?? []).find((g) => separationDeg(g.place, place) <= SAME_PLACE_DEG)
    const match: GalaxyMatch = close
      ? { kind: 'new', key: close.key, name: close.name, byPositionArcsec: separationDeg(close.place, place) * 3600 }
      : { kind: 'new', key, name, byPositionArcsec: null }
    if (!close) this.strips.set(strip, [...(this.strips.get(strip) ?? []), { key, name, place }])
    this.known.set(key, match)
    return match
  }
}

/** The nearest galaxy of the catalogue to each place, where one is close enough to be the same. */
async function nearest(knex: Knex, places: ReadonlyMap<string, Place>): Promise<Map<string, { galaxy: HeldGalaxy; arcsec: number }>> {
  if (places.size === 0) return new Map()
  const entries = [...places].map(([key, place]) => ({ key, vector: unitVector(place.ra, place.dec) }))
  const chord = 2 * Math.sin(((SAME_PLACE_DEG / 2) * Math.PI) / 180)
  const { rows } = (await knex.raw(
    `SELECT p.key, r.galaxy, r.unit_vector <-> cube(ARRAY[p.x, p.y, p.z]) AS chord
     FROM unnest(?::text[], ?::float8[], ?::float8[], ?::float8[]) AS p (key, x, y, z)
     CROSS JOIN LATERAL (
       SELECT galaxy, unit_vector FROM catalogue_rows
       WHERE rev_to IS NULL AND unit_vector <@ cube_enlarge(cube(ARRAY[p.x, p.y, p.z]), ?, 3)
       ORDER BY unit_vector <-> cube(ARRAY[p.x, p.y, p.z]) LIMIT 1) AS r`,
    [entries.map((e) => e.key), entries.map((e) => e.vector[0]), entries.map((e) => e.vector[1]), entries.map((e) => e.vector[2]), chord],
  )) as { rows: { key: string; galaxy: number; chord: number }[] }
  const held = await galaxiesById(knex, rows.map((r) => r.galaxy))
  return new Map(
    rows.flatMap((r) => {
      const galaxy = held.get(r.galaxy)
      const degrees = (2 * Math.asin(Math.min(1, r.chord / 2)) * 180) / Math.PI
      return galaxy && degrees <= SAME_PLACE_DEG ? [[r.key, { galaxy, arcsec: degrees * 3600 }] as const] : []
    }),
  )
}

function separationDeg(a: Place, b: Place): number {
  return separation({ lon: a.ra, lat: a.dec }, { lon: b.ra, lat: b.dec })
}

/** "12″", "3.4′", "5.1°" */
export function angleWords(arcsec: number): string {
  if (arcsec < 60) return `${arcsec.toFixed(arcsec < 10 ? 1 : 0)}″`
  if (arcsec < 3600) return `${(arcsec / 60).toFixed(1)}′`
  return `${(arcsec / 3600).toFixed(1)}°`
}
