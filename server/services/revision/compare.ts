/** Only what differs is written: comparing what was computed with what stands. */
import type { Knex } from 'knex'
import type { Adopted } from '../../../core/adoption/adopted.ts'
import { COLUMNS, type CatalogueRow, type CatalogueValue } from '../../../core/columns.ts'
import type { QuantityKey } from '../../../core/quantities.ts'
import type { Computed } from './adopt-galaxies.ts'
import type { PlannedAdopted, PlannedRow } from './plan.ts'

/** Stamped by the writing, so they say nothing about a difference. */
const STAMPS: ReadonlySet<string> = new Set(['revision', 'updated_at'])
export const COMPUTED_COLUMNS = COLUMNS.filter((c) => !STAMPS.has(c.key)).map((c) => c.key)

export interface StoredRow extends CatalogueRow {
  galaxy: number
  main_disturber_galaxy: number | null
  index_disturber_galaxy: number | null
  /** JSON as it was written: a list of PossibleHost. */
  possible_hosts: string
}

const STORED = ['galaxy', 'main_disturber_galaxy', 'index_disturber_galaxy', 'possible_hosts', ...COMPUTED_COLUMNS]

/** The rows that stand for these galaxies, by galaxy id. */
export async function standingRows(trx: Knex, ids: readonly number[]): Promise<Map<number, StoredRow>> {
  if (ids.length === 0) return new Map()
  const { rows } = (await trx
    .raw(`select ${STORED.map((key) => (key === 'possible_hosts' ? 'possible_hosts::text' : key)).join(', ')} from catalogue_rows where rev_to is null and galaxy = any(?)`, [[...ids]])
    .options({ rowMode: 'array' })) as { rows: CatalogueValue[][] }
  return new Map(
    rows.map((values) => {
      const row: Record<string, CatalogueValue> = {}
      for (let i = 0; i < STORED.length; i++) row[STORED[i] ?? ''] = values[i] ?? null
      return [row.galaxy as number, row as StoredRow]
    }),
  )
}

/** Whether the row that stands is the one that is planned. */
export function sameRow({ before, after, mainDisturber, indexDisturber, possibleHosts }: PlannedRow): boolean {
  if (!before || before.main_disturber_galaxy !== mainDisturber || before.index_disturber_galaxy !== indexDisturber) return false
  if (before.possible_hosts !== JSON.stringify(possibleHosts)) return false
  return COMPUTED_COLUMNS.every((key) => (before[key] ?? null) === (after[key] ?? null))
}

interface StoredAdopted {
  galaxy: number
  quantity: QuantityKey
  value: number | null
  textValue: string | null
  errPlus: number | null
  errMinus: number | null
  errSys: number | null
  nUsed: number
  nAll: number
  chi2: number | null
  dof: number | null
  scatter: number | null
  method: string | null
  sentence: string
  reasons: unknown
  overrideReason: string | null
}

/** Which adopted values of these galaxies are new, different, or gone. */
export async function adoptedDifferences(trx: Knex, computed: readonly Computed[]): Promise<PlannedAdopted[]> {
  const ids = computed.map((c) => c.galaxy.id)
  const stored = (await trx('adoptedValues')
    .whereNull('revTo')
    .whereRaw('galaxy = any(?)', [ids])
    .select('galaxy', 'quantity', 'value', 'textValue', 'errPlus', 'errMinus', 'errSys', 'nUsed', 'nAll', 'chi2', 'dof', 'scatter', 'method', 'sentence', 'reasons', 'overrideReason')) as StoredAdopted[]
  const standing = new Map(stored.map((s) => [`${s.galaxy} ${s.quantity}`, s]))
  const planned: PlannedAdopted[] = []
  for (const { galaxy, adopted } of computed) {
    for (const [quantity, after] of adopted) {
      const key = `${galaxy.id} ${quantity}`
      const before = standing.get(key)
      standing.delete(key)
      if (!before || !sameAdopted(before, after)) planned.push({ galaxyId: galaxy.id, quantity, standing: before !== undefined, after })
    }
  }
  for (const gone of standing.values()) planned.push({ galaxyId: gone.galaxy, quantity: gone.quantity, standing: true, after: null })
  return planned
}

const PLAIN = ['value', 'textValue', 'errPlus', 'errMinus', 'errSys', 'nUsed', 'nAll', 'chi2', 'dof', 'scatter', 'method', 'sentence'] as const

function sameAdopted(before: StoredAdopted, after: Adopted): boolean {
  return PLAIN.every((key) => before[key] === after[key]) && before.overrideReason === after.override && sameJson(before.reasons, after.reasons)
}

/** jsonb gives the keys of an object in an order of its own. */
function sameJson(a: unknown, b: unknown): boolean {
  if (Array.isArray(a) && Array.isArray(b)) return a.length === b.length && a.every((item, i) => sameJson(item, b[i]))
  if (typeof a === 'object' && typeof b === 'object' && a !== null && b !== null) {
    const keys = Object.keys(a)
    return keys.length === Object.keys(b).length && keys.every((key) => sameJson((a as Record<string, unknown>)[key], (b as Record<string, unknown>)[key]))
  }
  return a === b
}
