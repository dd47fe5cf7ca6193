/** The catalogue at a glance. */
import { summarySchema } from '../../core/schema/catalogue.ts'
import { route, type Route } from '../http/route.ts'
import { readRevision } from '../queries/at-revision.ts'
import { summaryAt } from '../queries/summary.ts'
import { atQuery } from './parameters.ts'

export const summaryRoutes: Route[] = [
  route({
    method: 'get', path: '/api/summary', summary: 'Counts, the newest release, what changed lately, what waits for you', permission: 'catalogue.read',
    query: atQuery, answer: summarySchema,
    handle: async ({ knex, reader, query }) => summaryAt(knex, reader, await readRevision(knex, reader, query.at)),
  }),
]
