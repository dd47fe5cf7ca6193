/** Signing in and out. */
import type { Request, Response } from 'express'
import { HttpError } from '../http/errors.ts'
import type { Services } from '../http/route.ts'
import { record } from '../services/audit.ts'
import type { Person } from './people.ts'
import { newCsrfToken, sessionCookieName, sessionCookieOptions } from './sessions.ts'

/** The same answer whether the address is unknown, suspended, or the password wrong. */
const REFUSED = 'This e-mail address and password do not belong together. Nothing was changed; try again.'

/**
 * Lets the person of the request's body in, under a new session id, whatever cookie came with the request.
 *
 * @param email - the address that was typed, for the record of a refusal
 * @throws HttpError 401
 */
export async function signIn({ knex }: Services, request: Request, email: string): Promise<Person> {
  const person = (await request.personOfBody?.()) ?? null
  if (!person) {
    await record(knex, null, 'session.refuse', 'session', { email: email.slice(0, 120), address: request.ip })
    throw new HttpError(401, 'Not signed in', REFUSED, { kind: 'refused', errors: [{ path: 'password', message: 'This does not fit the address.' }] })
  }
  await called((done) => request.login(person, done))
  request.session.startedAt = Date.now()
  request.session.csrfToken = newCsrfToken()
  await record(knex, person.id, 'session.begin', `user:${person.id}`, { address: request.ip })
  return person
}

/** Ends the session on the server and in the browser. */
export async function signOut({ knex, config }: Services, request: Request, response: Response): Promise<void> {
  const person = request.user
  if (!person) return
  await called((done) => request.logout(done))
  await called((done) => request.session.destroy(done))
  response.clearCookie(sessionCookieName(config), sessionCookieOptions(config))
  await record(knex, person.id, 'session.end', `user:${person.id}`)
}

/** Waits for something that reports by callback. */
function called(start: (done: (error: unknown) => void) => void): Promise<void> {
  return new Promise((resolve, reject) => start((error) => (error ? reject(error as Error) : resolve())))
}
