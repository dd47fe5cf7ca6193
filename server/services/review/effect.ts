/** What approval would do, found by doing it and rolling back: so it cannot differ from what happens. */
import type { Effect } from '../../../core/schema/submissions.ts'
import { StateConflict } from '../../http/errors.ts'
import type { Reader, Services } from '../../http/route.ts'
import { effectOf } from '../revision/effect.ts'
import { readSurroundings } from '../revision/neighbourhood-cache.ts'
import { contentHash, contentOf } from '../submissions/content.ts'
import { changesOfSubmissions, findSubmission } from '../submissions/load.ts'
import { carryOut } from './carry-out.ts'
import { lockCatalogue } from './catalogue-lock.ts'
import { retrying } from './retry.ts'

/** Ends a transaction that was only a rehearsal. */
class Rehearsed extends Error {
  readonly effect: Effect
  constructor(effect: Effect) {
    super('rehearsal over')
    this.effect = effect
  }
}

/** @throws StateConflict when the submission has been decided on, or no longer fits the catalogue */
export async function effectOfSubmission(services: Services, reader: Reader, id: number): Promise<Effect> {
  const row = await findSubmission(services.knex, id, reader)
  if (row.state === 'approved' || row.state === 'rejected' || row.state === 'withdrawn') {
    throw new StateConflict('This submission has been decided on, so there is no effect to foresee.')
  }
  const changes = await changesOfSubmissions(services.knex, [id])
  const hash = contentHash(contentOf(row, changes))
  await readSurroundings(services.knex)
  try {
    await retrying(() =>
      services.knex.transaction(async (trx) => {
        await lockCatalogue(trx)
        const { before, applied, plan } = await carryOut(trx, row, changes)
        const effect = effectOf(plan)
        throw new Rehearsed({ revision: before, contentHash: hash, ...effect, counts: { ...effect.counts, measurements: applied.measurements } })
      }),
    )
  } catch (error) {
    if (error instanceof Rehearsed) return error.effect
    throw error
  }
  throw new Error('a rehearsal was committed')
}
