/** The literature. */
import { z } from 'zod'
import { sourceDetailSchema, sourceInputSchema, sourceListSchema, sourceSchema } from '../../core/schema/sources.ts'
import { route, type Route } from '../http/route.ts'
import { findSources, sourceDetail } from '../queries/sources.ts'
import { addSource } from '../services/sources.ts'
import { one } from './parameters.ts'

export const sourceRoutes: Route[] = [
  route({
    method: 'get', path: '/api/sources', summary: 'Sources, or those that a search finds', permission: 'catalogue.read', query: z.strictObject({ q: z.string().max(200).default('') }), answer: sourceListSchema,
    handle: async ({ knex, query }) => ({ sources: await findSources(knex, query.q) }),
  }),
  route({
    method: 'get', path: '/api/sources/:id', summary: 'A source and what it contributed', permission: 'catalogue.read', params: one, answer: sourceDetailSchema,
    handle: ({ knex, params }) => sourceDetail(knex, params.id),
  }),
  route({
    method: 'post', path: '/api/sources', summary: 'Add a source', permission: 'source.write', body: sourceInputSchema, answer: sourceSchema, status: 201,
    handle: (context) => addSource(context, context.reader, context.body),
  }),
]
