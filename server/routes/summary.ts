/** The catalogue at a glance. */
import { z } from 'zod'
import { summarySchema } from '../../core/schema/catalogue.ts'
import { route, type Route } from '../http/route.ts'
import { readRevision } from '../queries/at-revision.ts'
import { summaryAt } from '../queries/summary.ts'

export const summaryRoutes: Route[] = [
  route({
    method: 'get', path: '/api/summary', summary: 'Counts, the newest release, what changed lately, what waits for you', permission: 'catalogue.read',
    query: z.strictObject({ at: z.string().max(40).optional() }), answer: summarySchema,
    handle: async ({ knex, reader, query }) => summaryAt(knex, reader, await readRevision(knex, reader, query.at)),
  }),
]
