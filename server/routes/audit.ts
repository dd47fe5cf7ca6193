/** Who did what. */
import { z } from 'zod'
import { route, type Route } from '../http/route.ts'
import { idNumber } from './parameters.ts'

const entrySchema = z.object({
  id: z.int(), at: z.string(), actor: z.string().nullable(), action: z.string(), subject: z.string(), details: z.record(z.string(), z.unknown()),
})
const auditQuery = z.strictObject({ before: idNumber.optional(), action: z.string().max(60).optional(), subject: z.string().max(120).optional(), limit: z.coerce.number().int().min(1).max(500).default(100) })

export const auditRoutes: Route[] = [
  route({
    method: 'get', path: '/api/audit', summary: 'The audit log, newest first; `before` an entry’s number for the next page', permission: 'audit.read', query: auditQuery,
    answer: z.object({ entries: z.array(entrySchema) }),
    handle: async ({ knex, query }) => {
      const entries = knex('auditLog as l').leftJoin('users as u', 'u.id', 'l.actor').orderBy('l.id', 'desc').limit(query.limit)
      if (query.before !== undefined) void entries.where('l.id', '<', query.before)
      if (query.action !== undefined) void entries.where('l.action', query.action)
      if (query.subject !== undefined) void entries.where('l.subject', query.subject)
      const rows = (await entries.select('l.id', 'l.at', 'u.name as actor', 'l.action', 'l.subject', 'l.details')) as { at: Date }[]
      return { entries: rows.map((row) => ({ ...row, at: row.at.toISOString() })) }
    },
  }),
]
