/** Submissions and their changes as the database holds them, and what a reader is to one. */
import type { Knex } from 'knex'
import type { ChangeInput } from '../../../core/schema/changes.ts'
import type { SubmissionState } from '../../../core/schema/submissions.ts'
import type { Standing } from '../../../core/submission/state-machine.ts'
import { can } from '../../../core/permissions.ts'
import { NotFound, NotSignedIn } from '../../http/errors.ts'
import type { Reader } from '../../http/route.ts'
import type { Base, StoredChange } from '../changes/types.ts'

export interface SubmissionRow {
  id: number
  author: number
  authorName: string
  title: string
  summary: string
  state: SubmissionState
  baseRevision: number
  version: number
  contentHash: string | null
  createdAt: Date
  updatedAt: Date
  submittedAt: Date | null
  decidedBy: number | null
  decidedByName: string | null
  decidedAt: Date | null
  decisionNote: string | null
  revision: number | null
  lockVersion: number
}

const COLUMNS = [
  's.id', 's.author', 'a.name as authorName', 's.title', 's.summary', 's.state', 's.baseRevision', 's.version', 's.contentHash', 's.createdAt',
  's.updatedAt', 's.submittedAt', 's.decidedBy', 'd.name as decidedByName', 's.decidedAt', 's.decisionNote', 's.revision', 's.lockVersion',
]

/** A query for submissions with the names of author and decider. */
export function submissionRows(knex: Knex): Knex.QueryBuilder {
  return knex('submissions as s').join('users as a', 'a.id', 's.author').leftJoin('users as d', 'd.id', 's.decidedBy').select(COLUMNS)
}

/** The person who asks. @throws NotSignedIn */
export function personOf(reader: Reader): NonNullable<Reader['user']> {
  if (!reader.user) throw new NotSignedIn()
  return reader.user
}

/**
 * A submission that this reader may know of: a draft that was never submitted is its author's alone.
 *
 * @param lock - holds it until the transaction ends, so that two people cannot move it at once
 * @throws NotFound
 */
export async function findSubmission(knex: Knex, id: number, reader: Reader, lock = false): Promise<SubmissionRow> {
  const person = personOf(reader)
  if (lock) await knex('submissions').select('id').where({ id }).forUpdate()
  const row = (await submissionRows(knex).where('s.id', id).first()) as SubmissionRow | undefined
  if (!row || (row.state === 'draft' && row.author !== person.id)) throw new NotFound(`There is no submission ${id} that you can see.`)
  return row
}

/** What this reader is to this submission. */
export async function standingOf(knex: Knex, row: SubmissionRow, reader: Reader): Promise<Standing> {
  const person = personOf(reader)
  const editor = (await knex('submissionEditors').select('editor').where({ submission: row.id, editor: person.id }).first()) as { editor: number } | undefined
  return {
    isAuthor: row.author === person.id,
    isEditor: editor !== undefined,
    mayWrite: can(reader.permissions, 'submission.write'),
    mayReview: can(reader.permissions, 'submission.review'),
  }
}

interface ChangeRow {
  id: number
  submission: number
  position: number
  action: ChangeInput['action']
  payload: ChangeInput['payload']
  base: Base | null
  galaxy: number | null
}

/** The changes of these submissions, in order. Payloads were checked by `core/schema/changes.ts` when they were written. */
export async function changesOfSubmissions(knex: Knex, submissions: readonly number[]): Promise<StoredChange[]> {
  if (submissions.length === 0) return []
  const rows = (await knex('changes')
    .select('id', 'submission', 'position', 'action', 'payload', 'base', 'galaxy')
    .whereRaw('submission = ANY(?)', [[...submissions]])
    .orderBy(['submission', 'position'])) as ChangeRow[]
  return rows as StoredChange[]
}
