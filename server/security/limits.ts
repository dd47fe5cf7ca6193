/** How often one reader may ask, by kind of request. */
import type { RequestHandler } from 'express'
import { ipKeyGenerator, rateLimit } from 'express-rate-limit'
import type { Limit } from '../http/route.ts'
import { HttpError } from '../http/errors.ts'
import { sendProblem } from '../http/problem.ts'

export type Limits = Readonly<Record<Limit, { most: number; perSeconds: number }>>

export const DEFAULT_LIMITS: Limits = {
  'read': { most: 3000, perSeconds: 60 },
  'write': { most: 600, perSeconds: 60 },
  'sign-in': { most: 20, perSeconds: 300 },
  'export': { most: 120, perSeconds: 60 },
  'upload': { most: 60, perSeconds: 600 },
}

/** One limiter a kind; a signed-in person is counted as himself, a visitor by his address. */
export function limiters(limits: Limits): Readonly<Record<Limit, RequestHandler>> {
  const make = (kind: Limit): RequestHandler => {
    const { most, perSeconds } = limits[kind]
    return rateLimit({
      windowMs: perSeconds * 1000,
      limit: most,
      standardHeaders: 'draft-7',
      legacyHeaders: false,
      // Many people may sign in from one address; only what is refused counts against it.
      skipSuccessfulRequests: kind === 'sign-in',
      keyGenerator: (request) => (request.user && kind !== 'sign-in' ? `user:${request.user.id}` : ipKeyGenerator(request.ip ?? 'unknown')),
      handler: (request, response) => {
        const wait = Number(response.getHeader('retry-after')) || perSeconds
        sendProblem(request, response, new HttpError(429, 'Too often', `That was asked too often. Nothing was changed; wait ${wait} seconds, then try again.`, { kind: 'too-often', headers: { 'retry-after': String(wait) } }))
      },
    })
  }
  return { 'read': make('read'), 'write': make('write'), 'sign-in': make('sign-in'), 'export': make('export'), 'upload': make('upload') }
}
