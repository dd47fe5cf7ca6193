/**
 * The neighbourhood of one revision, kept in memory between approvals: reading 100,000 places costs more than an approval may. Nothing is
 * trusted that the database does not confirm: an entry belongs to a revision, and is brought to another by the rows that changed between.
 */
import type { Knex } from 'knex'
import { neighbourFrom, neighbourhoodOf, withChanges, type Neighbour, type Neighbourhood, type Place } from '../../../core/derive/neighbourhood.ts'
import type { CatalogueRow } from '../../../core/columns.ts'

export interface Surroundings {
  revision: number
  neighbourhood: Neighbourhood
  /** By galaxy id, of every galaxy that has a row. */
  places: ReadonlyMap<number, Place>
}

/** One entry a database; knex keeps one settings object for a pool and the transactions on it. */
const entries = new WeakMap<object, Surroundings>()

interface PlaceRow extends CatalogueRow {
  galaxy: number
  main_disturber_galaxy: number | null
  index_disturber_galaxy: number | null
}

const COLUMNS = 'galaxy, slug, name, status, sgx, sgy, sgz, dm, dm_err, dm_err_sys, log_mstar, v_gsr, host_relation, main_disturber_galaxy, index_disturber_galaxy'

/**
 * The surroundings as of a committed revision.
 *
 * @param trx - must see that revision, and no rows of its own making in catalogue_rows
 */
export async function surroundingsAt(trx: Knex, revision: number): Promise<Surroundings> {
  const key = (trx.client as { config: object }).config
  const known = entries.get(key)
  if (known?.revision === revision) return known
  const fresh = known && known.revision < revision ? await follow(trx, known, revision) : await read(trx, revision)
  if (!known || known.revision < revision) entries.set(key, fresh)
  return fresh
}

async function read(trx: Knex, revision: number): Promise<Surroundings> {
  const { rows } = (await trx.raw(`select ${COLUMNS} from catalogue_rows where rev_from <= ? and (rev_to is null or rev_to > ?)`, [revision, revision])) as { rows: PlaceRow[] }
  const neighbours = rows.flatMap((row) => neighbourFrom(row.galaxy, row) ?? [])
  return { revision, neighbourhood: neighbourhoodOf(neighbours), places: new Map(rows.map((row) => [row.galaxy, placeFrom(row)])) }
}

async function follow(trx: Knex, known: Surroundings, revision: number): Promise<Surroundings> {
  const { rows } = (await trx.raw(
    `select ${COLUMNS} from catalogue_rows where rev_from > ? and rev_from <= ? and (rev_to is null or rev_to > ?)`,
    [known.revision, revision, revision],
  )) as { rows: PlaceRow[] }
  if (rows.length === 0) return { ...known, revision }
  const places = new Map(known.places)
  const changes = new Map<number, Neighbour | null>()
  for (const row of rows) {
    places.set(row.galaxy, placeFrom(row))
    const neighbour = neighbourFrom(row.galaxy, row)
    if (neighbour || known.neighbourhood.indexOf.has(row.galaxy)) changes.set(row.galaxy, neighbour)
  }
  return { revision, neighbourhood: withChanges(known.neighbourhood, changes), places }
}

function placeFrom(row: PlaceRow): Place {
  return { mainDisturber: row.main_disturber_galaxy, indexDisturber: row.index_disturber_galaxy, isSatellite: row.host_relation === 'satellite' }
}
