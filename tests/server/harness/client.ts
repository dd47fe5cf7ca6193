/** A browser's part of HTTP for tests: one cookie jar, the session's token on writes, answers that say what came instead. */
import type { ZodType, z } from 'zod'
import { problemSchema, type Problem } from '../../../core/problem.ts'
import { sessionSchema, type Session } from '../../../core/schema/session.ts'
import { PASSWORD } from './people.ts'

export interface Sending {
  /** Sent as JSON, unless it is a form, bytes or `raw`. */
  body?: unknown
  raw?: string | Uint8Array
  headers?: Record<string, string>
  /** Leaves the session's token out. */
  withoutToken?: boolean
}

export interface Answer {
  status: number
  headers: Headers
  bytes: Buffer
  text: string
  /** @throws Error that shows what came instead */
  ok: <Schema extends ZodType>(schema: Schema, status?: number) => z.output<Schema>
  /** The problem document. @throws Error that shows what came instead, also when it is no proper document */
  problem: (status: number) => Problem
}

export class Client {
  readonly base: string
  readonly cookies = new Map<string, string>()
  token = ''

  constructor(base: string) {
    this.base = base
  }

  get cookie(): string {
    return [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ')
  }

  async send(method: string, path: string, { body, raw, headers = {}, withoutToken = false }: Sending = {}): Promise<Answer> {
    const sent: Record<string, string> = {
      ...(this.cookies.size > 0 && { cookie: this.cookie }),
      ...(this.token !== '' && !withoutToken && { 'x-csrf-token': this.token }),
      ...(body !== undefined && !(body instanceof FormData) && { 'content-type': 'application/json' }),
      ...headers,
    }
    const payload = raw !== undefined ? (typeof raw === 'string' ? raw : new Uint8Array(raw)) : body instanceof FormData ? body : body === undefined ? undefined : JSON.stringify(body)
    const response = await fetch(this.base + path, { method, headers: sent, body: payload, redirect: 'manual' })
    for (const line of response.headers.getSetCookie()) this.#keep(line)
    return answerOf(`${method} ${path}`, response, Buffer.from(await response.arrayBuffer()))
  }

  get(path: string, sending?: Sending): Promise<Answer> {
    return this.send('GET', path, sending)
  }

  post(path: string, body: unknown): Promise<Answer> {
    return this.send('POST', path, { body })
  }

  patch(path: string, body: unknown): Promise<Answer> {
    return this.send('PATCH', path, { body })
  }

  delete(path: string): Promise<Answer> {
    return this.send('DELETE', path)
  }

  /** Puts a file into a form's field, as the browser would. */
  upload(path: string, field: string, fileName: string, content: string | Uint8Array): Promise<Answer> {
    const form = new FormData()
    form.append(field, new Blob([typeof content === 'string' ? content : new Uint8Array(content)]), fileName)
    return this.send('POST', path, { body: form })
  }

  async signIn(email: string, password = PASSWORD): Promise<Session> {
    const session = (await this.post('/api/session', { email, password })).ok(sessionSchema)
    this.token = session.csrfToken
    return session
  }

  async signOut(): Promise<void> {
    ;(await this.delete('/api/session')).ok(sessionSchema)
    this.token = ''
  }

  #keep(line: string): void {
    const [pair = '', ...attributes] = line.split('; ')
    const [name = '', value = ''] = [pair.slice(0, pair.indexOf('=')), pair.slice(pair.indexOf('=') + 1)]
    const expires = attributes.find((a) => a.startsWith('Expires='))?.slice('Expires='.length)
    if (expires !== undefined && Date.parse(expires) <= Date.now()) this.cookies.delete(name)
    else this.cookies.set(name, value)
  }
}

function answerOf(what: string, response: Response, bytes: Buffer): Answer {
  const text = bytes.toString('utf8')
  const { status, headers } = response
  const expected = (wanted: number): void => {
    if (status !== wanted) throw new Error(`${what} answered ${status}, not ${wanted}: ${text.slice(0, 1500)}`)
  }
  return {
    status, headers, bytes, text,
    ok: (schema, wanted = 200) => {
      expected(wanted)
      return schema.parse(JSON.parse(text))
    },
    problem: (wanted) => {
      expected(wanted)
      if (!headers.get('content-type')?.startsWith('application/problem+json')) throw new Error(`${what} answered ${status} without a problem document: ${text.slice(0, 500)}`)
      const problem = problemSchema.strict().parse(JSON.parse(text))
      if (problem.status !== status) throw new Error(`${what} answered ${status}, and its document says ${problem.status}`)
      return problem
    },
  }
}
