/**
 * What can go wrong, as errors that services throw; `server/http/problem.ts` turns each into a problem document (RFC 9457), once.
 */
import type { Conflict, Problem } from '../../core/problem.ts'

export type FieldError = NonNullable<Problem['errors']>[number]

/** An error that is an answer. */
export class HttpError extends Error {
  readonly status: number
  readonly title: string
  readonly extra: { kind?: string; errors?: FieldError[]; conflicts?: Conflict[]; headers?: Record<string, string> }

  constructor(status: number, title: string, detail: string, extra: HttpError['extra'] = {}) {
    super(detail)
    this.name = new.target.name
    this.status = status
    this.title = title
    this.extra = extra
  }
}

/** 400: what was sent cannot be understood; each field with its reason. */
export class BadInput extends HttpError {
  constructor(detail: string, errors: FieldError[] = []) {
    super(400, 'That could not be understood', detail, { kind: 'bad-input', errors })
  }
}

/** 401 */
export class NotSignedIn extends HttpError {
  constructor(detail = 'Sign in first. Nothing was changed.') {
    super(401, 'Not signed in', detail, { kind: 'not-signed-in' })
  }
}

/** 403 */
export class Forbidden extends HttpError {
  constructor(detail: string) {
    super(403, 'Not permitted', detail, { kind: 'forbidden' })
  }
}

/** 404; also for what the reader may not know of. */
export class NotFound extends HttpError {
  constructor(detail: string) {
    super(404, 'Not found', detail, { kind: 'not-found' })
  }
}

/** 409: the ground moved; what differs, field by field. */
export class StateConflict extends HttpError {
  constructor(detail: string, conflicts: Conflict[] = []) {
    super(409, 'That no longer fits', detail, { kind: 'conflict', conflicts })
  }
}

/** 413 */
export class TooLarge extends HttpError {
  constructor(detail: string) {
    super(413, 'Too large', detail, { kind: 'too-large' })
  }
}
