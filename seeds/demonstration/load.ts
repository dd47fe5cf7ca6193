/** Writes the invented galaxies and what is measured of them into the versioned tables, as one revision. */
import type { Knex } from 'knex'
import { designationOf } from '../../core/astro/designation.ts'
import { nameKey, slugOf } from '../../core/names.ts'
import { quantity } from '../../core/quantities.ts'
import type { InventedSource } from './literature.ts'
import type { DrawnMeasurement } from './drawn.ts'
import type { TrueGalaxy } from './truth.ts'

export interface Invented {
  galaxy: TrueGalaxy
  measurements: readonly DrawnMeasurement[]
}

const BATCH = 500

/** @returns ids of the sources, in the order given */
export async function addSources(trx: Knex.Transaction, sources: readonly InventedSource[], createdBy: number): Promise<number[]> {
  const rows = sources.map((s) => ({
    label: labelOf(s), title: s.title, authors: JSON.stringify(s.authors), year: s.year, venue: s.venue, kind: 'demonstration', createdBy,
  }))
  const made = (await trx('sources').insert(rows).returning('id')) as { id: number }[]
  return made.map((row) => row.id)
}

/** @returns galaxy ids, in the order given */
export async function addGalaxies(
  trx: Knex.Transaction,
  revision: number,
  invented: readonly Invented[],
  sourceIds: readonly number[],
  enteredBy: number,
): Promise<number[]> {
  const made = (await trx.raw('insert into galaxies (created_at) select now() from generate_series(1, ?) returning id', [invented.length])) as { rows: { id: number }[] }
  const ids = made.rows.map((row) => row.id)
  const versions = invented.map(({ galaxy: g }, i) => ({
    galaxy: ids[i], designation: g.designation, slug: slugOf(g.designation), status: g.absV > -7 ? 'candidate' : 'confirmed', ra: g.ra, dec: g.dec,
    class: g.class, note: null, revFrom: revision,
  }))
  const names = invented.flatMap(({ galaxy: g }, i) => {
    // One that is called by the survey's name has no other.
    const names = [...new Set([g.designation, designationOf('Demo', g.ra, g.dec)])]
    return names.map((name, k) => ({ galaxy: ids[i], name, nameKey: nameKey(name), preferred: k === 0, revFrom: revision }))
  })
  const measurements = invented.flatMap(({ measurements: list }, i) =>
    list.map(({ source, ...m }) => ({ ...m, galaxy: ids[i], source: sourceIds[source], enteredBy, revFrom: revision, published: publishedOf(m) })),
  )
  await trx.batchInsert('galaxy_versions', versions, BATCH)
  await trx.batchInsert('galaxy_names', names, BATCH)
  await trx.batchInsert('measurements', measurements, BATCH)
  return ids
}

function publishedOf(m: Omit<DrawnMeasurement, 'source'>): string | null {
  if (m.value === null) return null
  return JSON.stringify({ value: m.value, errPlus: m.errPlus, errMinus: m.errMinus, errSys: m.errSys, unit: quantity(m.quantity).unit })
}

/** "Harrow", "Harrow & Lindqvist" or "Harrow et al.", and the year. */
function labelOf(source: InventedSource): string {
  const surnames = source.authors.map((a) => a.split(',')[0] ?? a)
  const [first = 'Anonymous', second] = surnames
  const who = surnames.length > 2 ? `${first} et al.` : second ? `${first} & ${second}` : first
  return `${who} ${source.year}`
}
