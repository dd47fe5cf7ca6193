/** Galaxies put straight into the catalogue with the very values that a test wants to find. */
import type { Knex } from 'knex'
import { unitVector } from '../../../core/astro/sphere.ts'
import { supergalacticPosition } from '../../../core/astro/frames.ts'
import { modulusOf } from '../../../core/astro/distance.ts'
import { COLUMNS, type CatalogueRow, type CatalogueValue } from '../../../core/columns.ts'
import { nameKey, slugOf } from '../../../core/names.ts'

export interface TestGalaxy extends Partial<CatalogueRow> {
  name: string
}

export interface PlacedGalaxy {
  id: number
  slug: string
  row: CatalogueRow
}

/** A revision; `release` also publishes it under that label. */
export async function makeRevision(knex: Knex, number: number, options: { release?: string; at?: string; by?: number } = {}): Promise<void> {
  const at = options.at ?? `2026-01-${String(number).padStart(2, '0')}T12:00:00Z`
  await knex('revisions').insert({ number, summary: `Revision ${number}`, approvedAt: at, approvedBy: options.by ?? null })
  if (options.release !== undefined) await knex('releases').insert({ label: options.release, revision: number, title: `Release ${options.release}`, publishedAt: at })
}

/** A new galaxy as of a revision, under its name and these aliases; what is not given is plain and unmeasured. */
export async function placeGalaxy(knex: Knex, revision: number, given: TestGalaxy, aliases: readonly string[] = []): Promise<PlacedGalaxy> {
  const [galaxy] = (await knex('galaxies').insert({}).returning('id')) as { id: number }[]
  if (!galaxy) throw new Error('no galaxy was made')
  const row = completed(given, revision)
  await knex('galaxyVersions').insert({
    galaxy: galaxy.id, designation: row.name, slug: row.slug, status: row.status, ra: row.ra, dec: row.dec, class: row.class, revFrom: revision,
  })
  for (const [i, name] of [given.name, ...aliases].entries()) {
    await knex('galaxyNames').insert({ galaxy: galaxy.id, name, nameKey: nameKey(name), preferred: i === 0, revFrom: revision })
  }
  await insertRow(knex, galaxy.id, revision, row)
  return { id: galaxy.id, slug: String(row.slug), row }
}

/** The galaxy with some columns changed as of a later revision; what held until then stays readable. */
export async function changeGalaxy(knex: Knex, revision: number, placed: PlacedGalaxy, changes: Partial<CatalogueRow>): Promise<PlacedGalaxy> {
  const row: CatalogueRow = { ...placed.row, ...changes, revision }
  await knex('catalogueRows').where({ galaxy: placed.id, revTo: null }).update({ revTo: revision })
  await insertRow(knex, placed.id, revision, row)
  if (row.slug !== placed.row.slug || row.name !== placed.row.name) {
    await knex('galaxyVersions').where({ galaxy: placed.id, revTo: null }).update({ revTo: revision })
    await knex('galaxyVersions').insert({ galaxy: placed.id, designation: row.name, slug: row.slug, status: row.status, ra: row.ra, dec: row.dec, class: row.class, revFrom: revision })
  }
  return { id: placed.id, slug: String(row.slug), row }
}

function completed(given: TestGalaxy, revision: number): CatalogueRow {
  const blank = Object.fromEntries(COLUMNS.map((c): [string, CatalogueValue] => [c.key, null]))
  const row: CatalogueRow = {
    ...blank, slug: slugOf(given.name), status: 'confirmed', class: 'dwarf-irregular', ra: 10, dec: 20, glon: 0, glat: 0, sgl: 0, sgb: 0, n_distance: 0, n_distance_all: 0,
    host_relation: given.host == null ? 'field' : 'satellite', n_measurements: 0, n_sources: 0, revision, updated_at: '2026-01-01T00:00:00Z', ...given,
  }
  if (typeof row.distance === 'number' && row.sgx === null) {
    const [sgx, sgy, sgz] = supergalacticPosition(Number(row.ra), Number(row.dec), row.distance)
    Object.assign(row, { sgx, sgy, sgz, dm: row.dm ?? modulusOf(row.distance) })
  }
  return row
}

async function insertRow(knex: Knex, galaxy: number, revision: number, row: CatalogueRow): Promise<void> {
  const record = {
    ...row, galaxy, rev_from: revision, unit_vector: `(${unitVector(Number(row.ra), Number(row.dec)).join(',')})`,
    sg_position: row.sgx === null ? null : `(${[row.sgx, row.sgy, row.sgz].join(',')})`,
  }
  const columns = Object.keys(record).map((key) => `"${key}"`).join(', ')
  await knex.raw(`INSERT INTO catalogue_rows (${columns}) SELECT ${columns} FROM json_populate_record(NULL::catalogue_rows, ?::json)`, [JSON.stringify(record)])
}
