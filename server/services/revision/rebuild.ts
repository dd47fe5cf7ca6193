/** Everything computed anew: for seeds, for a changed scale, and to prove that incremental approvals leave the same catalogue. */
import type { Knex } from 'knex'
import { neighbourFrom, neighbourhoodOf } from '../../../core/derive/neighbourhood.ts'
import type { OwnColumns } from '../../../core/derive/own.ts'
import { relationsOf } from '../../../core/derive/relation.ts'
import { rowOf } from '../../../core/derive/row.ts'
import { adoptGalaxies } from './adopt-galaxies.ts'
import { adoptedDifferences, sameRow, standingRows } from './compare.ts'
import { allGalaxies, loadHostOverrides, loadScale } from './load.ts'
import type { PlannedRow } from './plan.ts'
import { writeAdopted, writeRows } from './write.ts'

const CHUNK = 2000

export interface RebuildOptions {
  /** Called with the share done, 0 to 1. */
  onProgress?: (done: number) => void
}

/**
 * Adopts and derives the whole catalogue as it stands in the transaction, and writes what differs as of a revision.
 *
 * @returns how many rows were written
 */
export async function rebuildCatalogue(trx: Knex, revision: number, { onProgress }: RebuildOptions = {}): Promise<number> {
  const scale = await loadScale(trx)
  const ids = await allGalaxies(trx)
  const own = new Map<number, OwnColumns>()
  for (let i = 0; i < ids.length; i += CHUNK) {
    const computed = await adoptGalaxies(trx, ids.slice(i, i + CHUNK), scale)
    await writeAdopted(trx, revision, await adoptedDifferences(trx, computed))
    for (const c of computed) own.set(c.galaxy.id, c.own)
    onProgress?.((0.6 * Math.min(ids.length, i + CHUNK)) / ids.length)
  }
  const neighbourhood = neighbourhoodOf([...own].flatMap(([id, columns]) => neighbourFrom(id, columns) ?? []))
  const relations = relationsOf(neighbourhood, ids, scale.policy, await loadHostOverrides(trx), (done) => onProgress?.(0.6 + (0.2 * done) / ids.length))
  const hosting = new Set([...relations.values()].flatMap((r) => (r.isSatellite && r.mainDisturber !== null ? [r.mainDisturber] : [])))
  let written = 0
  for (let i = 0; i < ids.length; i += CHUNK) {
    const chunk = ids.slice(i, i + CHUNK)
    const standing = await standingRows(trx, chunk)
    const planned = chunk.flatMap((id): PlannedRow[] => {
      const relation = relations.get(id)
      const columns = own.get(id)
      if (!relation || !columns) return []
      const after = rowOf(columns, relation, hosting.has(id))
      const row = { galaxyId: id, before: standing.get(id) ?? null, after, mainDisturber: relation.mainDisturber, indexDisturber: relation.indexDisturber, possibleHosts: relation.possibleHosts }
      return sameRow(row) ? [] : [row]
    })
    await writeRows(trx, revision, planned)
    written += planned.length
    onProgress?.(0.8 + (0.2 * Math.min(ids.length, i + CHUNK)) / ids.length)
  }
  return written
}
