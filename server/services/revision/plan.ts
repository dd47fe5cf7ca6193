/** What a revision will write, worked out before anything is written. */
import type { Adopted } from '../../../core/adoption/adopted.ts'
import type { CatalogueRow } from '../../../core/columns.ts'
import type { QuantityKey } from '../../../core/quantities.ts'
import type { PossibleHost } from '../../../core/derive/relation.ts'
import type { StoredRow } from './compare.ts'
import type { Surroundings } from './neighbourhood-cache.ts'

export interface PlannedRow {
  galaxyId: number
  before: StoredRow | null
  /** Every column but `revision` and `updated_at`, which are the writing's. */
  after: CatalogueRow
  mainDisturber: number | null
  indexDisturber: number | null
  possibleHosts: readonly PossibleHost[]
}

export interface PlannedAdopted {
  galaxyId: number
  quantity: QuantityKey
  /** Whether another value stands that this one ends. */
  standing: boolean
  /** null when there is nothing any more that could be adopted. */
  after: Adopted | null
}

export interface RevisionPlan {
  revision: number
  rows: PlannedRow[]
  adopted: PlannedAdopted[]
  /** How it stood. */
  before: Surroundings
}
