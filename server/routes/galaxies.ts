/** The catalogue: rows, counts and points under a filter; one galaxy and what is known of it. */
import { z } from 'zod'
import {
  facetsSchema, galaxyListSchema, galaxySchema, historySchema, measurementsSchema, neighboursSchema, pointsSchema, resolveSchema,
} from '../../core/schema/catalogue.ts'
import { answeredAlready, sendByContent, sendJsonText } from '../http/catalogue-answer.ts'
import { route, type Route } from '../http/route.ts'
import { readRevision } from '../queries/at-revision.ts'
import { facetsOf } from '../queries/facets.ts'
import { galaxyNumber, galaxyText } from '../queries/galaxy.ts'
import { historyOf } from '../queries/history.ts'
import { listText } from '../queries/list.ts'
import { measurementsText } from '../queries/measurements.ts'
import { neighboursText } from '../queries/neighbours.ts'
import { pointsText } from '../queries/points.ts'
import { resolveName } from '../queries/resolve.ts'
import { atQuery } from './parameters.ts'
import { readFilter } from './read-filter.ts'

const LONGEST_NAME = 200
const bySlug = z.object({ slug: z.string() })
const resolveQuery = z.strictObject({
  name: z.string().trim().min(1, 'Type a name or a position.').max(LONGEST_NAME, `A name has at most ${LONGEST_NAME} characters.`),
  at: atQuery.shape.at,
})

export const galaxyRoutes: Route[] = [
  route({
    method: 'get', path: '/api/galaxies', summary: 'Rows of the catalogue under a filter, page by page', permission: 'catalogue.read', filtered: true, answer: galaxyListSchema,
    handle: async (context) => {
      const filter = readFilter(context.request)
      const revision = await readRevision(context.knex, context.reader, filter.at)
      if (!answeredAlready(context, revision)) sendJsonText(context.response, await listText(context.knex, filter, revision))
    },
  }),
  route({
    method: 'get', path: '/api/galaxies/facets', summary: 'Counts and histograms under a filter, each facet without its own condition', permission: 'catalogue.read', filtered: true,
    answer: facetsSchema,
    handle: async (context) => {
      const filter = readFilter(context.request)
      const revision = await readRevision(context.knex, context.reader, filter.at)
      if (!answeredAlready(context, revision)) return facetsOf(context.knex, filter, revision)
    },
  }),
  route({
    method: 'get', path: '/api/galaxies/points', summary: 'All galaxies under a filter, column by column, for maps', permission: 'catalogue.read', filtered: true, answer: pointsSchema,
    handle: async (context) => {
      const filter = readFilter(context.request)
      const revision = await readRevision(context.knex, context.reader, filter.at)
      if (!answeredAlready(context, revision)) sendJsonText(context.response, await pointsText(context.knex, filter, revision))
    },
  }),
  route({
    method: 'get', path: '/api/galaxies/:slug', summary: 'One galaxy: adopted values with reasons, names, host', permission: 'catalogue.read', params: bySlug, query: atQuery,
    answer: galaxySchema,
    handle: async (context) => {
      const revision = await readRevision(context.knex, context.reader, context.query.at)
      sendByContent(context, revision, await galaxyText(context.knex, context.params.slug, revision))
    },
  }),
  route({
    method: 'get', path: '/api/galaxies/:slug/measurements', summary: 'Every measurement held of a galaxy', permission: 'catalogue.read', params: bySlug, query: atQuery,
    answer: measurementsSchema,
    handle: async (context) => {
      const revision = await readRevision(context.knex, context.reader, context.query.at)
      const galaxy = await galaxyNumber(context.knex, context.params.slug, revision)
      sendByContent(context, revision, await measurementsText(context.knex, galaxy, revision, context.reader.user !== null))
    },
  }),
  route({
    method: 'get', path: '/api/galaxies/:slug/history', summary: 'What changed of a galaxy, revision by revision', permission: 'catalogue.read', params: bySlug, query: atQuery,
    answer: historySchema,
    handle: async (context) => {
      const revision = await readRevision(context.knex, context.reader, context.query.at)
      const galaxy = await galaxyNumber(context.knex, context.params.slug, revision)
      sendByContent(context, revision, JSON.stringify(await historyOf(context.knex, galaxy, revision, context.reader.user !== null)))
    },
  }),
  route({
    method: 'get', path: '/api/galaxies/:slug/neighbours', summary: 'The nearest galaxies in three dimensions', permission: 'catalogue.read', params: bySlug, query: atQuery,
    answer: neighboursSchema,
    handle: async (context) => {
      const revision = await readRevision(context.knex, context.reader, context.query.at)
      const galaxy = await galaxyNumber(context.knex, context.params.slug, revision)
      sendByContent(context, revision, await neighboursText(context.knex, galaxy, revision))
    },
  }),
  route({
    method: 'get', path: '/api/resolve', summary: 'Galaxies that a name, in any spelling, or a position may mean', permission: 'catalogue.read', query: resolveQuery,
    answer: resolveSchema,
    handle: async (context) => {
      const revision = await readRevision(context.knex, context.reader, context.query.at)
      if (!answeredAlready(context, revision)) return resolveName(context.knex, context.query.name, revision)
    },
  }),
]
