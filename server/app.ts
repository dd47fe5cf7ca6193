/** The whole server as one Express application. */
import { existsSync } from 'node:fs'
import { join } from 'node:path'
import compression from 'compression'
import express, { type ErrorRequestHandler, type Express, type RequestHandler } from 'express'
import { sessionLayer } from './auth/sessions.ts'
import { NotFound } from './http/errors.ts'
import { mountRoutes } from './http/mount.ts'
import { asAnswer, sendProblem } from './http/problem.ts'
import type { Services } from './http/route.ts'
import { requestLog } from './log.ts'
import { routes } from './routes/index.ts'
import { securityHeaders } from './security/headers.ts'
import { DEFAULT_LIMITS, type Limits } from './security/limits.ts'

export interface AppOptions {
  limits?: Limits
  /** Folder of the built client; without it only the API is served. */
  clientFolder?: string
  /** For tests of what happens when time has passed. */
  now?: () => number
}

export interface App {
  express: Express
  /** Frees what the application holds; the database handle is its maker's. */
  close: () => Promise<void>
}

export function createApp(services: Services, { limits = DEFAULT_LIMITS, clientFolder, now }: AppOptions = {}): App {
  const app = express()
  app.disable('x-powered-by')
  app.set('trust proxy', services.config.trustProxy)
  app.set('etag', false)
  const sessions = sessionLayer(services, now)
  app.use(requestLog(services), securityHeaders(services.config), compression())
  app.use('/api', noStore, ...sessions.handlers)
  mountRoutes(app, routes, services, limits)
  app.use('/api', (_request, _response, next) => next(new NotFound('There is nothing at this address. The interface is described at /api/docs.')))
  if (clientFolder && existsSync(join(clientFolder, 'index.html'))) serveClient(app, clientFolder)
  app.use((_request, _response, next) => next(new NotFound('There is nothing at this address.')))
  app.use(errorAnswer(services))
  return { express: app, close: sessions.close }
}

/** Answers are not kept by caches unless a route says so. */
const noStore: RequestHandler = (_request, response, next) => {
  response.setHeader('cache-control', 'private, no-store')
  next()
}

const YEAR_S = 365 * 24 * 3600

/** Addresses of files, and of what hides behind a point. The label of a release has points too: /releases/2026.1 is a page. */
const NO_PAGE = /\/\.|\.(?:[cm]?[jt]sx?|css|map|html?|json|svg|png|jpe?g|gif|webp|ico|woff2?|ttf|txt|xml|php|env|sql|ya?ml|lock|zip)$/i

/** Built files carry their hash in their name and never change; the page itself is asked for anew each time. */
function serveClient(app: Express, folder: string): void {
  app.use('/assets', express.static(join(folder, 'assets'), { immutable: true, maxAge: YEAR_S * 1000, fallthrough: true }))
  app.use(express.static(folder, { index: false, maxAge: 0 }))
  app.get('/{*page}', (request, response, next) => {
    if (NO_PAGE.test(request.path) || !request.accepts('html')) return next()
    response.setHeader('cache-control', 'no-cache')
    response.sendFile(join(folder, 'index.html'))
  })
}

function errorAnswer({ log }: Services): ErrorRequestHandler {
  return (error: unknown, request, response, _next) => {
    const answer = asAnswer(error)
    if (!answer) log.error({ err: error, requestId: request.id }, 'a request failed')
    // An answer for whoever asked, a trouble for whoever keeps the server.
    else if (answer !== error && answer.status >= 500) log.warn({ err: error, requestId: request.id }, answer.message)
    sendProblem(request, response, error)
  }
}
