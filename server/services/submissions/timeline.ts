/** What happened to a submission, newest first, and what was said of it. */
import type { Knex } from 'knex'
import type { SubmissionAnswer } from '../../../core/schema/submissions.ts'
import type { SubmissionRow } from './load.ts'

type Timeline = SubmissionAnswer['timeline']

const VERDICTS = { approved: 'Approved', returned: 'Returned', rejected: 'Rejected' } as const

export async function timelineOf(knex: Knex, row: SubmissionRow): Promise<Timeline> {
  const versions = (await knex('submissionVersions as v')
    .join('users as u', 'u.id', 'v.submittedBy')
    .select('v.version', 'v.submittedAt as at', 'u.name as by')
    .where('v.submission', row.id)) as { version: number; at: Date; by: string }[]
  const reviews = (await knex('reviews as r')
    .join('users as u', 'u.id', 'r.reviewer')
    .select('r.verdict', 'r.note', 'r.at', 'u.name as by', 'r.version')
    .where('r.submission', row.id)) as { verdict: keyof typeof VERDICTS; note: string; at: Date; by: string; version: number }[]
  const entries = [
    { at: row.createdAt, by: row.authorName, what: 'Draft begun', note: null },
    ...versions.map((v) => ({ at: v.at, by: v.by, what: v.version === 1 ? 'Submitted' : `Submitted again, version ${v.version}`, note: null })),
    ...reviews.map((r) => ({
      at: r.at, by: r.by, what: r.verdict === 'approved' && row.revision !== null ? `Approved as revision ${row.revision}` : VERDICTS[r.verdict], note: r.note === '' ? null : r.note,
    })),
    ...(row.state === 'withdrawn' && row.decidedAt ? [{ at: row.decidedAt, by: row.authorName, what: 'Withdrawn', note: null }] : []),
  ]
  // Of two things at one moment, the later step stands first too.
  return entries.sort((a, b) => a.at.getTime() - b.at.getTime()).reverse().map((e) => ({ ...e, at: e.at.toISOString() }))
}

export async function remarksOf(knex: Knex, submission: number): Promise<SubmissionAnswer['remarks']> {
  const rows = (await knex('remarks as r')
    .join('users as u', 'u.id', 'r.author')
    .select('r.id', 'r.change', 'u.name as author', 'r.at', 'r.body')
    .where('r.submission', submission)
    .orderBy('r.id')) as { id: number; change: number | null; author: string; at: Date; body: string }[]
  return rows.map((r) => ({ ...r, at: r.at.toISOString() }))
}
