/** From a list of routes to Express: limit, who, permission, own page, parse, service, answer. */
import type { Express, NextFunction, Request, RequestHandler, Response } from 'express'
import type { ZodType } from 'zod'
import { can } from '../../core/permissions.ts'
import { requireOwnPage } from '../auth/same-origin.ts'
import { readerOf } from '../auth/people.ts'
import type { Limits } from '../security/limits.ts'
import { limiters } from '../security/limits.ts'
import { readJson, readUpload } from './bodies.ts'
import { BadInput, Forbidden, HttpError, NotFound, NotSignedIn } from './errors.ts'
import { timed } from './metrics.ts'
import { requirePlain, requirePlainQuery } from './plain-text.ts'
import type { Route, RouteContext, RouteDefinition, Services } from './route.ts'

type AnyContext = RouteContext<unknown, unknown, unknown>
type AnyRoute = RouteDefinition<unknown, unknown, unknown>

export function mountRoutes(app: Express, routes: readonly Route[], services: Services, limits: Limits): void {
  const limiting = limiters(limits)
  for (const route of routes as readonly unknown[] as readonly AnyRoute[]) {
    const guard: RequestHandler = (request, _response, next) => {
      requirePermission(route, request)
      if (route.method !== 'get') requireOwnPage(request, services.config.publicUrl)
      next()
    }
    const reading: readonly RequestHandler[] = route.upload ? [readUpload(route.upload)] : route.body ? readJson : []
    app[route.method](route.path, timed(route.path), limiting[route.limit ?? (route.method === 'get' ? 'read' : 'write')], guard, ...reading, answerWith(route, services))
  }
  answerOtherMethods(app, routes as readonly unknown[] as readonly AnyRoute[])
}

/** @throws NotSignedIn or Forbidden */
function requirePermission(route: AnyRoute, request: Request): void {
  const reader = readerOf(request.user)
  if (can(reader.permissions, route.permission)) return
  throw reader.user ? new Forbidden('Your account may not do this. Nothing was changed; ask a steward for the role that may.') : new NotSignedIn()
}

function answerWith(route: AnyRoute, services: Services): RequestHandler {
  return async (request: Request, response: Response) => {
    requirePlainQuery(new URL(request.originalUrl, 'http://localhost').search)
    const context: AnyContext = {
      ...services, request, response, reader: readerOf(request.user),
      params: parsePart(route.params, request.params, 'params'),
      query: parsePart(route.query, queryOf(request, route.query), 'query'),
      body: parsePart(route.body, request.body, 'body'),
    }
    const answer = await route.handle(context)
    if (answer !== undefined) response.status(route.status ?? 200).json(answer)
  }
}

/** @throws BadInput naming each field; NotFound when it is the address that names nothing */
function parsePart(schema: ZodType | undefined, value: unknown, part: 'params' | 'query' | 'body'): unknown {
  if (!schema) return value
  if (part === 'params') requirePlain(value)
  const parsed = schema.safeParse(value)
  if (parsed.success) return parsed.data
  if (part === 'params') throw new NotFound('There is nothing at this address.')
  throw parsed.error
}

/** The query string as an object. A key that is sent twice is refused, since nobody could say which was meant. */
function queryOf(request: Request, schema: ZodType | undefined): unknown {
  if (!schema) return undefined
  const search = new URL(request.originalUrl, 'http://localhost').searchParams
  const query = Object.create(null) as Record<string, string>
  for (const [key, value] of search) {
    if (Object.hasOwn(query, key)) throw new BadInput(`"${key}" is given twice. Nothing was changed.`, [{ path: key, message: 'Give it once.' }])
    query[key] = value
  }
  return query
}

/** An address that exists, asked in a way that it has not: which ways it has. */
function answerOtherMethods(app: Express, routes: readonly AnyRoute[]): void {
  const byPath = new Map<string, string[]>()
  for (const { path, method } of routes) byPath.set(path, [...(byPath.get(path) ?? []), method.toUpperCase()])
  for (const [path, methods] of byPath) {
    const allow = [...methods, ...(methods.includes('GET') ? ['HEAD'] : []), 'OPTIONS'].join(', ')
    app.all(path, (request: Request, response: Response, next: NextFunction) => {
      if (request.method === 'OPTIONS') return void response.setHeader('allow', allow).status(204).end()
      next(new HttpError(405, 'Not possible here', `This address answers ${allow}, not ${request.method}. Nothing was changed.`, { kind: 'method', headers: { allow } }))
    })
  }
}
