/** Measurements of the running process, in Prometheus's words. */
import type { RequestHandler } from 'express'
import { collectDefaultMetrics, Gauge, Histogram, Registry } from 'prom-client'

export const registry = new Registry()
collectDefaultMetrics({ register: registry, prefix: 'vicinage_' })

const requestSeconds = new Histogram({
  name: 'vicinage_http_request_seconds', help: 'Time to answer a request, by route', labelNames: ['route', 'method', 'status'], registers: [registry],
  buckets: [0.002, 0.005, 0.01, 0.025, 0.05, 0.1, 0.25, 0.5, 1, 2.5, 5, 10],
})

export const catalogueRevision = new Gauge({ name: 'vicinage_catalogue_revision', help: 'Number of the current revision', registers: [registry] })

/** Counts and times what a route answers, under the route's pattern: an address of its own for each galaxy would be no measurement. */
export function timed(path: string): RequestHandler {
  return (request, response, next) => {
    const stop = requestSeconds.startTimer()
    // The log, compression, a pipeline and this all wait for its end: more than the ten that Node takes for a leak.
    response.setMaxListeners(24)
    response.once('close', () => stop({ route: path, method: request.method, status: String(response.statusCode) }))
    next()
  }
}
