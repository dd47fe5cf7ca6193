/** The log: JSON lines with times in UTC, a request's number on all that belongs to it, and no secrets. */
import { randomUUID } from 'node:crypto'
import type { Request, RequestHandler } from 'express'
import { pino, type DestinationStream, type Logger } from 'pino'
import { pinoHttp } from 'pino-http'
import type { Config } from './config.ts'
import type { Services } from './http/route.ts'

/** Should a whole request, session or account ever be handed to the log. */
const SECRETS = ['password', 'passwordHash', 'cookie', 'authorization', 'csrfToken', 'sessionSecret', 'connectionString', 'databaseUrl', '"set-cookie"', '"x-csrf-token"']
const paths = SECRETS.flatMap((name) => (name.startsWith('"') ? [`[${name}]`, `*[${name}]`, `*.*[${name}]`] : [name, `*.${name}`, `*.*.${name}`]))

/** @param to - where the lines go; standard output unless told otherwise */
export function serverLog({ logLevel }: Pick<Config, 'logLevel'>, to?: DestinationStream): Logger {
  const options = { level: logLevel, timestamp: pino.stdTimeFunctions.isoTime, redact: { paths, censor: '(not logged)' } }
  return to ? pino(options, to) : pino(options)
}

/** Logs each request when it is answered, and tells its number in `X-Request-Id`. */
export function requestLog({ log }: Pick<Services, 'log'>): RequestHandler {
  return pinoHttp({
    logger: log,
    genReqId: (_request, response) => {
      const id = randomUUID()
      response.setHeader('x-request-id', id)
      return id
    },
    // Addresses and times only: no cookies, no tokens, no bodies.
    serializers: {
      req: (request: { id: string; method: string; url: string }) => ({ id: request.id, method: request.method, url: request.url }),
      res: (response: { statusCode: number }) => ({ status: response.statusCode }),
    },
    // By number, so that who was refused what can be found, and a name cannot.
    customProps: (request) => {
      const { user } = request as Request
      return user ? { user: user.id } : {}
    },
    customLogLevel: (_request, response, error) => (error || response.statusCode >= 500 ? 'error' : response.statusCode >= 400 ? 'info' : 'debug'),
  })
}
