/** The application on a fresh database, asked over HTTP by a visitor and by a researcher who signed in. */
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import type { Knex } from 'knex'
import { pino } from 'pino'
import { afterAll, beforeAll } from 'vitest'
import type { ZodType, z } from 'zod'
import type { Problem } from '../../../core/problem.ts'
import { createApp, type App } from '../../../server/app.ts'
import { hashPassword } from '../../../server/auth/passwords.ts'
import { loadConfig } from '../../../server/config.ts'
import { useTestDatabase } from './database.ts'

const PASSWORD = 'a password of the tests'
const UNLIMITED = { most: 1e6, perSeconds: 60 }

export interface ReaderOfTests {
  /** As it came, body unread. */
  fetch: (path: string, headers?: Record<string, string>) => Promise<Response>
  /** The answer, checked against the contract. @throws Error that shows what came instead of 200 */
  get: <Schema extends ZodType>(path: string, schema: Schema) => Promise<z.output<Schema>>
  /** The problem document that came with this status. */
  problem: (path: string, status: number) => Promise<Problem>
}

export interface Readers {
  knex: Knex
  base: string
  visitor: ReaderOfTests
  researcher: ReaderOfTests
}

/** @param fill - puts the catalogue of the test file in place */
export function useReaders(fill: (knex: Knex) => Promise<void>): () => Readers {
  const database = useTestDatabase()
  let readers: Readers | undefined
  let app: App | undefined
  let server: Server | undefined
  beforeAll(async () => {
    const { knex, url } = database()
    const config = loadConfig({ DATABASE_URL: url, SESSION_SECRET: 'x'.repeat(40), NODE_ENV: 'test', LOG_LEVEL: 'silent' })
    const limits = { 'read': UNLIMITED, 'write': UNLIMITED, 'sign-in': UNLIMITED, 'export': UNLIMITED, 'upload': UNLIMITED }
    app = createApp({ knex, config, log: pino({ level: 'silent' }) }, { limits })
    server = createServer(app.express)
    await new Promise<void>((listening) => server?.listen(0, '127.0.0.1', listening))
    const base = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
    await fill(knex)
    await knex('users').insert({ name: 'Rex Halden', email: 'rex@readers.test', roles: ['researcher'], state: 'active', passwordHash: await hashPassword(PASSWORD) })
    readers = { knex, base, visitor: readerAt(base, {}), researcher: readerAt(base, await signIn(base)) }
  })
  afterAll(async () => {
    server?.closeAllConnections()
    await new Promise<void>((closed) => (server ? server.close(() => closed()) : closed()))
    await app?.close()
  })
  return () => {
    if (!readers) throw new Error('the readers exist only while tests run')
    return readers
  }
}

async function signIn(base: string): Promise<Record<string, string>> {
  const response = await fetch(`${base}/api/session`, {
    method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify({ email: 'rex@readers.test', password: PASSWORD }),
  })
  if (!response.ok) throw new Error(`the researcher could not sign in: ${await response.text()}`)
  return { cookie: response.headers.getSetCookie().map((c) => c.split(';')[0]).join('; ') }
}

function readerAt(base: string, own: Record<string, string>): ReaderOfTests {
  const ask = (path: string, headers: Record<string, string> = {}): Promise<Response> => fetch(base + path, { headers: { ...own, ...headers } })
  return {
    fetch: ask,
    get: async (path, schema) => {
      const response = await ask(path)
      const text = await response.text()
      if (response.status !== 200) throw new Error(`${path} answered ${response.status}: ${text.slice(0, 1000)}`)
      return schema.parse(JSON.parse(text))
    },
    problem: async (path, status) => {
      const response = await ask(path)
      const text = await response.text()
      if (response.status !== status) throw new Error(`${path} answered ${response.status}, not ${status}: ${text.slice(0, 1000)}`)
      if (!response.headers.get('content-type')?.startsWith('application/problem+json')) throw new Error(`${path} answered no problem document`)
      return JSON.parse(text) as Problem
    },
  }
}
