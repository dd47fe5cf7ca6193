/** The audit log, to read. */
import type { Knex } from 'knex'
import type { AuditEntry } from '../../core/schema/audit.ts'

export interface AuditQuestion {
  /** Entries older than this one. */
  before?: number
  /** The action itself, or all of a kind: `submission` for `submission.approve` and the rest. */
  action?: string
  subject?: string
  /** User id of who did it. */
  actor?: number
  limit: number
}

/** @returns a page, newest first, and the number of its last entry when more follow */
export async function auditEntries(knex: Knex, { before, action, subject, actor, limit }: AuditQuestion): Promise<{ entries: AuditEntry[]; next: number | null }> {
  const query = knex('auditLog as l').leftJoin('users as u', 'u.id', 'l.actor').orderBy('l.id', 'desc').limit(limit + 1)
  if (before !== undefined) void query.where('l.id', '<', before)
  if (action !== undefined) void query.whereRaw(action.includes('.') ? 'l.action = ?' : `split_part(l.action, '.', 1) = ?`, [action])
  if (subject !== undefined) void query.where('l.subject', subject)
  if (actor !== undefined) void query.where('l.actor', actor)
  const rows = (await query.select('l.id', 'l.at', 'u.name as actor', 'l.action', 'l.subject', 'l.details')) as (Omit<AuditEntry, 'at'> & { at: Date })[]
  const entries = rows.slice(0, limit).map((row) => ({ ...row, at: row.at.toISOString() }))
  return { entries, next: rows.length > limit ? (entries.at(-1)?.id ?? null) : null }
}
