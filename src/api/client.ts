/** The one way from the client to the HTTP interface: typed, cancellable, failing only with an `ApiProblem`. */
import type { z } from 'zod'
import { problemOf, unreachable, unreadable } from './problem.ts'

export { ApiProblem, fieldError } from './problem.ts'

export type Query = Record<string, string | number | boolean | null | undefined>

export interface ReadOptions {
  signal?: AbortSignal
  /** Added to the path; empty, null and undefined values are left out. */
  query?: Query | URLSearchParams
}

export interface SendOptions extends ReadOptions {
  headers?: Record<string, string>
}

export type WriteMethod = 'POST' | 'PUT' | 'PATCH' | 'DELETE'

let csrfToken = ''

/** The token of the present session, sent with every write. Set by src/api/session.ts. */
export function setCsrfToken(token: string): void {
  csrfToken = token
}

const refusalListeners = new Set<(status: 401 | 403) => void>()

/**
 * Calls back when the server refuses something other than signing in: 401, nobody is signed in any more; 403, not allowed, or the
 * session behind the token is gone. Returns the way to stop.
 */
export function onRefused(listener: (status: 401 | 403) => void): () => void {
  refusalListeners.add(listener)
  return () => refusalListeners.delete(listener)
}

function withSearch(path: string, query: Query | URLSearchParams | undefined): string {
  if (!query) return path
  const search = query instanceof URLSearchParams ? query : new URLSearchParams()
  if (!(query instanceof URLSearchParams)) {
    for (const [key, value] of Object.entries(query)) if (value != null && value !== '') search.set(key, String(value))
  }
  const text = search.toString()
  return text ? `${path}${path.includes('?') ? '&' : '?'}${text}` : path
}

async function request(path: string, init: RequestInit): Promise<Response> {
  let response: Response
  try {
    response = await fetch(path, { credentials: 'same-origin', ...init })
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error
    throw unreachable()
  }
  if (response.ok) return response
  const problem = await problemOf(response)
  const signingIn = path === '/api/session' && init.method === 'POST'
  const { status } = problem
  if ((status === 401 || status === 403) && !signingIn) for (const listener of refusalListeners) listener(status)
  throw problem
}

async function readBody<Schema extends z.ZodType>(response: Response, path: string, schema: Schema): Promise<z.output<Schema>> {
  const body: unknown = await response.json().catch(() => undefined)
  const parsed = schema.safeParse(body)
  if (parsed.success) return parsed.data
  const issue = parsed.error.issues[0]
  throw unreadable(path, issue ? `${issue.path.join('.') || 'body'}: ${issue.message}` : 'no body')
}

/**
 * Reads JSON and checks it against the contract.
 *
 * @param path - beginning with /api
 * @throws ApiProblem for every failure but a cancelled request (AbortError)
 */
export async function getJson<Schema extends z.ZodType>(path: string, schema: Schema, options: ReadOptions = {}): Promise<z.output<Schema>> {
  const address = withSearch(path, options.query)
  const response = await request(address, { method: 'GET', headers: { accept: 'application/json' }, signal: options.signal })
  return readBody(response, address, schema)
}

/**
 * Sends JSON (or a form with files) and checks the answer against the contract; with a null schema the answer's body is not read.
 *
 * @throws ApiProblem for every failure but a cancelled request (AbortError)
 */
export async function sendJson<Schema extends z.ZodType>(method: WriteMethod, path: string, body: unknown, schema: Schema, options?: SendOptions): Promise<z.output<Schema>>
export async function sendJson(method: WriteMethod, path: string, body: unknown, schema: null, options?: SendOptions): Promise<null>
export async function sendJson<Schema extends z.ZodType>(
  method: WriteMethod,
  path: string,
  body: unknown,
  schema: Schema | null,
  options: SendOptions = {},
): Promise<z.output<Schema> | null> {
  const address = withSearch(path, options.query)
  const isForm = body instanceof FormData
  const headers: Record<string, string> = { accept: 'application/json', 'x-csrf-token': csrfToken, ...options.headers }
  if (body !== undefined && !isForm) headers['content-type'] = 'application/json'
  const response = await request(address, {
    method,
    headers,
    body: body === undefined ? undefined : isForm ? body : JSON.stringify(body),
    signal: options.signal,
  })
  return schema ? readBody(response, address, schema) : null
}

/**
 * Reads an answer of many lines of JSON, each as it comes and checked against the contract.
 *
 * @throws ApiProblem for every failure but a cancelled request (AbortError)
 */
export async function* getLines<Schema extends z.ZodType>(path: string, schema: Schema, options: ReadOptions = {}): AsyncGenerator<z.output<Schema>> {
  const address = withSearch(path, options.query)
  const { body } = await request(address, { method: 'GET', headers: { accept: 'application/x-ndjson' }, signal: options.signal })
  if (!body) throw unreadable(address, 'no body')
  for await (const line of linesOf(body)) {
    const parsed = schema.safeParse(jsonOf(line))
    if (!parsed.success) throw unreadable(address, parsed.error.issues[0]?.message ?? 'a line of it')
    yield parsed.data
  }
}

async function* linesOf(body: ReadableStream<Uint8Array>): AsyncGenerator<string> {
  const reader = body.pipeThrough(new TextDecoderStream() as ReadableWritablePair<string, Uint8Array>).getReader()
  let rest = ''
  try {
    for (;;) {
      const { done, value } = await reader.read().catch((error: unknown) => {
        if (error instanceof DOMException && error.name === 'AbortError') throw error
        throw unreachable()
      })
      if (done) break
      const lines = (rest + value).split('\n')
      rest = lines.pop() ?? ''
      yield* lines.filter((line) => line.trim() !== '')
    }
  } finally {
    reader.releaseLock()
  }
  if (rest.trim() !== '') yield rest
}

function jsonOf(line: string): unknown {
  try {
    return JSON.parse(line)
  } catch {
    return undefined
  }
}

/** Reads an answer that is not JSON, for example a drawn figure or an export. */
export async function getBlob(path: string, options: ReadOptions = {}): Promise<Blob> {
  const response = await request(withSearch(path, options.query), { method: 'GET', signal: options.signal })
  return response.blob()
}

/** Sends JSON and reads a file: its bytes and the name that the server gives it. */
export async function postForBlob(path: string, body: unknown): Promise<{ blob: Blob; fileName: string }> {
  const response = await request(path, { method: 'POST', headers: { 'content-type': 'application/json', 'x-csrf-token': csrfToken }, body: JSON.stringify(body) })
  const named = /filename="?([^";]+)"?/.exec(response.headers.get('content-disposition') ?? '')
  return { blob: await response.blob(), fileName: named?.[1] ?? 'vicinage' }
}
