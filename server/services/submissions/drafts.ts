/** Making, renaming and removing submissions, and their changes. */
import type { Knex } from 'knex'
import { raw } from 'objection'
import type { ChangeInput } from '../../../core/schema/changes.ts'
import type { SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { BadInput, NotFound, StateConflict } from '../../http/errors.ts'
import type { Reader, Services } from '../../http/route.ts'
import { ChangeModel } from '../../models/change.ts'
import { SubmissionModel } from '../../models/submission.ts'
import { record } from '../audit.ts'
import { currentRevision } from '../changes/current.ts'
import { resolveChange } from '../changes/resolve-change.ts'
import type { ResolvedChange } from '../changes/types.ts'
import { answerOf } from './answer.ts'
import { changesOfSubmissions, findSubmission, personOf } from './load.ts'
import { editing, noteEditor, requireLockVersion, requireTransition } from './move.ts'

/** More would be no submission that a person could review. */
const MOST_CHANGES = 100_000

export async function createSubmission(services: Services, reader: Reader, input: { title: string; summary: string }): Promise<SubmissionAnswer> {
  const id = await services.knex.transaction((trx) => insertDraft(trx, personOf(reader).id, input))
  return answerOf(services.knex, id, reader)
}

/** A new draft, within a transaction. */
export async function insertDraft(trx: Knex.Transaction, author: number, input: { title: string; summary: string }): Promise<number> {
  const row = await SubmissionModel.query(trx).insert({ author, title: input.title, summary: input.summary, baseRevision: await currentRevision(trx) })
  await noteEditor(trx, row.id, author)
  return row.id
}

export async function patchSubmission(
  services: Services,
  reader: Reader,
  id: number,
  patch: { title?: string | undefined; summary?: string | undefined; lockVersion: number },
): Promise<SubmissionAnswer> {
  await editing(services, id, reader, async (trx, row) => {
    requireLockVersion(row, patch.lockVersion, patch)
    await SubmissionModel.query(trx)
      .findById(id)
      .patch({ title: patch.title ?? row.title, summary: patch.summary ?? row.summary })
  })
  return answerOf(services.knex, id, reader)
}

/** A draft that was never submitted goes without a trace but the audit log's. */
export async function removeSubmission(services: Services, reader: Reader, id: number): Promise<void> {
  await services.knex.transaction(async (trx) => {
    const row = await findSubmission(trx, id, reader, true)
    await requireTransition(trx, row, 'remove', reader)
    await SubmissionModel.query(trx).deleteById(id)
    await record(trx, personOf(reader).id, 'submission.remove', `submission:${id}`, { title: row.title })
  })
}

export async function addChange(services: Services, reader: Reader, id: number, input: ChangeInput): Promise<SubmissionAnswer> {
  await editing(services, id, reader, async (trx) => {
    const siblings = await changesOfSubmissions(trx, [id])
    if (siblings.length >= MOST_CHANGES) throw new BadInput(`A submission holds at most ${MOST_CHANGES} changes. Begin another one.`)
    const resolved = await resolveChange(trx, input, siblings)
    const position = Math.max(0, ...siblings.map((c) => c.position)) + 1
    await ChangeModel.query(trx).insert({ submission: id, position, ...attributesOf(resolved) })
  })
  return answerOf(services.knex, id, reader)
}

/** Rewrites a change; it is made from the catalogue as it stands now, which is how a conflict is answered. */
export async function patchChange(services: Services, reader: Reader, id: number, change: number, input: ChangeInput): Promise<SubmissionAnswer> {
  await editing(services, id, reader, async (trx) => {
    const all = await changesOfSubmissions(trx, [id])
    const old = all.find((c) => c.id === change)
    if (!old) throw new NotFound(`Submission ${id} has no change ${change}.`)
    if (old.action !== input.action) {
      throw new BadInput('A change keeps its kind. Remove it and add another one instead.', [{ path: 'action', message: `This change is ${old.action}.` }])
    }
    const resolved = await resolveChange(trx, input, all.filter((c) => c.id !== change))
    await ChangeModel.query(trx)
      .findById(change)
      .patch({ ...attributesOf(resolved), updatedAt: raw('now()') })
  })
  return answerOf(services.knex, id, reader)
}

export async function removeChange(services: Services, reader: Reader, id: number, change: number): Promise<SubmissionAnswer> {
  await editing(services, id, reader, async (trx) => {
    const all = await changesOfSubmissions(trx, [id])
    if (!all.some((c) => c.id === change)) throw new NotFound(`Submission ${id} has no change ${change}.`)
    const leaning = all.filter((c) => 'galaxy' in c.payload && 'change' in c.payload.galaxy && c.payload.galaxy.change === change)
    if (leaning.length > 0) {
      const numbers = leaning.slice(0, 8).map((c) => c.position).join(', ')
      throw new StateConflict(
        `${leaning.length} other ${leaning.length === 1 ? 'change speaks' : 'changes speak'} of the galaxy that this one adds (number ${numbers}${leaning.length > 8 ? ' ...' : ''}). Remove those first. Nothing was changed.`,
      )
    }
    await ChangeModel.query(trx).deleteById(change)
  })
  return answerOf(services.knex, id, reader)
}

function attributesOf({ input, base, galaxy }: ResolvedChange): { action: ChangeInput['action']; payload: object; base: object | null; galaxy: number | null } {
  return { action: input.action, payload: input.payload, base, galaxy }
}

/** A change as the table holds it, for inserting many. */
export function columnsOf(resolved: ResolvedChange): Record<string, unknown> {
  const { input, base, galaxy } = resolved
  return { action: input.action, payload: JSON.stringify(input.payload), base: base === null ? null : JSON.stringify(base), galaxy }
}
