/** The application on a fresh database, over HTTP, with a person of each role. */
import { mkdtempSync, rmSync } from 'node:fs'
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { Knex } from 'knex'
import { pino, type Logger } from 'pino'
import { afterAll, beforeAll } from 'vitest'
import type { Role } from '../../../core/permissions.ts'
import { createApp, type App } from '../../../server/app.ts'
import { loadConfig, type Config } from '../../../server/config.ts'
import type { Limits } from '../../../server/security/limits.ts'
import { Client } from './client.ts'
import { useTestDatabase } from './database.ts'
import { addEveryRole, emailOf, type PersonOfTests } from './people.ts'

const UNLIMITED = { most: 1e6, perSeconds: 60 }
export const NO_LIMITS: Limits = { 'read': UNLIMITED, 'write': UNLIMITED, 'sign-in': UNLIMITED, 'export': UNLIMITED, 'upload': UNLIMITED }

export interface ServerOptions {
  limits?: Limits
  /** Environment variables beyond the necessary ones. */
  environment?: Record<string, string>
  log?: Logger
  clientFolder?: string
  now?: () => number
  /** Puts the catalogue of the test file in place, before anybody asks. */
  fill?: (knex: Knex, people: Record<Role, PersonOfTests>) => Promise<void>
}

export interface ServerOfTests {
  base: string
  knex: Knex
  config: Config
  app: App
  people: Record<Role, PersonOfTests>
  /** Somebody without a session. */
  visitor: () => Client
  /** Somebody of this role, in a session of his own. */
  as: (role: Role) => Promise<Client>
}

/** For the top of a test file. */
export function useServer(options: ServerOptions = {}): () => ServerOfTests {
  const database = useTestDatabase()
  let running: { server: Server; tests: ServerOfTests } | undefined
  const uploads = mkdtempSync(join(tmpdir(), 'vicinage-uploads-'))
  beforeAll(async () => {
    const { knex, url } = database()
    const config = loadConfig({ DATABASE_URL: url, SESSION_SECRET: 'x'.repeat(40), NODE_ENV: 'test', LOG_LEVEL: 'silent', UPLOADS_DIR: uploads, ...options.environment })
    const people = await addEveryRole(knex)
    await options.fill?.(knex, people)
    const app = createApp({ knex, config, log: options.log ?? pino({ level: 'silent' }) }, { limits: options.limits ?? NO_LIMITS, clientFolder: options.clientFolder, now: options.now })
    const server = createServer(app.express)
    await new Promise<void>((listening) => server.listen(0, '127.0.0.1', listening))
    const base = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
    const as = async (role: Role): Promise<Client> => {
      const client = new Client(base)
      await client.signIn(emailOf(role))
      return client
    }
    running = { server, tests: { base, knex, config, app, people, visitor: () => new Client(base), as } }
  })
  afterAll(async () => {
    const server = running?.server
    server?.closeAllConnections()
    await new Promise<void>((closed) => (server ? server.close(() => closed()) : closed()))
    await running?.tests.app.close()
    rmSync(uploads, { recursive: true, force: true })
  })
  return () => {
    if (!running) throw new Error('the server exists only while tests run')
    return running.tests
  }
}
