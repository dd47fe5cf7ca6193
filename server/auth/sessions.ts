/** Sessions in PostgreSQL, by cookie. A visitor has none: reading sets no cookie. */
import { randomBytes } from 'node:crypto'
import connectPgSimple from 'connect-pg-simple'
import type { RequestHandler } from 'express'
import session from 'express-session'
import passport from 'passport'
import { Strategy as LocalStrategy } from 'passport-local'
import pg from 'pg'
import type { Services } from '../http/route.ts'
import { personById, personWith, type Person } from './people.ts'

declare module 'express-session' {
  interface SessionData {
    csrfToken?: string
    /** When signed in, ms since 1970. */
    startedAt?: number
  }
}

declare global {
  // eslint-disable-next-line @typescript-eslint/no-namespace -- the way Express's types are extended
  namespace Express {
    // eslint-disable-next-line @typescript-eslint/no-empty-object-type -- passport's user is our person
    interface User extends Person {}
  }
}

export const SESSION_COOKIE = 'vicinage.sid'
/** A session ends after so long without a request, and in any case after the longer time. */
export const IDLE_MS = 2 * 3600_000
export const ABSOLUTE_MS = 12 * 3600_000

const STORE_CONNECTIONS = 4

export interface SessionLayer {
  /** To be used in this order. */
  handlers: RequestHandler[]
  close: () => Promise<void>
}

export function sessionLayer({ knex, config, log }: Services, now: () => number = Date.now): SessionLayer {
  const pool = new pg.Pool({ connectionString: config.databaseUrl, max: STORE_CONNECTIONS })
  pool.on('error', (error) => log.warn({ err: error }, 'a connection of the session store was lost'))
  const Store = connectPgSimple(session)
  const auth = new passport.Passport()
  auth.use(new LocalStrategy({ usernameField: 'email' }, (email, password, done) => {
    personWith(knex, email, password).then((person) => done(null, person ?? false), done)
  }))
  auth.serializeUser((user, done) => done(null, user.id))
  auth.deserializeUser((id: number, done) => {
    personById(knex, id).then((person) => done(null, person ?? false), done)
  })
  const sessions = session({
    name: SESSION_COOKIE,
    secret: config.sessionSecret,
    store: new Store({ pool, tableName: 'sessions', pruneSessionInterval: 15 * 60, errorLog: (...words: unknown[]) => log.warn({ words }, 'session store') }),
    genid: () => randomBytes(32).toString('base64url'),
    resave: false,
    saveUninitialized: false,
    rolling: true,
    cookie: { httpOnly: true, sameSite: 'lax', secure: config.cookieSecure, maxAge: IDLE_MS, path: '/' },
    proxy: config.trustProxy > 0,
  })
  // A reader without a cookie has no session to look for; most reads are such.
  const whenAsked = (handler: RequestHandler): RequestHandler => (request, response, next) => {
    const needed = request.method !== 'GET' || (request.headers.cookie?.includes(`${SESSION_COOKIE}=`) ?? false)
    if (needed) handler(request, response, next)
    else next()
  }
  const absoluteLimit: RequestHandler = (request, _response, next) => {
    const started = request.session.startedAt
    if (started === undefined || now() - started < ABSOLUTE_MS) return next()
    request.session.regenerate(next)
  }
  return {
    handlers: [sessions, absoluteLimit, auth.initialize(), auth.session()].map(whenAsked),
    close: () => pool.end(),
  }
}

/** The secret that a page of this session sends with every write. */
export function newCsrfToken(): string {
  return randomBytes(32).toString('base64url')
}
