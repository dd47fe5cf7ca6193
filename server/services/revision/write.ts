/**
 * Writes what a plan says: versions that no longer hold are closed, new ones begin. Only rows that differ are touched. A batch is text by then,
 * so that it can be made in another thread than the one that holds the transaction.
 */
import type { Knex } from 'knex'
import { unitVector } from '../../../core/astro/sphere.ts'
import { COMPUTED_COLUMNS } from './compare.ts'
import type { PlannedAdopted, PlannedRow, RevisionPlan } from './plan.ts'

const BATCH = 1000

/** Versions of one table that end, and the records of those that begin. */
export interface Batch {
  table: 'adopted_values' | 'catalogue_rows'
  /** Galaxies whose versions end; of adopted values, the quantity of each. */
  ending: number[]
  quantities: string[]
  /** Names of the columns, and a JSON list of records. */
  columns: readonly string[]
  records: string
  count: number
}

export async function writeRevision(trx: Knex, plan: RevisionPlan): Promise<void> {
  for (const part of parts(plan.adopted)) await writeBatch(trx, plan.revision, adoptedBatch(plan.revision, part))
  const at = new Date().toISOString()
  for (const part of parts(plan.rows)) await writeBatch(trx, plan.revision, rowsBatch(plan.revision, at, part))
}

export async function writeBatch(trx: Knex, revision: number, { table, ending, quantities, columns, records, count }: Batch): Promise<void> {
  if (ending.length > 0 && table === 'adopted_values') {
    await trx.raw(
      `update adopted_values a set rev_to = ? from unnest(?::integer[], ?::text[]) as p(galaxy, quantity)
        where a.rev_to is null and a.galaxy = p.galaxy and a.quantity = p.quantity`,
      [revision, ending, quantities],
    )
  } else if (ending.length > 0) await trx.raw('update catalogue_rows set rev_to = ? where rev_to is null and galaxy = any(?)', [revision, ending])
  if (count === 0) return
  // Many records in one statement, as JSON: numbers keep every digit, and the number of parameters has no bound.
  const list = columns.join(', ')
  await trx.raw(`insert into ${table} (${list}) select ${list} from json_populate_recordset(null::${table}, ?::json)`, [records])
}

const ADOPTED_COLUMNS = [
  'galaxy', 'quantity', 'value', 'text_value', 'err_plus', 'err_minus', 'err_sys', 'n_used', 'n_all', 'chi2', 'dof', 'scatter', 'method', 'sentence', 'reasons', 'override_reason', 'rev_from',
] as const

export function adoptedBatch(revision: number, planned: readonly PlannedAdopted[]): Batch {
  const ending = planned.filter((p) => p.standing)
  const records = planned.flatMap(({ galaxyId, quantity, after: a }): Record<(typeof ADOPTED_COLUMNS)[number], unknown>[] =>
    a === null
      ? []
      : [{
          galaxy: galaxyId, quantity, value: a.value, text_value: a.textValue, err_plus: a.errPlus, err_minus: a.errMinus, err_sys: a.errSys, n_used: a.nUsed, n_all: a.nAll,
          chi2: a.chi2, dof: a.dof, scatter: a.scatter, method: a.method, sentence: a.sentence, reasons: a.reasons, override_reason: a.override, rev_from: revision,
        }],
  )
  return { table: 'adopted_values', ending: ending.map((p) => p.galaxyId), quantities: ending.map((p) => p.quantity), columns: ADOPTED_COLUMNS, records: JSON.stringify(records), count: records.length }
}

const ROW_COLUMNS = [
  ...COMPUTED_COLUMNS, 'galaxy', 'revision', 'updated_at', 'main_disturber_galaxy', 'index_disturber_galaxy', 'possible_hosts', 'unit_vector', 'sg_position', 'rev_from',
]

/** @param at - when, ISO 8601 */
export function rowsBatch(revision: number, at: string, planned: readonly PlannedRow[]): Batch {
  const ending = planned.flatMap((p) => (p.before === null ? [] : [p.galaxyId]))
  return { table: 'catalogue_rows', ending, quantities: [], columns: ROW_COLUMNS, records: JSON.stringify(planned.map((p) => record(p, revision, at))), count: planned.length }
}

function record({ galaxyId, after, mainDisturber, indexDisturber, possibleHosts }: PlannedRow, revision: number, at: string): Record<string, unknown> {
  const columns = Object.fromEntries(COMPUTED_COLUMNS.map((key) => [key, after[key] ?? null]))
  const { sgx, sgy, sgz, ra, dec } = columns
  return {
    ...columns, galaxy: galaxyId, revision, updated_at: at, main_disturber_galaxy: mainDisturber, index_disturber_galaxy: indexDisturber, possible_hosts: possibleHosts,
    unit_vector: `(${unitVector(Number(ra), Number(dec)).join(',')})`, sg_position: sgx === null ? null : `(${String(sgx)},${String(sgy)},${String(sgz)})`, rev_from: revision,
  }
}

/** @returns the list in parts that one statement can take */
export function* parts<T>(list: readonly T[], size = BATCH): Generator<readonly T[]> {
  for (let i = 0; i < list.length; i += size) yield list.slice(i, i + size)
}
