/** People at the desk, for tests: signed in over HTTP, each with a session of his own, and what the server answers them. */
import { createServer } from 'node:http'
import type { Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { Knex } from 'knex'
import { pino } from 'pino'
import { afterAll, beforeAll } from 'vitest'
import type { Problem } from '../../../core/problem.ts'
import type { Role } from '../../../core/permissions.ts'
import { createApp } from '../../../server/app.ts'
import type { App } from '../../../server/app.ts'
import { hashPassword } from '../../../server/auth/passwords.ts'
import { loadConfig } from '../../../server/config.ts'
import { useTestDatabase } from '../harness/database.ts'
import { layGround } from './catalogue.ts'
import type { Ground } from './catalogue.ts'

const PASSWORD = 'a password of the tests'
/** The property tests ask more often than a person may. */
const UNLIMITED = { most: 1e6, perSeconds: 60 }

export interface Answer {
  status: number
  /** The answer, when the status is the one wanted. @throws Error that shows what came instead */
  ok: <T>(status: number) => T
  problem: () => Problem
}

export interface Person {
  id: number
  name: string
  get: (path: string) => Promise<Answer>
  post: (path: string, body: unknown) => Promise<Answer>
  patch: (path: string, body: unknown) => Promise<Answer>
  delete: (path: string) => Promise<Answer>
  upload: (path: string, fileName: string, bytes: Uint8Array | string) => Promise<Answer>
}

const PEOPLE = {
  curator: { name: 'Cara Lind', roles: ['curator'] },
  otherCurator: { name: 'Otto Brandt', roles: ['curator'] },
  approver: { name: 'Ada Moreau', roles: ['approver'] },
  otherApprover: { name: 'Bo Sanders', roles: ['approver'] },
  steward: { name: 'Stella Noor', roles: ['steward'] },
  researcher: { name: 'Rex Halden', roles: ['researcher'] },
} as const satisfies Record<string, { name: string; roles: readonly Role[] }>

export type Desk = { knex: Knex; ground: Ground; uploads: string } & Record<keyof typeof PEOPLE, Person>

/** For the top of a test file: a server of its own on a fresh database, with everybody signed in. */
export function useDesk(): () => Desk {
  const database = useTestDatabase()
  let desk: Desk | undefined
  let app: App | undefined
  let server: Server | undefined
  const uploads = mkdtempSync(join(tmpdir(), 'vicinage-uploads-'))
  beforeAll(async () => {
    const { knex, url } = database()
    const config = loadConfig({ DATABASE_URL: url, SESSION_SECRET: 'x'.repeat(40), NODE_ENV: 'test', UPLOADS_DIR: uploads, LOG_LEVEL: 'silent' })
    const limits = { 'read': UNLIMITED, 'write': UNLIMITED, 'sign-in': UNLIMITED, 'export': UNLIMITED, 'upload': UNLIMITED }
    app = createApp({ knex, config, log: pino({ level: 'silent' }) }, { limits })
    server = createServer(app.express)
    await new Promise<void>((listening) => server?.listen(0, '127.0.0.1', listening))
    const base = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
    const ground = await layGround(knex)
    const passwordHash = await hashPassword(PASSWORD)
    const people = {} as Record<keyof typeof PEOPLE, Person>
    for (const [key, { name, roles }] of Object.entries(PEOPLE)) {
      const email = `${key.toLowerCase()}@desk.test`
      await knex('users').insert({ name, email, roles: [...roles], state: 'active', passwordHash })
      people[key as keyof typeof PEOPLE] = await signIn(base, email, name)
    }
    desk = { knex, ground, uploads, ...people }
  })
  afterAll(async () => {
    server?.closeAllConnections()
    await new Promise<void>((closed) => (server ? server.close(() => closed()) : closed()))
    await app?.close()
    rmSync(uploads, { recursive: true, force: true })
  })
  return () => {
    if (!desk) throw new Error('the desk exists only while tests run')
    return desk
  }
}

async function signIn(base: string, email: string, name: string): Promise<Person> {
  const signedIn = await fetch(`${base}/api/session`, { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify({ email, password: PASSWORD }) })
  const session = (await signedIn.json()) as { user: { id: number } | null; csrfToken: string }
  if (!session.user) throw new Error(`${email} could not sign in`)
  const headers = { 'cookie': signedIn.headers.getSetCookie().map((c) => c.split(';')[0]).join('; '), 'x-csrf-token': session.csrfToken }

  const ask = async (method: string, path: string, body?: BodyInit, type?: string): Promise<Answer> => {
    const response = await fetch(base + path, { method, body, headers: type === undefined ? headers : { ...headers, 'content-type': type } })
    const text = await response.text()
    const answer: unknown = text === '' ? undefined : JSON.parse(text)
    return {
      status: response.status,
      ok: <T>(status: number): T => {
        if (response.status !== status) throw new Error(`${method} ${path} answered ${response.status}, not ${status}: ${text.slice(0, 2000)}`)
        return answer as T
      },
      problem: () => answer as Problem,
    }
  }
  const json = (method: string, path: string, body: unknown): Promise<Answer> => ask(method, path, JSON.stringify(body), 'application/json')
  return {
    id: session.user.id,
    name,
    get: (path) => ask('GET', path),
    post: (path, body) => json('POST', path, body),
    patch: (path, body) => json('PATCH', path, body),
    delete: (path) => ask('DELETE', path),
    upload: (path, fileName, bytes) => {
      const form = new FormData()
      form.append('file', new Blob([typeof bytes === 'string' ? bytes : new Uint8Array(bytes)]), fileName)
      return ask('POST', path, form)
    },
  }
}
