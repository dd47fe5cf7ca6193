/** The one way by which anything happens to a submission: lock it, ask the table of states, act, note who wrote in it. */
import type { Knex } from 'knex'
import { raw } from 'objection'
import { mayAct, refusal, refusalOf, transition } from '../../../core/submission/state-machine.ts'
import type { SubmissionEvent, Transition } from '../../../core/submission/state-machine.ts'
import { Forbidden, StateConflict } from '../../http/errors.ts'
import type { Reader, Services } from '../../http/route.ts'
import { SubmissionModel } from '../../models/submission.ts'
import { findSubmission, personOf, standingOf } from './load.ts'
import type { SubmissionRow } from './load.ts'

/**
 * Whether this reader may set this event off now.
 *
 * @throws Forbidden when somebody else must; StateConflict when the state does not allow it
 */
export async function requireTransition(knex: Knex, row: SubmissionRow, event: SubmissionEvent, reader: Reader): Promise<Transition> {
  const standing = await standingOf(knex, row, reader)
  const isDecision = event === 'approve' || event === 'return' || event === 'reject'
  // Said first whatever the state: nobody decides on his own work.
  if (isDecision && (standing.isAuthor || standing.isEditor)) throw new Forbidden(refusalOf('reviewer', event, standing))
  const possible = transition(row.state, event)
  if (!possible) throw new StateConflict(refusal(row.state, event))
  if (!mayAct(possible.who, standing)) throw new Forbidden(refusalOf(possible.who, event, standing))
  return possible
}

/** Changes the content of a submission: whoever does so is an editor of it from then on, and may not review it. */
export async function editing<T>(services: Services, id: number, reader: Reader, work: (trx: Knex.Transaction, row: SubmissionRow) => Promise<T>): Promise<T> {
  return services.knex.transaction(async (trx) => {
    const row = await findSubmission(trx, id, reader, true)
    await requireTransition(trx, row, 'edit', reader)
    const result = await work(trx, row)
    await noteEditor(trx, id, personOf(reader).id)
    await SubmissionModel.query(trx).findById(id).patch({ updatedAt: raw('now()'), lockVersion: row.lockVersion + 1 })
    return result
  })
}

export async function noteEditor(trx: Knex, submission: number, editor: number): Promise<void> {
  await trx('submissionEditors').insert({ submission, editor }).onConflict().ignore()
}

/**
 * @throws StateConflict when the submission has moved since `lockVersion`, saying what the newer one holds
 */
export function requireLockVersion(row: SubmissionRow, lockVersion: number, sent: { title?: string | undefined; summary?: string | undefined } = {}): void {
  if (row.lockVersion === lockVersion) return
  const differs = (field: 'title' | 'summary'): boolean => sent[field] !== undefined && sent[field] !== row[field]
  throw new StateConflict(
    `This submission was changed elsewhere since you opened it, on ${row.updatedAt.toISOString()}. Nothing of yours was kept and nothing of it was touched: load it again, then repeat your change.`,
    (['title', 'summary'] as const).filter(differs).map((field) => ({
      change: 0, subject: row.title, field: field === 'title' ? 'Title' : 'Summary', base: null, theirs: row[field], yours: sent[field] ?? null, by: null, revision: null,
    })),
  )
}
