/** Systems of galaxies. */
import { z } from 'zod'
import { hostSchema, hostsSchema } from '../../core/schema/catalogue.ts'
import { answeredAlready } from '../http/catalogue-answer.ts'
import { route, type Route } from '../http/route.ts'
import { readRevision } from '../queries/at-revision.ts'
import { hostAt, hostsAt } from '../queries/hosts.ts'
import { atQuery } from './parameters.ts'

export const hostRoutes: Route[] = [
  route({
    method: 'get', path: '/api/hosts', summary: 'Hosts of satellites, with radii, velocity dispersions and flattening', permission: 'catalogue.read', query: atQuery, answer: hostsSchema,
    handle: async (context) => {
      const revision = await readRevision(context.knex, context.reader, context.query.at)
      if (!answeredAlready(context, revision)) return hostsAt(context.knex, revision)
    },
  }),
  route({
    method: 'get', path: '/api/hosts/:slug', summary: 'One system: the host, its members, their luminosity function and shape', permission: 'catalogue.read', params: z.object({ slug: z.string() }), query: atQuery,
    answer: hostSchema,
    handle: async (context) => {
      const revision = await readRevision(context.knex, context.reader, context.query.at)
      const answer = await hostAt(context.knex, context.params.slug, revision)
      if (!answeredAlready(context, revision)) return answer
    },
  }),
]
