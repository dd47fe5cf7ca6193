/** The author's moves, and remarks. */
import { raw } from 'objection'
import type { SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { BadInput, NotFound, StateConflict } from '../../http/errors.ts'
import type { Reader, Services } from '../../http/route.ts'
import { ChangeModel } from '../../models/change.ts'
import { RemarkModel } from '../../models/remark.ts'
import { SubmissionModel } from '../../models/submission.ts'
import { SubmissionVersionModel } from '../../models/submission-version.ts'
import { record } from '../audit.ts'
import { conflictsOf } from '../changes/conflicts.ts'
import { currentRevision } from '../changes/current.ts'
import { presentChange, vocabularyOf } from '../changes/present.ts'
import { announce } from '../review/announce.ts'
import { answerOf } from './answer.ts'
import { checksOf, stopsIn } from './checks-context.ts'
import { contentHash, contentOf } from './content.ts'
import { changesOfSubmissions, findSubmission, personOf } from './load.ts'
import { noteEditor, requireLockVersion, requireTransition } from './move.ts'

/** Freezes a numbered version with its hash and hands it to the approvers. */
export async function submit(services: Services, reader: Reader, id: number, lockVersion: number): Promise<SubmissionAnswer> {
  await services.knex.transaction(async (trx) => {
    const row = await findSubmission(trx, id, reader, true)
    await requireTransition(trx, row, 'submit', reader)
    requireLockVersion(row, lockVersion)
    const changes = await changesOfSubmissions(trx, [id])
    if (changes.length === 0) throw new StateConflict('This submission proposes nothing yet. Add at least one change, then submit it.')

    const vocabulary = await vocabularyOf(trx, changes)
    const subjects = new Map(changes.map((c) => [c.id, presentChange(c, vocabulary).subject]))
    const conflicts = await conflictsOf(trx, changes, subjects, vocabulary)
    if (conflicts.length > 0) {
      throw new StateConflict('The catalogue has moved under this submission. It stays as it is: keep theirs or yours where they differ, then submit it again.', conflicts)
    }
    const stops = stopsIn(changes, await checksOf(trx, changes, vocabulary), subjects)
    if (stops.length > 0) {
      throw new BadInput(`${stops.length === 1 ? 'One check stops' : `${stops.length} checks stop`} this submission. It stays a draft: mend or remove what is named here, then submit it again.`, stops.map((s) => ({ path: `changes.${s.change}`, message: `${s.subject}: ${s.sentence}` })))
    }

    const content = contentOf(row, changes)
    const hash = contentHash(content)
    const person = personOf(reader)
    const version = row.version + 1
    await SubmissionVersionModel.query(trx).insert({ submission: id, version, contentHash: hash, content, submittedBy: person.id })
    await noteEditor(trx, id, person.id)
    await SubmissionModel.query(trx).findById(id).patch({
      state: 'submitted', version, contentHash: hash, submittedAt: raw('now()'), updatedAt: raw('now()'), baseRevision: await currentRevision(trx),
      decidedBy: null, decidedAt: null, decisionNote: null, lockVersion: row.lockVersion + 1,
    })
    await record(trx, person.id, 'submission.submit', `submission:${id}`, { version, contentHash: hash })
    await announce(trx, { kind: 'submission', submission: id, state: 'submitted' })
  })
  return answerOf(services.knex, id, reader)
}

export async function withdraw(services: Services, reader: Reader, id: number, lockVersion: number): Promise<SubmissionAnswer> {
  await services.knex.transaction(async (trx) => {
    const row = await findSubmission(trx, id, reader, true)
    await requireTransition(trx, row, 'withdraw', reader)
    requireLockVersion(row, lockVersion)
    await SubmissionModel.query(trx).findById(id).patch({ state: 'withdrawn', decidedBy: null, decidedAt: raw('now()'), updatedAt: raw('now()'), lockVersion: row.lockVersion + 1 })
    await record(trx, personOf(reader).id, 'submission.withdraw', `submission:${id}`, {})
    await announce(trx, { kind: 'submission', submission: id, state: 'withdrawn' })
  })
  return answerOf(services.knex, id, reader)
}

/** Anybody who can see a submission may remark on it, whatever its state. */
export async function remark(services: Services, reader: Reader, id: number, input: { change: number | null; body: string }): Promise<SubmissionAnswer> {
  await services.knex.transaction(async (trx) => {
    await findSubmission(trx, id, reader)
    if (input.change !== null) {
      const change = await ChangeModel.query(trx).findOne({ id: input.change, submission: id })
      if (!change) throw new NotFound(`Submission ${id} has no change ${input.change}.`)
    }
    await RemarkModel.query(trx).insert({ submission: id, change: input.change, author: personOf(reader).id, body: input.body })
  })
  return answerOf(services.knex, id, reader)
}
