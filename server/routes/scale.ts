/** The scale: anchors, methods and adoption policy, what hangs on them, and how they came to be. */
import { scaleHistorySchema, scaleSchema } from '../../core/schema/scale.ts'
import { route, type Route } from '../http/route.ts'
import { readRevision } from '../queries/at-revision.ts'
import { scaleHistoryOf } from '../queries/scale-history.ts'
import { scaleAt } from '../queries/scale.ts'
import { atQuery } from './parameters.ts'

export const scaleRoutes: Route[] = [
  route({
    method: 'get', path: '/api/scale', summary: 'Adopted anchors and the policy, with what hangs on each', permission: 'catalogue.read', query: atQuery, answer: scaleSchema,
    handle: async ({ knex, reader, query }) => scaleAt(knex, await readRevision(knex, reader, query.at)),
  }),
  route({
    method: 'get', path: '/api/scale/history', summary: 'Versions of anchors and policy, newest first', permission: 'catalogue.read', query: atQuery, answer: scaleHistorySchema,
    handle: async ({ knex, reader, query }) => scaleHistoryOf(knex, await readRevision(knex, reader, query.at), reader.user !== null),
  }),
]
