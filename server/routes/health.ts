/** For those who keep the server running. */
import { z } from 'zod'
import { HttpError } from '../http/errors.ts'
import { catalogueRevision, registry } from '../http/metrics.ts'
import { route, type Route } from '../http/route.ts'
import { pendingMigrations } from '../maintenance/migrate.ts'
import { catalogueAtHand } from '../queries/catalogue-at-hand.ts'

const notReady = (detail: string): HttpError => new HttpError(503, 'Not ready', detail, { kind: 'not-ready', headers: { 'retry-after': '5' } })

export const healthRoutes: Route[] = [
  route({
    method: 'get', path: '/api/health', summary: 'Whether the process lives', permission: 'session.use', answer: z.object({ status: z.literal('alive') }),
    handle: () => Promise.resolve({ status: 'alive' }),
  }),
  route({
    method: 'get', path: '/api/ready', summary: 'Whether it can serve: the database answers and is up to date', permission: 'session.use',
    answer: z.object({ status: z.literal('ready'), database: z.literal('answers'), migrations: z.literal('up to date') }),
    handle: async ({ knex }) => {
      const pending = await pendingMigrations(knex).catch(() => {
        throw notReady('The database does not answer. Nothing is lost; try again in a moment.')
      })
      if (pending.length > 0) throw notReady(`The database lacks ${pending.length} migrations. Nothing is lost; start the server anew, which brings it up to date.`)
      return { status: 'ready', database: 'answers', migrations: 'up to date' }
    },
  }),
  route({
    method: 'get', path: '/metrics', summary: 'Measurements in Prometheus text: request times by route, the revision', permission: 'session.use',
    handle: async ({ knex, response }) => {
      catalogueRevision.set((await catalogueAtHand(knex)).revision)
      response.setHeader('cache-control', 'no-store')
      response.type(registry.contentType).send(await registry.metrics())
      return undefined
    },
  }),
]
