/** Everything computed anew and written within a transaction: for seeds, and to prove that incremental approvals leave the same catalogue. */
import type { Knex } from 'knex'
import { galaxiesAcrossTheSky, loadScale } from './load.ts'
import { recompute, type Progress } from './whole/recompute.ts'
import { shareOf, type Sharer } from './whole/share.ts'
import { writeBatch } from './write.ts'

export interface RebuildOptions {
  onProgress?: (progress: Progress) => void
  /** Who computes; the transaction's own thread unless said otherwise. Others see only what is committed. */
  sharers?: readonly Sharer[]
}

/**
 * Adopts and derives the whole catalogue as it stands, and writes what differs as of a revision.
 *
 * @returns how many rows and adopted values were written
 */
export async function rebuildCatalogue(trx: Knex, revision: number, { onProgress, sharers = [shareOf(trx)] }: RebuildOptions = {}): Promise<{ rows: number; adopted: number }> {
  const { written } = await recompute(sharers, {
    scale: await loadScale(trx),
    ids: await galaxiesAcrossTheSky(trx),
    onProgress,
    writing: { revision, write: (batch) => writeBatch(trx, revision, batch) },
  })
  return written
}
