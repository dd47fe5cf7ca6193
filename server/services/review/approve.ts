/** Approval: one transaction, one lock, one revision. */
import type { Knex } from 'knex'
import { raw } from 'objection'
import type { SubmissionAnswer } from '../../../core/schema/submissions.ts'
import type { Config } from '../../config.ts'
import type { Reader, Services } from '../../http/route.ts'
import { ReviewModel } from '../../models/review.ts'
import { RevisionModel } from '../../models/revision.ts'
import { SubmissionModel } from '../../models/submission.ts'
import { record } from '../audit.ts'
import { readSurroundings } from '../revision/neighbourhood-cache.ts'
import { rebuildCatalogue } from '../revision/rebuild.ts'
import { withSharers } from '../revision/whole/threads.ts'
import { writeRevision } from '../revision/write.ts'
import { answerOf } from '../submissions/answer.ts'
import { changesOfSubmissions, findSubmission, personOf } from '../submissions/load.ts'
import { requireTransition } from '../submissions/move.ts'
import { announce } from './announce.ts'
import { carryOut } from './carry-out.ts'
import { lockCatalogue } from './catalogue-lock.ts'
import { requireHash } from './decide.ts'
import { retrying } from './retry.ts'

/**
 * @throws Forbidden for author and editors; StateConflict when the submission is not waiting for review, was changed since it was read, or
 *   no longer fits the catalogue; nothing is changed then
 */
export async function approve(services: Services, reader: Reader, id: number, decision: { contentHash: string; note: string }): Promise<SubmissionAnswer> {
  const person = personOf(reader)
  // Asked once before queueing for the lock, so that a refusal need not wait, and once more when it is ours.
  await requireTransition(services.knex, await findSubmission(services.knex, id, reader), 'approve', reader)
  await readSurroundings(services.knex)
  await retrying(() =>
    services.knex.transaction(async (trx) => {
      await lockCatalogue(trx)
      const row = await findSubmission(trx, id, reader, true)
      await requireTransition(trx, row, 'approve', reader)
      requireHash(row, decision.contentHash)
      const changes = await changesOfSubmissions(trx, [id])
      const { revision, applied, plan } = await carryOut(trx, row, changes)
      if (plan) await writeRevision(trx, plan)
      else await rebuildWithThreads(trx, services.config, revision)
      await RevisionModel.query(trx).insert({ number: revision, submission: id, approvedBy: person.id, summary: row.title })
      await ReviewModel.query(trx).insert({ submission: id, version: row.version, contentHash: decision.contentHash, reviewer: person.id, verdict: 'approved', note: decision.note })
      await SubmissionModel.query(trx).findById(id).patch({
        state: 'approved', revision, decidedBy: person.id, decidedAt: raw('now()'), decisionNote: decision.note === '' ? null : decision.note,
        updatedAt: raw('now()'), lockVersion: row.lockVersion + 1,
      })
      await nameAddedGalaxies(trx, applied.galaxies)
      await record(trx, person.id, 'submission.approve', `submission:${id}`, { revision, version: row.version, contentHash: decision.contentHash, changes: changes.length })
      await announce(trx, { kind: 'revision', revision })
      await announce(trx, { kind: 'submission', submission: id, state: 'approved' })
    }),
  )
  return answerOf(services.knex, id, reader)
}

/** The scale changed, and everything with it: this may take longer than a transaction is otherwise given. */
async function rebuildWithThreads(trx: Knex.Transaction, { databaseUrl, computeThreads }: Config, revision: number): Promise<void> {
  await trx.raw('set local statement_timeout = 0')
  await trx.raw('set local idle_in_transaction_session_timeout = 0')
  await withSharers(trx, { databaseUrl, threads: computeThreads }, (sharers) => rebuildCatalogue(trx, revision, { sharers }))
}

/** From now on the changes that added galaxies, or spoke of added ones, lead to them. */
async function nameAddedGalaxies(trx: Parameters<typeof lockCatalogue>[0], galaxies: ReadonlyMap<number, number>): Promise<void> {
  if (galaxies.size === 0) return
  await trx.raw('UPDATE changes SET galaxy = made.galaxy FROM unnest(?::integer[], ?::integer[]) AS made (change, galaxy) WHERE changes.id = made.change', [
    [...galaxies.keys()],
    [...galaxies.values()],
  ])
}
