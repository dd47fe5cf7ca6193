/** Sessions in PostgreSQL, by cookie. A visitor has none: reading sets no cookie. */
import { randomBytes } from 'node:crypto'
import type { CookieOptions, RequestHandler } from 'express'
import session from 'express-session'
import passport from 'passport'
import { Strategy as LocalStrategy } from 'passport-local'
import pg from 'pg'
import type { Config } from '../config.ts'
import type { Services } from '../http/route.ts'
import { personById, personWith, type Person } from './people.ts'
import { sessionStore } from './session-store.ts'

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
    interface Request {
      /** The person whom the e-mail address and password of the body let in, or null. */
      personOfBody?: () => Promise<Person | null>
    }
  }
}

/** A session ends after so long without a request, and in any case after the longer time. */
export const IDLE_MS = 2 * 3600_000
export const ABSOLUTE_MS = 12 * 3600_000

const STORE_CONNECTIONS = 4

/** Over https the prefix makes the browser refuse a cookie that another host or an unsafe page has set. */
export function sessionCookieName({ cookieSecure }: Config): string {
  return cookieSecure ? '__Host-vicinage.sid' : 'vicinage.sid'
}

export function sessionCookieOptions({ cookieSecure }: Config): CookieOptions {
  return { path: '/', httpOnly: true, sameSite: 'lax', secure: cookieSecure }
}

export interface SessionLayer {
  /** To be used in this order. */
  handlers: RequestHandler[]
  close: () => Promise<void>
}

export function sessionLayer({ knex, config, log }: Services, now: () => number = Date.now): SessionLayer {
  const pool = new pg.Pool({ connectionString: config.databaseUrl, max: STORE_CONNECTIONS })
  pool.on('error', (error) => log.warn({ err: error }, 'a connection of the session store was lost'))
  const cookieName = sessionCookieName(config)
  const auth = new passport.Passport()
  auth.use(new LocalStrategy({ usernameField: 'email' }, (email, password, done) => {
    personWith(knex, email, password).then((person) => done(null, person ?? false), done)
  }))
  auth.serializeUser((user, done) => done(null, user.id))
  auth.deserializeUser((id: number, done) => {
    personById(knex, id).then((person) => done(null, person ?? false), done)
  })
  const sessions = session({
    name: cookieName,
    secret: config.sessionSecret,
    store: sessionStore(pool, log),
    genid: () => randomBytes(32).toString('base64url'),
    resave: false,
    saveUninitialized: false,
    rolling: true,
    cookie: { httpOnly: true, sameSite: 'lax', secure: config.cookieSecure, maxAge: IDLE_MS, path: '/' },
    proxy: config.trustProxy > 0,
  })
  // A reader without a cookie has no session to look for; most reads are such.
  const whenAsked = (handler: RequestHandler): RequestHandler => (request, response, next) => {
    const needed = (request.method !== 'GET' && request.method !== 'HEAD') || (request.headers.cookie?.includes(`${cookieName}=`) ?? false)
    if (needed) handler(request, response, next)
    else next()
  }
  // A session that names somebody but not since when is none that signing in has finished.
  const absoluteLimit: RequestHandler = (request, _response, next) => {
    const { startedAt, passport: signedIn } = request.session as typeof request.session & { passport?: unknown }
    if (startedAt === undefined ? signedIn === undefined : now() - startedAt < ABSOLUTE_MS) return next()
    request.session.regenerate(next)
  }
  const offerPasswords: RequestHandler = (request, response, next) => {
    request.personOfBody = () =>
      new Promise((resolve, reject) => {
        const decided = (error: unknown, person: Person | false | null | undefined): void => (error ? reject(error as Error) : resolve(person || null))
        ;(auth.authenticate('local', { session: false }, decided) as RequestHandler)(request, response, reject)
      })
    next()
  }
  return {
    handlers: [sessions, absoluteLimit, auth.initialize(), auth.session(), offerPasswords].map(whenAsked),
    close: () => pool.end(),
  }
}

/** The secret that a page of this session sends with every write. */
export function newCsrfToken(): string {
  return randomBytes(32).toString('base64url')
}
