/** The catalogue: rows, counts and points under a filter; one galaxy and what is known of it. */
import { facetsSchema, galaxyListSchema, pointsSchema } from '../../core/schema/catalogue.ts'
import { answeredAlready, sendJsonText } from '../http/catalogue-answer.ts'
import { route, type Route } from '../http/route.ts'
import { readRevision } from '../queries/at-revision.ts'
import { facetsOf } from '../queries/facets.ts'
import { listText } from '../queries/list.ts'
import { pointsText } from '../queries/points.ts'
import { readFilter } from './read-filter.ts'

export const galaxyRoutes: Route[] = [
  route({
    method: 'get', path: '/api/galaxies', summary: 'Rows of the catalogue under a filter, page by page', permission: 'catalogue.read', answer: galaxyListSchema,
    handle: async (context) => {
      const filter = readFilter(context.request)
      const revision = await readRevision(context.knex, context.reader, filter.at)
      if (!answeredAlready(context, revision)) sendJsonText(context.response, await listText(context.knex, filter, revision))
    },
  }),
  route({
    method: 'get', path: '/api/galaxies/facets', summary: 'Counts and histograms under a filter, each facet without its own condition', permission: 'catalogue.read',
    answer: facetsSchema,
    handle: async (context) => {
      const filter = readFilter(context.request)
      const revision = await readRevision(context.knex, context.reader, filter.at)
      if (!answeredAlready(context, revision)) return facetsOf(context.knex, filter, revision)
    },
  }),
  route({
    method: 'get', path: '/api/galaxies/points', summary: 'All galaxies under a filter, column by column, for maps', permission: 'catalogue.read', answer: pointsSchema,
    handle: async (context) => {
      const filter = readFilter(context.request)
      const revision = await readRevision(context.knex, context.reader, filter.at)
      if (!answeredAlready(context, revision)) sendJsonText(context.response, await pointsText(context.knex, filter, revision))
    },
  }),
]
