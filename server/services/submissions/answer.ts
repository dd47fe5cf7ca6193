/** A submission as its readers see it: changes in words, checks, conflicts and overlaps computed at each read. */
import type { Knex } from 'knex'
import type { Conflict } from '../../../core/problem.ts'
import type { ChangeAnswer, Check, SubmissionAnswer, SubmissionState, SubmissionSummary } from '../../../core/schema/submissions.ts'
import { mayAct, refusalOf, transition } from '../../../core/submission/state-machine.ts'
import type { Standing, SubmissionEvent } from '../../../core/submission/state-machine.ts'
import type { Reader } from '../../http/route.ts'
import { conflictsOf } from '../changes/conflicts.ts'
import { presentChange, vocabularyOf } from '../changes/present.ts'
import type { StoredChange } from '../changes/types.ts'
import { checksOf } from './checks-context.ts'
import { changesOfSubmissions, findSubmission, personOf, standingOf, submissionRows } from './load.ts'
import type { SubmissionRow } from './load.ts'
import { overlapsOf } from './overlaps.ts'
import { remarksOf, timelineOf } from './timeline.ts'

const isOpen = (state: SubmissionState): boolean => state === 'draft' || state === 'submitted' || state === 'returned'

/** @throws NotFound */
export async function answerOf(knex: Knex, id: number, reader: Reader): Promise<SubmissionAnswer> {
  const row = await findSubmission(knex, id, reader)
  const changes = await changesOfSubmissions(knex, [id])
  const items = await itemsOf(knex, changes, isOpen(row.state))
  const standing = await standingOf(knex, row, reader)
  return {
    ...summaryOf(row, items),
    summary: row.summary,
    lockVersion: row.lockVersion,
    baseRevision: row.baseRevision,
    contentHash: row.contentHash,
    version: row.version,
    decisionNote: row.decisionNote,
    items,
    timeline: await timelineOf(knex, row),
    remarks: await remarksOf(knex, id),
    overlaps: isOpen(row.state) ? await overlapsOf(knex, id, changes, personOf(reader).id) : [],
    ...permitted(row, standing),
  }
}

/** Of a decided submission, conflicts and checks are history and not computed. */
async function itemsOf(knex: Knex, changes: readonly StoredChange[], open: boolean): Promise<ChangeAnswer[]> {
  const vocabulary = await vocabularyOf(knex, changes)
  const words = new Map(changes.map((c) => [c.id, presentChange(c, vocabulary)]))
  const subjects = new Map([...words].map(([id, w]) => [id, w.subject]))
  const checks = open ? await checksOf(knex, changes, vocabulary) : new Map<number, Check[]>()
  const conflicts = new Map<number, Conflict[]>()
  if (open) for (const c of await conflictsOf(knex, changes, subjects, vocabulary)) conflicts.set(c.change, [...(conflicts.get(c.change) ?? []), c])
  return changes.map((c) => {
    const said = words.get(c.id) ?? presentChange(c, vocabulary)
    return { id: c.id, position: c.position, action: c.action, payload: c.payload, ...said, checks: checks.get(c.id) ?? [], conflicts: conflicts.get(c.id) ?? [] }
  })
}

function summaryOf(row: SubmissionRow, items: readonly Pick<ChangeAnswer, 'action' | 'checks' | 'conflicts'>[]): SubmissionSummary {
  return {
    id: row.id,
    title: row.title,
    state: row.state,
    author: { id: row.author, name: row.authorName },
    changes: items.length,
    actions: [...new Set(items.map((item) => item.action))],
    cautions: items.reduce((sum, item) => sum + item.checks.filter((check) => check.level !== 'ok').length, 0),
    conflicts: items.reduce((sum, item) => sum + item.conflicts.length, 0),
    createdAt: row.createdAt.toISOString(),
    updatedAt: row.updatedAt.toISOString(),
    submittedAt: row.submittedAt?.toISOString() ?? null,
    decidedAt: row.decidedAt?.toISOString() ?? null,
    decidedBy: row.decidedByName,
    revision: row.revision,
  }
}

function permitted(row: SubmissionRow, standing: Standing): Pick<SubmissionAnswer, 'may' | 'mayNot'> {
  const may = (event: SubmissionEvent): boolean => {
    const possible = transition(row.state, event)
    return possible !== undefined && mayAct(possible.who, standing)
  }
  const barred = row.state === 'submitted' && standing.mayReview && (standing.isAuthor || standing.isEditor)
  return {
    may: { edit: may('edit'), submit: may('submit'), withdraw: may('withdraw'), review: may('approve'), remove: may('remove') },
    mayNot: barred ? refusalOf('reviewer', 'approve', standing).replace(' Nothing was changed.', '') : null,
  }
}

export interface ListQuery {
  state?: SubmissionState | undefined
  /** Those that the reader wrote. */
  mine: boolean
  /** Those that wait for the reader's verdict. */
  review: boolean
}

const MOST_LISTED = 200

/** The submissions that this reader may know of, those last touched first; a queue for review has the longest waiting first. */
export async function listSubmissions(knex: Knex, reader: Reader, query: ListQuery): Promise<SubmissionSummary[]> {
  const person = personOf(reader)
  const rows = (await submissionRows(knex)
    .where((visible) => void visible.whereNot('s.state', 'draft').orWhere('s.author', person.id))
    .modify((q) => {
      if (query.state !== undefined) void q.where('s.state', query.state)
      if (query.mine) void q.where('s.author', person.id)
      if (query.review) {
        const own = knex('submissionEditors as e').select('e.submission').where('e.editor', person.id)
        void q.where('s.state', 'submitted').whereNot('s.author', person.id).whereNotIn('s.id', own)
      }
    })
    .orderBy(query.review ? [{ column: 's.submittedAt' }, { column: 's.id' }] : [{ column: 's.updatedAt', order: 'desc' }, { column: 's.id', order: 'desc' }])
    .limit(MOST_LISTED)) as SubmissionRow[]
  const open = rows.filter((r) => isOpen(r.state)).map((r) => r.id)
  const items = new Map<number, Pick<ChangeAnswer, 'action' | 'checks' | 'conflicts'>[]>()
  const changes = await changesOfSubmissions(knex, open)
  const answers = await itemsOf(knex, changes, true)
  changes.forEach((c, i) => {
    const item = answers[i]
    if (item) items.set(c.submission, [...(items.get(c.submission) ?? []), item])
  })
  const counts = await countsOf(knex, rows.filter((r) => !isOpen(r.state)).map((r) => r.id))
  return rows.map((r) => {
    const summary = summaryOf(r, items.get(r.id) ?? [])
    return isOpen(r.state) ? summary : { ...summary, changes: 0, ...counts.get(r.id) }
  })
}

type Counts = Pick<SubmissionSummary, 'changes' | 'actions'>

async function countsOf(knex: Knex, submissions: readonly number[]): Promise<Map<number, Counts>> {
  if (submissions.length === 0) return new Map()
  const { rows } = (await knex.raw('SELECT submission, count(*)::int AS changes, array_agg(DISTINCT action) AS actions FROM changes WHERE submission = ANY(?) GROUP BY submission', [
    [...submissions],
  ])) as { rows: ({ submission: number } & Counts)[] }
  return new Map(rows.map(({ submission, ...counts }) => [submission, counts]))
}
