/** Whatever went wrong, as a problem document (RFC 9457). */
import type { Request, Response } from 'express'
import multer from 'multer'
import { ZodError } from 'zod'
import type { Problem } from '../../core/problem.ts'
import { BadInput, HttpError, StateConflict, TooLarge, type FieldError } from './errors.ts'
import { wrongMediaType } from './plain-text.ts'

/** The field and the reason of every issue; a path reads as `measurement.value`. */
export function fieldErrors(error: ZodError): FieldError[] {
  return error.issues.map((issue) => ({ path: issue.path.map(String).join('.'), message: issue.message }))
}

/** @returns an error that is an answer; null for a fault of ours */
export function asAnswer(error: unknown): HttpError | null {
  if (error instanceof HttpError) return error
  if (error instanceof ZodError) return new BadInput('Some of what was sent cannot be taken. Nothing was changed.', fieldErrors(error))
  if (error instanceof multer.MulterError) {
    if (error.code === 'LIMIT_FILE_SIZE') return new TooLarge('The file is larger than can be taken. Nothing was kept; send it in parts.')
    return new BadInput('The upload cannot be taken. Nothing was kept.', [{ path: error.field ?? 'file', message: error.message }])
  }
  return fromParser(error) ?? fromDatabase(error)
}

/** Express, its router and its body parser say by `status` and `type` what they could not read. */
function fromParser(error: unknown): HttpError | null {
  const { type, status } = (error ?? {}) as { type?: unknown; status?: unknown }
  if (type === 'entity.parse.failed') return new BadInput('The body is no JSON that can be read. Nothing was changed.', [{ path: '', message: 'This is not JSON.' }])
  if (type === 'entity.too.large') return new TooLarge('The body is larger than can be taken. Nothing was changed.')
  if (type === 'encoding.unsupported' || type === 'charset.unsupported') return wrongMediaType('The body must be JSON in UTF-8. Nothing was changed.')
  if (error instanceof URIError) return new BadInput('The address cannot be read: a % begins no character of UTF-8. Write a percent sign as %25.')
  if (typeof status === 'number' && status >= 400 && status < 500) return new BadInput('The request broke off or cannot be read. Nothing was changed.')
  return null
}

const busy = (detail: string): HttpError => new HttpError(503, 'Busy', detail, { kind: 'busy', headers: { 'retry-after': '2' } })
const unstorable = (): HttpError => new BadInput('A text holds a character that cannot be stored. Nothing was changed.')
const changing = (): HttpError => busy('Somebody else is changing the catalogue just now. Nothing was changed; try again in a moment.')
const away = (): HttpError => busy('The database does not answer just now. Nothing was changed; try again in a moment.')

/** What PostgreSQL's and the system's error codes mean to somebody who asks; every other one is a fault of ours. */
const CODES: Readonly<Record<string, () => HttpError>> = {
  // lock_not_available, serialization_failure, deadlock_detected
  '55P03': changing, '40001': changing, '40P01': changing,
  // query_canceled
  '57014': () => new HttpError(503, 'Too slow', 'That took longer than may be waited for. Nothing was changed; narrow the question and try again.', { kind: 'too-slow', headers: { 'retry-after': '5' } }),
  // character_not_in_repertoire, untranslatable_character
  '22021': unstorable, '22P05': unstorable,
  // unique_violation: two at once, where the first look saw nothing.
  '23505': () => new StateConflict('Somebody else was first with the very same. Nothing was changed; reload, and look at what is there now.'),
  // shutdown, crash, starting up, too many connections, connection failures
  '57P01': away, '57P02': away, '57P03': away, '53300': away, '08000': away, '08003': away, '08006': away, 'ECONNREFUSED': away, 'ECONNRESET': away, 'ETIMEDOUT': away,
}

function fromDatabase(error: unknown): HttpError | null {
  const { code, name, severity } = (error ?? {}) as { code?: unknown; name?: unknown; severity?: unknown }
  if (name === 'KnexTimeoutError') return away()
  const known = typeof code === 'string' ? CODES[code]?.() : undefined
  if (known) return known
  // PostgreSQL ends a connection with it, for whatever reason.
  if (severity === 'FATAL') return away()
  // pg has no code for a connection that ended under a query.
  return error instanceof Error && /^Connection terminated/.test(error.message) ? away() : null
}

const OURS: Problem = {
  type: 'about:blank', title: 'Something went wrong on the server', status: 500,
  detail: 'This is a fault of the server, not of what you sent. Nothing was changed. Try again; if it stays so, tell the steward the request’s number.',
}

/** The document of an error that is an answer; of any other, that the fault is ours. */
export function problemOf(error: unknown): Problem {
  const answer = asAnswer(error)
  if (!answer) return OURS
  const { kind, errors, conflicts } = answer.extra
  return { type: kind ? `urn:vicinage:problem:${kind}` : 'about:blank', title: answer.title, status: answer.status, detail: answer.message, errors, conflicts }
}

/** Answers with the problem, unless an answer has already begun: then the connection is broken off, so that it cannot be taken for whole. */
export function sendProblem(request: Request, response: Response, error: unknown): void {
  if (response.headersSent) {
    response.destroy()
    return
  }
  const problem = problemOf(error)
  // What a route had said of the answer that it did not give.
  for (const name of ['etag', 'content-disposition', 'content-encoding', 'last-modified']) response.removeHeader(name)
  for (const [name, value] of Object.entries(asAnswer(error)?.extra.headers ?? {})) response.setHeader(name, value)
  response.setHeader('cache-control', 'no-store')
  response.status(problem.status).type('application/problem+json').send(JSON.stringify({ ...problem, instance: typeof request.id === 'string' ? request.id : undefined }))
}
