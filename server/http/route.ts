/**
 * A route as a sentence: limit -> who -> permission -> parse -> service -> answer. Routes are plain values in lists; `server/app.ts` turns
 * them into Express, and tests walk the same lists, so that a route without a permission cannot exist.
 */
import type { Request, Response } from 'express'
import type { Knex } from 'knex'
import type { Logger } from 'pino'
import type { ZodType } from 'zod'
import type { Permission, Role } from '../../core/permissions.ts'
import type { Config } from '../config.ts'

/** Who asks. A visitor has no user. */
export interface Reader {
  user: { id: number; name: string; email: string; roles: Role[] } | null
  permissions: readonly Permission[]
}

/** What lies behind every route and every service. */
export interface Services {
  knex: Knex
  config: Config
  log: Logger
}

export interface RouteContext<Params, Query, Body> extends Services {
  reader: Reader
  params: Params
  query: Query
  body: Body
  request: Request
  response: Response
}

/** Which bucket of the rate limiter a route draws from. */
export type Limit = 'read' | 'write' | 'sign-in' | 'export' | 'upload'

export interface RouteDefinition<Params, Query, Body> {
  method: 'get' | 'post' | 'patch' | 'delete'
  /** Express 5 path, beginning with /. */
  path: string
  /** One line for the API documentation. */
  summary: string
  permission: Permission
  limit?: Limit
  params?: ZodType<Params>
  /** Of the parsed query string; without a schema the handler reads `searchParams(request)`. */
  query?: ZodType<Query>
  /** The query is in the filter language (core/filters), which the handler reads itself. */
  filtered?: boolean
  body?: ZodType<Body>
  /** One file under this field name, multipart; the handler reads `context.request.file`. */
  upload?: { field: string; maxBytes: number }
  /** Schema of the answer, for the API documentation. */
  answer?: ZodType
  /** Status of success; 200 unless said otherwise. */
  status?: number
  /**
   * Returns the answer, sent as JSON, or undefined when it has written the response itself (streams, passed-through JSON text).
   */
  handle: (context: RouteContext<Params, Query, Body>) => Promise<unknown>
}

/** A route with its types forgotten, as the lists hold it. */
export type Route = RouteDefinition<never, never, never>

/** States a route; the types of params, query and body follow from the schemas. */
export function route<Params = Record<string, never>, Query = Record<string, never>, Body = undefined>(
  definition: RouteDefinition<Params, Query, Body>,
): Route {
  return definition as unknown as Route
}

/** The query string as it was sent, repeated keys and all. */
export function searchParams(request: Request): URLSearchParams {
  return new URL(request.originalUrl, 'http://localhost').searchParams
}
