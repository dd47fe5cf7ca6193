/** What approval would do, found by doing it and rolling back: so it cannot differ from what happens. */
import type { Knex } from 'knex'
import { nothing } from '../../../core/effect.ts'
import type { Effect } from '../../../core/schema/submissions.ts'
import { StateConflict } from '../../http/errors.ts'
import type { Reader, Services } from '../../http/route.ts'
import type { StoredChange } from '../changes/types.ts'
import { effectOf } from '../revision/effect.ts'
import { loadScale } from '../revision/load.ts'
import { readSurroundings } from '../revision/neighbourhood-cache.ts'
import type { Progress } from '../revision/whole/recompute.ts'
import { contentHash, contentOf } from '../submissions/content.ts'
import { changesOfSubmissions, findSubmission } from '../submissions/load.ts'
import { carryOut, type CarriedOut } from './carry-out.ts'
import { lockCatalogue } from './catalogue-lock.ts'
import { retrying } from './retry.ts'
import { effectOfScale } from './scale-effect.ts'

/**
 * @param onProgress - how far it is, where it takes longer: a change of the scale moves everything
 * @throws StateConflict when the submission has been decided on, or no longer fits the catalogue
 */
export async function effectOfSubmission(services: Services, reader: Reader, id: number, onProgress?: (progress: Progress) => void): Promise<Effect> {
  const row = await findSubmission(services.knex, id, reader)
  if (row.state === 'approved' || row.state === 'rejected' || row.state === 'withdrawn') {
    throw new StateConflict('This submission has been decided on, so there is no effect to foresee.')
  }
  const changes = await changesOfSubmissions(services.knex, [id])
  const hash = contentHash(contentOf(row, changes))
  await readSurroundings(services.knex)
  const { before, measurements, effect, scale } = await rehearse(services.knex, row, changes, async (trx, { before, applied, plan }) => ({
    before,
    measurements: applied.measurements,
    effect: plan ? effectOf(plan) : nothing(),
    scale: plan ? null : await loadScale(trx),
  }))
  const whole = scale ? await effectOfScale(services, scale, { submission: id, hash, revision: before }, onProgress) : { revision: before, effect }
  return { revision: whole.revision, contentHash: hash, ...whole.effect, counts: { ...whole.effect.counts, measurements } }
}

/** Ends a transaction that was only a rehearsal. */
class Rehearsed<T> extends Error {
  readonly seen: T
  constructor(seen: T) {
    super('rehearsal over')
    this.seen = seen
  }
}

/** Carries a submission out, looks, and takes everything back. */
async function rehearse<T>(knex: Knex, submission: { author: number }, changes: readonly StoredChange[], look: (trx: Knex.Transaction, done: CarriedOut) => Promise<T>): Promise<T> {
  try {
    await retrying(() =>
      knex.transaction(async (trx) => {
        await lockCatalogue(trx)
        throw new Rehearsed(await look(trx, await carryOut(trx, submission, changes)))
      }),
    )
  } catch (error) {
    if (error instanceof Rehearsed) return (error as Rehearsed<T>).seen
    throw error
  }
  throw new Error('a rehearsal was committed')
}
