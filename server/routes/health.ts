/** For those who keep the server running. */
import { collectDefaultMetrics, Gauge, Histogram, Registry } from 'prom-client'
import { z } from 'zod'
import { HttpError } from '../http/errors.ts'
import { route, type Route } from '../http/route.ts'
import { pendingMigrations } from '../maintenance/migrate.ts'
import { catalogueAtHand } from '../queries/catalogue-at-hand.ts'

const registry = new Registry()
collectDefaultMetrics({ register: registry, prefix: 'vicinage_' })

export const requestSeconds = new Histogram({
  name: 'vicinage_http_request_seconds', help: 'Time to answer a request, by route', labelNames: ['route', 'method', 'status'], registers: [registry],
  buckets: [0.002, 0.005, 0.01, 0.025, 0.05, 0.1, 0.25, 0.5, 1, 2.5, 5, 10],
})
const revision = new Gauge({ name: 'vicinage_catalogue_revision', help: 'Number of the current revision', registers: [registry] })

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
        throw new HttpError(503, 'Not ready', 'The database does not answer. Nothing is lost; try again in a moment.', { kind: 'not-ready', headers: { 'retry-after': '5' } })
      })
      if (pending.length > 0) throw new HttpError(503, 'Not ready', `The database lacks ${pending.length} migrations.`, { kind: 'not-ready', headers: { 'retry-after': '5' } })
      return { status: 'ready', database: 'answers', migrations: 'up to date' }
    },
  }),
  route({
    method: 'get', path: '/api/metrics', summary: 'Measurements in Prometheus text', permission: 'session.use',
    handle: async ({ knex, response }) => {
      revision.set((await catalogueAtHand(knex)).revision)
      response.type(registry.contentType).send(await registry.metrics())
      return undefined
    },
  }),
]
