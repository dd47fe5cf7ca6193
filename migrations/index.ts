import type { Knex } from 'knex'
import * as people from './0001_people.ts'
import * as desk from './0002_desk.ts'
import * as catalogue from './0003_catalogue.ts'
import * as outlets from './0004_outlets.ts'
import * as sessionsEnd from './0005_sessions_end.ts'
import * as catalogueSorts from './0006_catalogue_sorts.ts'
import * as bandsDiametersErrors from './0007_bands_diameters_errors.ts'
import * as possibleHosts from './0008_possible_hosts.ts'

/** One step of the schema. `up` runs in a transaction of its own; `down` undoes it. */
export interface Migration {
  up(knex: Knex): Promise<void>
  down(knex: Knex): Promise<void>
}

/**
 * Every migration by name, oldest first. The map is written out by hand, not read from the folder, so that one name is recorded
 * whether the code runs as .ts or compiled as .js. A new one: a file `0009_what_it_does.ts` exporting `up` and `down`, and
 * a line here.
 *
 * A migration that has been released is never edited; a further one mends it.
 */
export const migrations: Readonly<Record<string, Migration>> = {
  '0001_people': people,
  '0002_desk': desk,
  '0003_catalogue': catalogue,
  '0004_outlets': outlets,
  '0005_sessions_end': sessionsEnd,
  '0006_catalogue_sorts': catalogueSorts,
  '0007_bands_diameters_errors': bandsDiametersErrors,
  '0008_possible_hosts': possibleHosts,
}
