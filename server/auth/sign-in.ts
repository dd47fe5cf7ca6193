/** Signing in and out. */
import type { Request, Response } from 'express'
import type { SignIn } from '../../core/schema/session.ts'
import { HttpError } from '../http/errors.ts'
import type { Services } from '../http/route.ts'
import { record } from '../services/audit.ts'
import type { Person } from './people.ts'
import { personWith } from './people.ts'
import { newCsrfToken, SESSION_COOKIE } from './sessions.ts'

/** The same answer whether the address is unknown, suspended, or the password wrong. */
const REFUSED = 'This e-mail address and password do not belong together. Nothing was changed; try again.'

/**
 * Lets somebody in under a new session id, whatever cookie came with the request.
 *
 * @throws HttpError 401
 */
export async function signIn({ knex }: Services, request: Request, { email, password }: SignIn): Promise<Person> {
  const person = await personWith(knex, email, password)
  if (!person) {
    await record(knex, null, 'session.refuse', 'session', { email: email.slice(0, 120), address: request.ip })
    throw new HttpError(401, 'Not signed in', REFUSED, { kind: 'refused', errors: [{ path: 'password', message: 'This does not fit the address.' }] })
  }
  await new Promise<void>((resolve, reject) => request.login(person, (error: unknown) => (error ? reject(error as Error) : resolve())))
  request.session.startedAt = Date.now()
  request.session.csrfToken = newCsrfToken()
  await record(knex, person.id, 'session.begin', `user:${person.id}`, { address: request.ip })
  return person
}

/** Ends the session on the server and in the browser. */
export async function signOut({ knex, config }: Services, request: Request, response: Response): Promise<void> {
  const person = request.user
  if (!person) return
  await new Promise<void>((resolve, reject) => request.logout((error: unknown) => (error ? reject(error as Error) : resolve())))
  await new Promise<void>((resolve, reject) => request.session.destroy((error: unknown) => (error ? reject(error as Error) : resolve())))
  response.clearCookie(SESSION_COOKIE, { path: '/', httpOnly: true, sameSite: 'lax', secure: config.cookieSecure })
  await record(knex, person.id, 'session.end', `user:${person.id}`)
}

