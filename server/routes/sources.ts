/** The literature. */
import { z } from 'zod'
import { sourceDetailSchema, sourceInputSchema, sourceListSchema, sourceSchema } from '../../core/schema/sources.ts'
import { route, type Route } from '../http/route.ts'
import { findSources, sourceDetail, sourcesSeen } from '../queries/sources.ts'
import { addSource } from '../services/sources.ts'
import { atQuery, one } from './parameters.ts'

export const sourceRoutes: Route[] = [
  route({
    method: 'get', path: '/api/sources', summary: 'Sources, or those that a search finds', permission: 'catalogue.read', query: atQuery.extend({ q: z.string().max(200).default('') }), answer: sourceListSchema,
    handle: async ({ knex, reader, query }) => ({ sources: await findSources(knex, await sourcesSeen(knex, reader, query.at), query.q) }),
  }),
  route({
    method: 'get', path: '/api/sources/:id', summary: 'A source and what it contributed', permission: 'catalogue.read', params: one, query: atQuery, answer: sourceDetailSchema,
    handle: async ({ knex, reader, params, query }) => sourceDetail(knex, await sourcesSeen(knex, reader, query.at), params.id),
  }),
  route({
    method: 'post', path: '/api/sources', summary: 'Add a source', permission: 'source.write', body: sourceInputSchema, answer: sourceSchema, status: 201,
    handle: (context) => addSource(context, context.reader, context.body),
  }),
]
