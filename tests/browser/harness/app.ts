import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { findFreePort } from '../../../scripts/postgres/postmaster.mjs'
import type { TestDatabase } from '../../server/harness/database.ts'
import { createTestDatabase } from '../../server/harness/database.ts'
import { administer, clusterBase, databaseName } from '../../server/harness/cluster.ts'

export type Catalogue = 'demonstration' | 'published' | 'empty'

/** The application as people get it: the built client, the real server in production mode, a seeded database of its own. */
export interface RunningApp {
  readonly url: string
  /** Password of every demonstration account. */
  readonly demoPassword: string
  readonly database: TestDatabase
  /** What the server has logged so far. */
  log(): string
  stop(): Promise<void>
}

const DEMO_PASSWORD = 'browser-tests-only-0421'
const SERVER = 'dist/server/server'
const START_LIMIT_MS = 60_000

/** Starts the application on a free port. Call `stop` in afterAll. */
export async function startApp({ catalogue }: { catalogue: Catalogue }): Promise<RunningApp> {
  const database = await createTestDatabase(await seededTemplate(catalogue))
  const uploads = await mkdtemp(join(tmpdir(), 'vicinage-uploads-'))
  const port = await findFreePort()
  const url = `http://127.0.0.1:${port}`
  const server = spawn(process.execPath, ['--enable-source-maps', '--import', './scripts/end-with-parent.mjs', `${SERVER}/index.js`], {
    env: environment(catalogue, database.url, { PORT: String(port), UPLOADS_DIR: uploads, PUBLIC_URL: url }),
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  })
  let log = ''
  for (const stream of [server.stdout, server.stderr]) stream?.setEncoding('utf8').on('data', (part: string) => (log += part))
  const stop = async () => {
    if (server.exitCode === null && server.signalCode === null) {
      server.kill('SIGTERM')
      await once(server, 'exit')
    }
    await database.drop()
    await rm(uploads, { recursive: true, force: true })
  }
  const deadline = Date.now() + START_LIMIT_MS
  while (!(await answers(url))) {
    if (server.exitCode === null && Date.now() < deadline) continue
    await stop()
    throw new Error(`the server did not start:\n${log}`)
  }
  return { url, demoPassword: DEMO_PASSWORD, database, log: () => log, stop }
}

/**
 * A seeded database that no one is connected to, made once a run for each catalogue: copying it takes a tenth of a second.
 * @returns its name
 */
async function seededTemplate(catalogue: Catalogue): Promise<string> {
  const name = databaseName(`seeded_${catalogue}`)
  await administer(async (client) => {
    await client.query('select pg_advisory_lock(hashtext($1))', [name])
    const { rowCount } = await client.query('select from pg_database where datname = $1', [name])
    if (rowCount) return
    const unfinished = `${name}_unfinished`
    await client.query(`drop database if exists ${unfinished} with (force)`)
    await client.query(`create database ${unfinished} template ${process.env.TEST_DATABASE_TEMPLATE}`)
    await seed(catalogue, `${clusterBase()}/${unfinished}`)
    await client.query(`alter database ${unfinished} rename to ${name}`)
  })
  return name
}

async function seed(catalogue: Catalogue, url: string): Promise<void> {
  const child = spawn(process.execPath, ['--enable-source-maps', `${SERVER}/maintenance/prepare.js`], {
    env: environment(catalogue, url, {}),
    stdio: ['ignore', 'ignore', 'pipe'],
  })
  let said = ''
  child.stderr.setEncoding('utf8').on('data', (part: string) => (said += part))
  const [code] = (await once(child, 'close')) as [number | null]
  if (code !== 0) throw new Error(`the ${catalogue} catalogue could not be seeded:\n${said}`)
}

function environment(catalogue: Catalogue, databaseUrl: string, more: Record<string, string>): NodeJS.ProcessEnv {
  return {
    PATH: process.env.PATH,
    NODE_ENV: 'production',
    LOG_LEVEL: 'info',
    DATABASE_URL: databaseUrl,
    SESSION_SECRET: 'a-session-secret-for-browser-tests-only',
    DEMO_PASSWORD,
    CATALOGUE: catalogue,
    ...more,
  }
}

async function answers(url: string): Promise<boolean> {
  const answered = await fetch(`${url}/api/health`, { signal: AbortSignal.timeout(5_000) }).then(
    () => true,
    () => false,
  )
  if (!answered) await new Promise((resolve) => setTimeout(resolve, 100))
  return answered
}
