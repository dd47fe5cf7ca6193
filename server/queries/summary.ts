/** The catalogue at a glance. */
import type { Knex } from 'knex'
import { can } from '../../core/permissions.ts'
import type { Summary } from '../../core/schema/catalogue.ts'
import type { Reader } from '../http/route.ts'
import { holdsAt, type ReadRevision } from './at-revision.ts'

const RECENT = 6

export async function summaryAt(knex: Knex, reader: Reader, revision: ReadRevision): Promise<Summary> {
  const at = holdsAt(revision)
  const counts = (await knex.raw(
    `select (select count(*)::int from measurements m where ${at.sql('m')}) as measurements,
            (select count(distinct m.source)::int from measurements m where ${at.sql('m')}) as sources,
            (select count(*)::int from catalogue_rows r where ${at.sql('r')} and r.host_relation = 'host') as hosts`,
    [...at.bindings, ...at.bindings, ...at.bindings],
  )) as { rows: Pick<Summary, 'measurements' | 'sources' | 'hosts'>[] }
  const classes = (await knex.raw(
    `select r.class, count(*)::int as count from catalogue_rows r where ${at.sql('r')} and r.status <> 'withdrawn' group by 1 order by 2 desc, 1`,
    [...at.bindings],
  )) as { rows: Summary['byClass'] }
  const [found] = counts.rows
  if (!found) throw new Error('the catalogue could not be counted')
  return {
    revision: revision.number, galaxies: classes.rows.reduce((sum, c) => sum + c.count, 0), ...found, byClass: classes.rows, release: await newestRelease(knex),
    recent: await recentRevisions(knex, revision), waiting: await waitingFor(knex, reader),
  }
}

async function newestRelease(knex: Knex): Promise<Summary['release']> {
  const { rows } = (await knex.raw('select label, title, published_at as "publishedAt", revision from releases order by revision desc, published_at desc limit 1')) as {
    rows: { label: string; title: string; publishedAt: Date; revision: number }[]
  }
  const [release] = rows
  return release ? { ...release, publishedAt: release.publishedAt.toISOString() } : null
}

async function recentRevisions(knex: Knex, { number }: ReadRevision): Promise<Summary['recent']> {
  const { rows } = (await knex.raw(
    `select v.number as revision, v.approved_at as at, u.name as by, v.summary
       from revisions v left join users u on u.id = v.approved_by where v.number <= ? order by v.number desc limit ${RECENT}`,
    [number],
  )) as { rows: { revision: number; at: Date; by: string | null; summary: string }[] }
  return rows.map((row) => ({ ...row, at: row.at.toISOString() }))
}

/** Returned work of one's own, and what others have submitted for one's review. */
async function waitingFor(knex: Knex, { user, permissions }: Reader): Promise<Summary['waiting']> {
  if (!user) return []
  const mine = (await knex('submissions').where({ author: user.id, state: 'returned' }).orderBy('decidedAt').limit(20).select('id', 'title', 'decidedAt as since')) as Waiting[]
  const review = can(permissions, 'submission.review')
    ? ((await knex('submissions')
        .where('state', 'submitted')
        .whereNot('author', user.id)
        .whereRaw('not exists (select from submission_editors e where e.submission = submissions.id and e.editor = ?)', [user.id])
        .orderBy('submittedAt')
        .limit(20)
        .select('id', 'title', 'submittedAt as since')) as Waiting[])
    : []
  const said = (list: Waiting[], why: string): Summary['waiting'] => list.map((w) => ({ submission: w.id, title: w.title, why, since: (w.since ?? new Date(0)).toISOString() }))
  return [...said(mine, 'returned to you'), ...said(review, 'waits for review')]
}

interface Waiting {
  id: number
  title: string
  since: Date | null
}
