/** Answers of the catalogue: the revision they were read at, and how long they may be kept. */
import { createHash } from 'node:crypto'
import type { Request, Response } from 'express'
import type { ReadRevision } from '../queries/at-revision.ts'
import type { Reader } from './route.ts'

interface AnswerContext {
  request: Request
  response: Response
  reader: Reader
}

/** Changes with the shape of the answers, so that no cache keeps an old shape. */
const SHAPE = '2'

/**
 * Sets the headers of an answer that depends on nothing but its address, its reader and the revision.
 *
 * @returns true when the reader holds this very answer already: a 304 was sent, and nothing is left to do
 */
export function answeredAlready({ request, response, reader }: AnswerContext, revision: ReadRevision): boolean {
  const tag = hash([SHAPE, request.originalUrl, reader.user ? 'inside' : 'outside', String(revision.number)])
  return setAndCompare({ request, response, reader }, revision, `W/"r${revision.number}-${tag}"`)
}

/** The same for an answer that can change without the catalogue (a person's name, a release): its content decides. */
export function sendByContent(context: AnswerContext, revision: ReadRevision, text: string): void {
  if (!setAndCompare(context, revision, `W/"c${revision.number}-${hash([text])}"`)) sendJsonText(context.response, text)
}

/** Sends JSON text as it is. */
export function sendJsonText(response: Response, text: string): void {
  response.type('application/json').send(text)
}

/** Which revision an answer speaks of, for every kind of answer. */
export function setRevision(response: Response, revision: ReadRevision): void {
  response.setHeader('x-catalogue-revision', String(revision.number))
}

function setAndCompare({ request, response, reader }: AnswerContext, revision: ReadRevision, etag: string): boolean {
  setRevision(response, revision)
  response.setHeader('etag', etag)
  // What a visitor reads is public; what somebody who signed in reads may be unreleased. Both ask again whether it still holds.
  response.setHeader('cache-control', reader.user ? 'private, no-cache' : 'public, no-cache')
  response.vary('Cookie').vary('Authorization')
  if (!request.fresh) return false
  response.status(304).end()
  return true
}

function hash(parts: readonly string[]): string {
  return createHash('sha256').update(JSON.stringify(parts)).digest('base64url').slice(0, 22)
}
