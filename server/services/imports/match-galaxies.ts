/** Which galaxies of the catalogue the rows of a table mean: by any name, then by position, and never silently. */
import type { Knex } from 'knex'
import { separation } from '../../../core/astro/sphere.ts'
import { nameKey } from '../../../core/names.ts'
import type { ReadRow } from '../../../core/formats/import-row.ts'
import { galaxiesById, namesByKey } from '../changes/current.ts'
import type { HeldGalaxy } from '../changes/current.ts'
import { galaxiesNear } from '../changes/near.ts'
import type { Place } from '../changes/near.ts'

/** Two entries closer than this are taken for one galaxy, degrees. */
const SAME_PLACE_DEG = 1 / 60
/** A name whose galaxy lies further from the row's position than this cannot be meant, degrees. Centres of the nearest galaxies differ by up to a degree. */
const ELSEWHERE_DEG = 1

export type GalaxyMatch =
  | { kind: 'held'; id: number; slug: string; name: string; byPositionArcsec: number | null }
  | { kind: 'new'; key: string; name: string; byPositionArcsec: number | null }
  | { kind: 'none'; problem: string }

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
  const strange = new Map([...places].flatMap(([key, place]) => (place && !owners.has(key) ? [[key, place] as const] : [])))
  const near = await galaxiesNear(knex, strange, SAME_PLACE_DEG)
  const fresh = new NewGalaxies()

  return rows.map((row): GalaxyMatch | undefined => {
    const key = nameKey(row.galaxy)
    if (row.galaxy === '') return undefined
    if (key === '') return { kind: 'none', problem: `"${row.galaxy}" is no name: it has neither letters nor digits.` }
    const place = places.get(key) ?? null
    const own = row.ra !== null && row.dec !== null ? { ra: row.ra, dec: row.dec } : null
    const named = owners.get(key)
    if (named) return matchNamed(row.galaxy, named, own ?? place)
    const by = near.get(key)?.[0]
    if (by) return { kind: 'held', id: by.galaxy, slug: by.slug, name: by.name, byPositionArcsec: by.separationArcsec }
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

function separationDeg(a: Place, b: Place): number {
  return separation({ lon: a.ra, lat: a.dec }, { lon: b.ra, lat: b.dec })
}

/** "12″", "3.4′", "5.1°" */
export function angleWords(arcsec: number): string {
  if (arcsec < 60) return `${arcsec.toFixed(arcsec < 10 ? 1 : 0)}″`
  if (arcsec < 3600) return `${(arcsec / 60).toFixed(1)}′`
  return `${(arcsec / 3600).toFixed(1)}°`
}
