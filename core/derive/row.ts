import type { CatalogueRow } from '../columns.ts'
import type { OwnColumns } from './own.ts'
import { relationWord, type Relation } from './relation.ts'

/**
 * A galaxy's whole row, but for the two stamps of its writing (`revision`, `updated_at`).
 *
 * @param own - its own columns; a whole row will do, where only the relation is new
 * @param relation - its place among the others
 * @param hasSatellites - whether any galaxy is a satellite of it
 */
export function rowOf(own: OwnColumns, relation: Pick<Relation, 'columns' | 'isSatellite'>, hasSatellites: boolean): CatalogueRow {
  return { ...own, ...relation.columns, host_relation: relationWord(relation.isSatellite, hasSatellites) }
}
