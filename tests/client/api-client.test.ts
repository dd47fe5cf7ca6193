import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http'
import type { AddressInfo } from 'node:net'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { ApiProblem, fieldError, getJson, onRefused, sendJson, setCsrfToken } from '../../src/api/client.ts'

let server: Server
let base: string
const seen: { method: string; url: string; csrf: string | undefined; type: string | undefined; body: string }[] = []

async function bodyOf(request: IncomingMessage): Promise<string> {
  const parts: Buffer[] = []
  for await (const part of request) parts.push(Buffer.from(part as Uint8Array))
  return Buffer.concat(parts).toString()
}

async function answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
  const url = new URL(request.url ?? '/', 'http://x')
  const csrf = request.headers['x-csrf-token']
  seen.push({ method: request.method ?? '', url: request.url ?? '', csrf: Array.isArray(csrf) ? csrf[0] : csrf, type: request.headers['content-type'], body: await bodyOf(request) })
  const json = (status: number, body: unknown, type = 'application/json', headers: Record<string, string> = {}): void => {
    response.writeHead(status, { 'content-type': type, ...headers })
    response.end(JSON.stringify(body))
  }
  if (url.pathname === '/ok') json(200, { name: 'Ostrel' })
  else if (url.pathname === '/refused') json(400, { type: 'about:blank', title: 'Not accepted', status: 400, detail: 'One field.', errors: [{ path: 'dec', message: 'must be below 90' }] }, 'application/problem+json')
  else if (url.pathname === '/often') json(429, { type: 'about:blank', title: 'Too often', status: 429, detail: 'Wait.' }, 'application/problem+json', { 'retry-after': '30' })
  else if (url.pathname === '/ended') json(401, { type: 'about:blank', title: 'Not signed in', status: 401, detail: 'Sign in.' }, 'application/problem+json')
  else if (url.pathname === '/gateway') {
    response.writeHead(502, { 'content-type': 'text/html' })
    response.end('<h1>Bad gateway</h1>')
  } else if (url.pathname === '/slow') setTimeout(() => json(200, {}), 2000)
  else json(404, {})
}

beforeAll(async () => {
  server = createServer((request, response) => void answer(request, response))
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  base = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
})
afterAll(() => {
  server.closeAllConnections()
  server.close()
})

const named = z.object({ name: z.string() })

async function problem(promise: Promise<unknown>): Promise<ApiProblem> {
  const error = await promise.then(
    () => null,
    (reason: unknown) => reason,
  )
  if (!(error instanceof ApiProblem)) throw new Error(`no problem but ${String(error)}`)
  return error
}

describe('reading', () => {
  it('checks the answer against the contract', async () => {
    expect(await getJson(`${base}/ok`, named)).toEqual({ name: 'Ostrel' })
    const bad = await problem(getJson(`${base}/ok`, z.object({ slug: z.string() })))
    expect(bad.type).toBe('urn:vicinage:problem:unreadable')
    expect(bad.detail).toContain('slug')
  })

  it('leaves empty parameters out of the address', async () => {
    await getJson(`${base}/ok`, named, { query: { q: 'a&b', host: '', page: null, limit: 50 } })
    expect(seen.at(-1)?.url).toBe('/ok?q=a%26b&limit=50')
  })

  it('says a refusal with its fields, and how long to wait', async () => {
    const refused = await problem(getJson(`${base}/refused`, named))
    expect([refused.status, refused.title, fieldError(refused, 'dec'), fieldError(refused, 'ra')]).toEqual([400, 'Not accepted', 'must be below 90', undefined])
    expect((await problem(getJson(`${base}/often`, named))).retryAfter).toBe(30)
  })

  it('has a sentence for a failure without a problem document, and for silence', async () => {
    expect((await problem(getJson(`${base}/gateway`, named))).title).toBe('The server is not ready')
    expect((await problem(getJson('http://127.0.0.1:1/', named))).status).toBe(0)
  })

  it('passes a cancelled request on as such', async () => {
    const controller = new AbortController()
    const reading = getJson(`${base}/slow`, named, { signal: controller.signal })
    controller.abort()
    await expect(reading).rejects.toMatchObject({ name: 'AbortError' })
  })

  it('tells when the session has ended', async () => {
    const told: number[] = []
    const stop = onRefused((status) => told.push(status))
    await problem(getJson(`${base}/ended`, named))
    await problem(getJson(`${base}/refused`, named))
    stop()
    await problem(getJson(`${base}/ended`, named))
    expect(told).toEqual([401])
  })
})

describe('writing', () => {
  it('carries the token of the session and JSON', async () => {
    setCsrfToken('token-1')
    expect(await sendJson('POST', `${base}/ok`, { value: 27.78 }, named)).toEqual({ name: 'Ostrel' })
    expect(seen.at(-1)).toMatchObject({ method: 'POST', csrf: 'token-1', type: 'application/json', body: '{"value":27.78}' })
  })

  it('sends files as a form, and nothing when there is nothing', async () => {
    const form = new FormData()
    form.set('file', new Blob(['a,b']), 'table.csv')
    expect(await sendJson('POST', `${base}/ok`, form, null)).toBeNull()
    expect(seen.at(-1)?.type).toMatch(/^multipart\/form-data; boundary=/)
    await sendJson('DELETE', `${base}/ok`, undefined, null)
    expect(seen.at(-1)).toMatchObject({ method: 'DELETE', type: undefined, body: '' })
  })
})
