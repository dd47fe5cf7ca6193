/** Texts that can be stored and sent on: whole Unicode, no NUL, in values that are not nested without end. */
import { isUtf8 } from 'node:buffer'
import { BadInput, HttpError } from './errors.ts'

/** Deeper JSON than this is nobody's honest request. */
const DEEPEST = 24

const UNSTORABLE = /\u0000|\p{Surrogate}/u

/** @throws BadInput naming the field that holds a NUL or half of a character, or for a value nested too deeply */
export function requirePlain(value: unknown, path: readonly (string | number)[] = []): void {
  if (path.length > DEEPEST) throw new BadInput('The body is nested too deeply. Nothing was changed.', [{ path: path.slice(0, 3).join('.'), message: `More than ${DEEPEST} levels.` }])
  if (typeof value === 'string') return requireStorable(value, path)
  if (typeof value !== 'object' || value === null) return
  for (const [key, member] of Object.entries(value)) {
    requireStorable(key, path)
    requirePlain(member, [...path, key])
  }
}

function requireStorable(text: string, path: readonly (string | number)[]): void {
  if (UNSTORABLE.test(text)) {
    throw new BadInput('A text holds a character that cannot be stored. Nothing was changed.', [{ path: path.join('.'), message: 'This holds a NUL or half of a character: type it anew.' }])
  }
}

/** For the body parser, which would put replacement characters in the place of what is no UTF-8. @throws BadInput */
export function requireUtf8(_request: unknown, _response: unknown, bytes: Buffer): void {
  if (!isUtf8(bytes)) throw new BadInput('The body is not UTF-8. Nothing was changed; send it in UTF-8.', [{ path: '', message: 'This is not UTF-8.' }])
}

/** A query string, percent-encoded. @throws BadInput */
export function requirePlainQuery(search: string): void {
  let text: string
  try {
    text = decodeURIComponent(search)
  } catch {
    throw new BadInput('The query of the address cannot be read: a % begins no character of UTF-8. Write a percent sign as %25.')
  }
  if (UNSTORABLE.test(text)) throw new BadInput('The query of the address holds a character that cannot be searched for (a NUL).')
}

export function wrongMediaType(detail: string): HttpError {
  return new HttpError(415, 'Not understood', detail, { kind: 'media-type' })
}
