/**
 * The neighbourhood of one revision, kept in memory between approvals: reading 100,000 places costs more than an approval may. Nothing is
 * trusted that the database does not confirm: an entry belongs to a revision by its number and the transaction that made it, and is brought
 * to another by the rows that changed between.
 */
import type { Knex } from 'knex'
import { neighbourFrom, neighbourhoodOf, withChanges, type Neighbour, type Neighbourhood, type Place } from '../../../core/derive/neighbourhood.ts'
import { placeIn, placesAfter, placesOf, type Places } from '../../../core/derive/places.ts'
import type { CatalogueRow } from '../../../core/columns.ts'

export interface Surroundings {
  revision: number
  neighbourhood: Neighbourhood
  places: Places
  /** How many satellites each galaxy has that has any, by its id. */
  satellites: ReadonlyMap<number, number>
}

interface Entry extends Surroundings {
  madeBy: string
}

/** One entry a database; knex keeps one settings object for a pool and the transactions on it. */
const entries = new WeakMap<object, Entry>()

interface PlaceRow extends CatalogueRow {
  galaxy: number
  main_disturber_galaxy: number | null
  index_disturber_galaxy: number | null
}

const COLUMNS = 'galaxy, slug, name, status, sgx, sgy, sgz, dm, dm_err, dm_err_sys, log_mstar, v_gsr, v_hel_err, host_relation, main_disturber_galaxy, index_disturber_galaxy'

/**
 * The surroundings as of a revision.
 *
 * @param trx - must see that revision; rows of a later one, its own among them, are not looked at
 */
export async function surroundingsAt(trx: Knex, revision: number): Promise<Surroundings> {
  const key = (trx.client as { config: object }).config
  const known = entries.get(key)
  const makers = await makersOf(trx, known ? [known.revision, revision] : [revision])
  const maker = makers.get(revision)
  const trusted = known && makers.get(known.revision)?.madeBy === known.madeBy ? known : undefined
  if (trusted?.revision === revision) return trusted
  const fresh = trusted && trusted.revision < revision ? await follow(trx, trusted, revision) : await read(trx, revision)
  // A revision that this transaction made may yet be rolled back. An older one than is kept is not worth keeping.
  if (maker && !maker.here && (!trusted || trusted.revision < revision)) entries.set(key, { ...fresh, madeBy: maker.madeBy })
  return fresh
}

/**
 * Reads the surroundings of the newest revision, or brings them up to it, before the catalogue's lock is asked for: the first approval of a
 * process would else hold up the others for as long as reading the whole catalogue takes.
 */
export async function readSurroundings(knex: Knex): Promise<void> {
  const newest = (await knex('revisions').max('number as number').first()) as { number: number | null } | undefined
  if (newest?.number != null) await surroundingsAt(knex, newest.number)
}

interface Maker {
  /** Tells a revision from another that got the same number after a rollback or a restore. */
  madeBy: string
  /** Whether it is of this very transaction. */
  here: boolean
}

async function makersOf(trx: Knex, revisions: readonly number[]): Promise<Map<number, Maker>> {
  const { rows } = (await trx.raw(
    `select number, xmin::text || ' ' || approved_at as "madeBy", coalesce(xmin::text = (pg_current_xact_id_if_assigned()::text::numeric % 4294967296)::text, false) as here
       from revisions where number = any(?)`,
    [[...revisions]],
  )) as { rows: (Maker & { number: number })[] }
  return new Map(rows.map(({ number, ...maker }) => [number, maker]))
}

async function read(trx: Knex, revision: number): Promise<Surroundings> {
  const { rows } = (await trx.raw(`select ${COLUMNS} from catalogue_rows where rev_from <= ? and (rev_to is null or rev_to > ?)`, [revision, revision])) as { rows: PlaceRow[] }
  const known = new Map(rows.map((row) => [row.galaxy, placeFrom(row)]))
  const satellites = new Map<number, number>()
  for (const place of known.values()) count(satellites, place, 1)
  const neighbourhood = neighbourhoodOf(rows.flatMap((row) => neighbourFrom(row.galaxy, row) ?? []))
  return { revision, neighbourhood, places: placesOf(neighbourhood, known), satellites }
}

async function follow(trx: Knex, known: Surroundings, revision: number): Promise<Surroundings> {
  const { rows } = (await trx.raw(
    `select ${COLUMNS} from catalogue_rows where rev_from > ? and rev_from <= ? and (rev_to is null or rev_to > ?)`,
    [known.revision, revision, revision],
  )) as { rows: PlaceRow[] }
  if (rows.length === 0) return { ...known, revision }
  const satellites = new Map(known.satellites)
  const changes = new Map<number, Neighbour | null>()
  const fresh = new Map(rows.map((row) => [row.galaxy, placeFrom(row)]))
  for (const row of rows) {
    const neighbour = neighbourFrom(row.galaxy, row)
    if (neighbour || known.neighbourhood.indexOf.has(row.galaxy)) changes.set(row.galaxy, neighbour)
  }
  for (const [id, place] of fresh) {
    count(satellites, placeIn(known.neighbourhood, known.places, id), -1)
    count(satellites, place, 1)
  }
  const neighbourhood = withChanges(known.neighbourhood, changes)
  return { revision, neighbourhood, places: placesAfter(known.neighbourhood, known.places, neighbourhood, changes.keys(), fresh), satellites }
}

function count(satellites: Map<number, number>, place: Place | undefined, by: 1 | -1): void {
  if (!place?.isSatellite || place.mainDisturber === null) return
  satellites.set(place.mainDisturber, (satellites.get(place.mainDisturber) ?? 0) + by)
}

function placeFrom(row: PlaceRow): Place {
  return { mainDisturber: row.main_disturber_galaxy, indexDisturber: row.index_disturber_galaxy, isSatellite: row.host_relation === 'satellite' }
}
