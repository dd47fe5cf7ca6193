/** Writes what a plan says: versions that no longer hold are closed, new ones begin. Only rows that differ are touched. */
import type { Knex } from 'knex'
import { unitVector } from '../../../core/astro/sphere.ts'
import { COMPUTED_COLUMNS } from './compare.ts'
import type { PlannedAdopted, PlannedRow, RevisionPlan } from './plan.ts'

const BATCH = 1000

export async function writeRevision(trx: Knex, plan: RevisionPlan): Promise<void> {
  await writeAdopted(trx, plan.revision, plan.adopted)
  await writeRows(trx, plan.revision, plan.rows)
}

export async function writeAdopted(trx: Knex, revision: number, planned: readonly PlannedAdopted[]): Promise<void> {
  for (const batch of batches(planned)) {
    const ending = batch.filter((p) => p.standing)
    if (ending.length > 0) {
      await trx.raw(
        `update adopted_values a set rev_to = ? from unnest(?::integer[], ?::text[]) as p(galaxy, quantity)
          where a.rev_to is null and a.galaxy = p.galaxy and a.quantity = p.quantity`,
        [revision, ending.map((p) => p.galaxyId), ending.map((p) => p.quantity)],
      )
    }
    const records = batch.flatMap(({ galaxyId, quantity, after: a }) =>
      a === null
        ? []
        : [{
            galaxy: galaxyId, quantity, value: a.value, text_value: a.textValue, err_plus: a.errPlus, err_minus: a.errMinus, err_sys: a.errSys, n_used: a.nUsed, n_all: a.nAll,
            chi2: a.chi2, dof: a.dof, scatter: a.scatter, method: a.method, sentence: a.sentence, reasons: a.reasons, override_reason: a.override, rev_from: revision,
          }],
    )
    await insertRecords(trx, 'adopted_values', records)
  }
}

export async function writeRows(trx: Knex, revision: number, planned: readonly PlannedRow[]): Promise<void> {
  const updatedAt = new Date().toISOString()
  for (const batch of batches(planned)) {
    const ending = batch.flatMap((p) => (p.before === null ? [] : [p.galaxyId]))
    if (ending.length > 0) await trx.raw('update catalogue_rows set rev_to = ? where rev_to is null and galaxy = any(?)', [revision, ending])
    await insertRecords(trx, 'catalogue_rows', batch.map((p) => record(p, revision, updatedAt)))
  }
}

function record({ galaxyId, after, mainDisturber, indexDisturber, possibleHosts }: PlannedRow, revision: number, updatedAt: string): Record<string, unknown> {
  const columns = Object.fromEntries(COMPUTED_COLUMNS.map((key) => [key, after[key] ?? null]))
  const { sgx, sgy, sgz, ra, dec } = columns
  return {
    ...columns, galaxy: galaxyId, revision, updated_at: updatedAt, main_disturber_galaxy: mainDisturber, index_disturber_galaxy: indexDisturber, possible_hosts: possibleHosts,
    unit_vector: `(${unitVector(Number(ra), Number(dec)).join(',')})`, sg_position: sgx === null ? null : `(${String(sgx)},${String(sgy)},${String(sgz)})`, rev_from: revision,
  }
}

/** Many records in one statement, as JSON: numbers keep every digit, and the number of parameters has no bound. */
async function insertRecords(trx: Knex, table: 'adopted_values' | 'catalogue_rows', records: readonly Record<string, unknown>[]): Promise<void> {
  const first = records[0]
  if (!first) return
  const columns = Object.keys(first).join(', ')
  await trx.raw(`insert into ${table} (${columns}) select ${columns} from json_populate_recordset(null::${table}, ?::json)`, [JSON.stringify(records)])
}

function* batches<T>(list: readonly T[]): Generator<readonly T[]> {
  for (let i = 0; i < list.length; i += BATCH) yield list.slice(i, i + BATCH)
}
