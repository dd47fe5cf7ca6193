/** Who did what. */
import { z } from 'zod'
import { auditListSchema } from '../../core/schema/audit.ts'
import { route, type Route } from '../http/route.ts'
import { auditEntries } from '../queries/audit.ts'
import { idNumber } from './parameters.ts'

const auditQuery = z.strictObject({
  before: idNumber.optional(), action: z.string().min(1).max(60).optional(), subject: z.string().min(1).max(120).optional(), actor: idNumber.optional(),
  limit: z.coerce.number().int().min(1).max(500).default(100),
})

export const auditRoutes: Route[] = [
  route({
    method: 'get', path: '/api/audit', summary: 'The audit log, newest first; `before` an entry’s number for the next page', permission: 'audit.read', query: auditQuery, answer: auditListSchema,
    handle: ({ knex, query }) => auditEntries(knex, query),
  }),
]
