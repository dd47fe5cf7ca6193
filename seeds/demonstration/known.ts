/** What the invented curator sees in the catalogue when he goes to work. */
import type { Knex } from 'knex'

export interface KnownGalaxy {
  slug: string
  name: string
  ra: number
  dec: number
  /** Adopted distance modulus, mag; distance, Mpc. */
  dm: number
  distance: number
  velocity: number | null
  nDistance: number
  /** Method with the largest weight in the adopted distance. */
  method: string
}

export interface KnownMeasurement {
  id: number
  galaxy: string
  value: number
  source: number
  errPlus: number | null
}

/** Satellites with a distance, by slug. */
export async function knownSatellites(knex: Knex): Promise<KnownGalaxy[]> {
  return (await knex('catalogueRows')
    .select('slug', 'name', 'ra', 'dec', 'dm', 'distance', 'nDistance', 'vHel as velocity', 'distanceMethod as method')
    .whereNull('revTo').whereNotNull('host').whereNotNull('dm')
    .orderBy('slug')) as KnownGalaxy[]
}

export function fourOf(list: readonly KnownGalaxy[]): [KnownGalaxy, KnownGalaxy, KnownGalaxy, KnownGalaxy] {
  const [a, b, c, d] = list
  if (!a || !b || !c || !d) throw new RangeError(`the invented neighbourhood is too small for the desk: ${list.length} of a kind`)
  return [a, b, c, d]
}

const MEASURED = ['m.lineage as id', 'r.slug as galaxy', 'm.value', 'm.source', 'm.errPlus']

/** Two measurements by a method, of galaxies that have others. */
export async function measurementsBy(knex: Knex, method: string): Promise<KnownMeasurement[]> {
  return (await knex('measurements as m')
    .join('catalogueRows as r', (on) => void on.on('r.galaxy', 'm.galaxy').onNull('r.revTo'))
    .select(MEASURED)
    .whereNull('m.revTo').where('m.method', method).where('r.nDistanceAll', '>=', 2)
    .orderBy([{ column: 'm.errPlus', order: 'desc', nulls: 'first' }, { column: 'm.id' }]).limit(2)) as KnownMeasurement[]
}

/** Velocities of satellites, with an error, in the order in which they were entered. */
export async function velocitiesHeld(knex: Knex, most: number): Promise<KnownMeasurement[]> {
  return (await knex('measurements as m')
    .join('catalogueRows as r', (on) => void on.on('r.galaxy', 'm.galaxy').onNull('r.revTo'))
    .select(MEASURED)
    .whereNull('m.revTo').where('m.quantity', 'velocity').whereNotNull('r.host').whereNotNull('m.errPlus')
    .orderBy('m.id').limit(most)) as KnownMeasurement[]
}

/** A galaxy whose adopted distance comes from two TRGB values, and the more precise of the two. */
export async function doublyMeasured(knex: Knex): Promise<KnownMeasurement & { name: string }> {
  const { rows } = (await knex.raw(
    `select m.lineage as id, r.slug as galaxy, r.name, m.value, m.source, m.err_plus as "errPlus"
       from catalogue_rows r join measurements m on m.galaxy = r.galaxy and m.rev_to is null and m.quantity = 'distance_modulus' and m.method = 'trgb'
      where r.rev_to is null and r.host is not null and r.n_distance = 2 and r.distance_method = 'trgb'
      order by r.slug, m.err_plus, m.id limit 1`,
  )) as { rows: (KnownMeasurement & { name: string })[] }
  const [found] = rows
  if (!found) throw new RangeError('the invented neighbourhood has no galaxy with two tips')
  return found
}
