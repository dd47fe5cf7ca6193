/** Returning and rejecting. */
import { raw } from 'objection'
import type { SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { StateConflict } from '../../http/errors.ts'
import type { Reader, Services } from '../../http/route.ts'
import { ReviewModel } from '../../models/review.ts'
import { SubmissionModel } from '../../models/submission.ts'
import { record } from '../audit.ts'
import { answerOf } from '../submissions/answer.ts'
import { findSubmission, personOf } from '../submissions/load.ts'
import type { SubmissionRow } from '../submissions/load.ts'
import { requireTransition } from '../submissions/move.ts'
import { announce } from './announce.ts'

const DECISIONS = {
  return: { state: 'returned', action: 'submission.return' },
  reject: { state: 'rejected', action: 'submission.reject' },
} as const

export async function refuse(services: Services, reader: Reader, id: number, event: keyof typeof DECISIONS, decision: { contentHash: string; note: string }): Promise<SubmissionAnswer> {
  const { state, action } = DECISIONS[event]
  await services.knex.transaction(async (trx) => {
    const row = await findSubmission(trx, id, reader, true)
    await requireTransition(trx, row, event, reader)
    requireHash(row, decision.contentHash)
    const person = personOf(reader)
    await ReviewModel.query(trx).insert({ submission: id, version: row.version, contentHash: decision.contentHash, reviewer: person.id, verdict: state, note: decision.note })
    await SubmissionModel.query(trx).findById(id).patch({
      state, decidedBy: person.id, decidedAt: raw('now()'), decisionNote: decision.note, updatedAt: raw('now()'), lockVersion: row.lockVersion + 1,
    })
    await record(trx, person.id, action, `submission:${id}`, { version: row.version, note: decision.note })
    await announce(trx, { kind: 'submission', submission: id, state })
  })
  return answerOf(services.knex, id, reader)
}

/** A verdict speaks of one version. @throws StateConflict when another one is under review now */
export function requireHash(row: SubmissionRow, seen: string): void {
  if (row.contentHash === seen) return
  throw new StateConflict('This submission was changed since you read it, so your verdict would be on something else. Nothing was changed: read the new version, then decide.')
}
