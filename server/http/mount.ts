/** From a list of routes to Express: limit, who, permission, own page, parse, service, answer. */
import express, { type Express, type NextFunction, type Request, type RequestHandler, type Response } from 'express'
import multer from 'multer'
import type { ZodType } from 'zod'
import { can } from '../../core/permissions.ts'
import { requireOwnPage } from '../auth/same-origin.ts'
import { readerOf } from '../auth/people.ts'
import type { Limits } from '../security/limits.ts'
import { limiters } from '../security/limits.ts'
import { BadInput, Forbidden, HttpError, NotFound, NotSignedIn } from './errors.ts'
import type { Route, RouteContext, RouteDefinition, Services } from './route.ts'

const BODY_LIMIT = '2mb'
/** Deeper JSON than this is nobody's honest request. */
const DEEPEST = 24

type AnyContext = RouteContext<unknown, unknown, unknown>
type AnyRoute = RouteDefinition<unknown, unknown, unknown>

export function mountRoutes(app: Express, routes: readonly Route[], services: Services, limits: Limits): void {
  const limiting = limiters(limits)
  const json = express.json({ limit: BODY_LIMIT, strict: true, type: 'application/json' })
  for (const route of routes as readonly unknown[] as readonly AnyRoute[]) {
    const guard: RequestHandler = (request, _response, next) => {
      requirePermission(route, request)
      if (route.method !== 'get') requireOwnPage(request)
      next()
    }
    const reading: RequestHandler[] = route.upload ? [uploadReader(route.upload)] : route.body ? [requireJson, json] : []
    app[route.method](route.path, limiting[route.limit ?? (route.method === 'get' ? 'read' : 'write')], guard, ...reading, answerWith(route, services))
  }
  refuseOtherMethods(app, routes as readonly unknown[] as readonly AnyRoute[])
}

/** @throws NotSignedIn or Forbidden */
function requirePermission(route: AnyRoute, request: Request): void {
  const reader = readerOf(request.user)
  if (can(reader.permissions, route.permission)) return
  throw reader.user ? new Forbidden('Your account may not do this. Nothing was changed; ask a steward for the role that may.') : new NotSignedIn()
}

function answerWith(route: AnyRoute, services: Services): RequestHandler {
  return async (request: Request, response: Response) => {
    if (route.body) requireSound(request.body)
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
  const parsed = schema.safeParse(value)
  if (parsed.success) return parsed.data
  if (part === 'params') throw new NotFound('There is nothing at this address.')
  throw parsed.error
}

/** The query string as an object. A key that is sent twice is refused, since nobody could say which was meant. */
function queryOf(request: Request, schema: ZodType | undefined): unknown {
  if (!schema) return undefined
  const search = new URL(request.originalUrl, 'http://localhost').searchParams
  const query: Record<string, string> = {}
  for (const [key, value] of search) {
    if (Object.hasOwn(query, key)) throw new BadInput(`"${key}" is given twice. Nothing was changed.`, [{ path: key, message: 'Give it once.' }])
    query[key] = value
  }
  return query
}

const requireJson: RequestHandler = (request, _response, next) => {
  if (request.is('application/json')) next()
  else next(new HttpError(415, 'Not understood', 'The body must be JSON (content type application/json). Nothing was changed.', { kind: 'media-type' }))
}

function uploadReader({ field, maxBytes }: { field: string; maxBytes: number }): RequestHandler {
  const reader = multer({ storage: multer.memoryStorage(), limits: { fileSize: maxBytes, files: 1, fields: 20, parts: 24 } }).single(field)
  return (request, response, next) => {
    if (!request.is('multipart/form-data')) return next(new HttpError(415, 'Not understood', `Send the file as multipart/form-data, in the field "${field}". Nothing was kept.`, { kind: 'media-type' }))
    reader(request, response, (error: unknown) => next(error === undefined || error === null || error instanceof multer.MulterError ? error : new BadInput('The upload broke off or is malformed. Nothing was kept.')))
  }
}

/** NUL, which PostgreSQL's texts cannot hold, and halves of a surrogate pair, which are no character. */
const UNSTORABLE = /\0|\p{Surrogate}/u

/** @throws BadInput for a value nested deeper than any of ours, or a text that cannot be stored */
function requireSound(value: unknown, path: readonly string[] = []): void {
  if (path.length > DEEPEST) throw new BadInput('The body is nested too deeply. Nothing was changed.')
  if (typeof value === 'string' && UNSTORABLE.test(value)) {
    throw new BadInput('A text holds a character that cannot be stored. Nothing was changed.', [{ path: path.join('.'), message: 'This holds a NUL or half a character. Type it again.' }])
  }
  if (typeof value !== 'object' || value === null) return
  for (const [key, member] of Object.entries(value)) requireSound(member, [...path, key])
}

/** An address that exists, asked in a way that it has not. */
function refuseOtherMethods(app: Express, routes: readonly AnyRoute[]): void {
  const byPath = new Map<string, string[]>()
  for (const { path, method } of routes) byPath.set(path, [...(byPath.get(path) ?? []), method.toUpperCase()])
  for (const [path, methods] of byPath) {
    app.all(path, (request: Request, _response: Response, next: NextFunction) => {
      const allow = methods.includes('GET') ? [...methods, 'HEAD'] : methods
      if (allow.includes(request.method)) return next()
      next(new HttpError(405, 'Not possible here', `This address answers ${allow.join(', ')}, not ${request.method}.`, { headers: { allow: allow.join(', ') } }))
    })
  }
}
