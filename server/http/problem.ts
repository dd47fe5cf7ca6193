/** Whatever went wrong, as a problem document (RFC 9457). */
import type { Request, Response } from 'express'
import multer from 'multer'
import { ZodError } from 'zod'
import type { Problem } from '../../core/problem.ts'
import { BadInput, HttpError, TooLarge, type FieldError } from './errors.ts'

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

/** Express's body parser speaks in `type`s. */
function fromParser(error: unknown): HttpError | null {
  const { type, status } = (error ?? {}) as { type?: unknown; status?: unknown }
  if (type === 'entity.parse.failed') return new BadInput('The body is no JSON that can be read. Nothing was changed.', [{ path: '', message: 'This is not JSON.' }])
  if (type === 'entity.too.large') return new TooLarge('The body is larger than can be taken. Nothing was changed.')
  if (type === 'encoding.unsupported' || type === 'charset.unsupported') return new HttpError(415, 'Not understood', 'The body must be JSON in UTF-8. Nothing was changed.')
  if (typeof type === 'string' && typeof status === 'number' && status >= 400 && status < 500) return new BadInput('The request broke off or cannot be read. Nothing was changed.')
  if (error instanceof URIError) return new BadInput('The address cannot be read: a % is not followed by two hexadecimal digits.')
  return null
}

const SQL_STATES: Readonly<Record<string, () => HttpError>> = {
  // lock_not_available, query_canceled
  '55P03': () => new HttpError(503, 'Busy', 'Somebody else is changing the catalogue just now. Nothing was changed; try again in a moment.', { kind: 'busy', headers: { 'retry-after': '2' } }),
  '57014': () => new HttpError(503, 'Too slow', 'That took longer than may be waited for. Nothing was changed; narrow the question and try again.', { kind: 'too-slow', headers: { 'retry-after': '5' } }),
  // A NUL byte in a text.
  '22021': () => new BadInput('A text holds a character that cannot be stored. Nothing was changed.'),
  '22P05': () => new BadInput('A text holds a character that cannot be stored. Nothing was changed.'),
}

function fromDatabase(error: unknown): HttpError | null {
  const { code } = (error ?? {}) as { code?: unknown }
  if (typeof code !== 'string') return null
  return SQL_STATES[code]?.() ?? null
}

const OURS: Problem = {
  type: 'about:blank', title: 'Something went wrong on the server', status: 500,
  detail: 'This is a fault of the server, not of what you sent. Nothing was changed. Try again; if it stays so, tell the steward the request’s number.',
}

/** Answers with the problem, unless an answer has already begun: then the connection is broken off, so that it cannot be taken for whole. */
export function sendProblem(request: Request, response: Response, error: unknown): void {
  if (response.headersSent) {
    response.destroy()
    return
  }
  const answer = asAnswer(error)
  const { kind, errors, conflicts, headers } = answer?.extra ?? {}
  const problem: Problem = answer
    ? { type: kind ? `urn:vicinage:problem:${kind}` : 'about:blank', title: answer.title, status: answer.status, detail: answer.message, errors, conflicts }
    : OURS
  for (const [name, value] of Object.entries(headers ?? {})) response.setHeader(name, value)
  response.setHeader('cache-control', 'no-store')
  response.status(problem.status).type('application/problem+json').send(JSON.stringify({ ...problem, instance: String(request.id ?? '') || undefined }))
}
