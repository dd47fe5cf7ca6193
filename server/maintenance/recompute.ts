/** After an upgrade: a catalogue that an older computation made is computed anew, as a revision of its own. */
import type { Knex } from 'knex'
import { COMPUTATION_VERSION } from '../../core/computation.ts'
import { currentRevision } from '../services/changes/current.ts'
import { lockCatalogue } from '../services/review/catalogue-lock.ts'
import { rebuildCatalogue } from '../services/revision/rebuild.ts'
import { withSharers } from '../services/revision/whole/threads.ts'

export interface RecomputeSettings {
  databaseUrl: string
  computeThreads: number
}

/**
 * @param log - told how far it is, in sentences
 * @returns the revision that was made, or null when the catalogue was computed with this version already, or gives the same values with it
 */
export async function recomputeWhenOlder(knex: Knex, { databaseUrl, computeThreads }: RecomputeSettings, log: (sentence: string) => void): Promise<number | null> {
  if (!(await isOlder(knex))) return null
  return knex.transaction(async (trx) => {
    await lockCatalogue(trx)
    // Two starts at once: the second finds it done.
    if (!(await isOlder(trx))) return null
    log('Computing the catalogue anew: the computation has changed since it was last made.')
    const before = await currentRevision(trx)
    const revision = before + 1
    let told = 0
    const written = await withSharers(trx, { databaseUrl, threads: computeThreads }, (sharers) =>
      rebuildCatalogue(trx, revision, {
        sharers,
        onProgress: ({ done, step }) => {
          if (done < told + 0.2) return
          told = done
          log(`${step}: ${Math.round(100 * done)} %.`)
        },
      }),
    )
    const moved = written.rows + written.adopted > 0
    if (moved) await trx('revisions').insert({ number: revision, summary: `Computed anew with version ${COMPUTATION_VERSION} of the computation` })
    await trx('computations').insert({ version: COMPUTATION_VERSION, revision: moved ? revision : before })
    return moved ? revision : null
  })
}

/** An empty database has no computation to renew. */
async function isOlder(knex: Knex): Promise<boolean> {
  const { rows } = (await knex.raw('select exists (select from revisions) and not exists (select from computations where version >= ?) as older', [COMPUTATION_VERSION])) as { rows: { older: boolean }[] }
  return rows[0]?.older ?? false
}
