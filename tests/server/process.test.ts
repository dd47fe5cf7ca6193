import { spawn, type ChildProcess } from 'node:child_process'
import { once } from 'node:events'
import { connect } from 'node:net'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { findFreePort } from '../../scripts/postgres/postmaster.mjs'
import type { Problem } from '../../core/problem.ts'
import { administer, databaseName } from './harness/cluster.ts'
import { useTestDatabase } from './harness/database.ts'

// Starting a whole server takes seconds on a busy machine.
vi.setConfig({ testTimeout: 90_000 })

const database = useTestDatabase()
const children: ChildProcess[] = []

interface Started {
  child: ChildProcess
  url: string
  port: number
  output: () => string
  /** Waits until it has ended; its exit status, or the signal that ended it. */
  ended: () => Promise<number | string | null>
}

async function start(environment: Record<string, string>): Promise<Started> {
  const port = await findFreePort()
  const { PATH = '', HOME = '' } = process.env
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], { env: { PATH, HOME, PORT: String(port), ...environment }, stdio: ['ignore', 'pipe', 'pipe'] })
  children.push(child)
  let said = ''
  for (const stream of [child.stdout, child.stderr]) stream?.setEncoding('utf8').on('data', (part: string) => (said += part))
  const exit = once(child, 'exit') as Promise<[number | null, string | null]>
  return { child, port, url: `http://127.0.0.1:${port}`, output: () => said, ended: async () => exit.then(([code, signal]) => code ?? signal) }
}

async function running(environment: Record<string, string> = {}): Promise<Started> {
  const started = await start({ DATABASE_URL: database().url, SESSION_SECRET: 'p'.repeat(40), ...environment })
  await expect.poll(async () => fetch(`${started.url}/api/ready`).then((r) => r.status, () => started.child.exitCode ?? 0), { timeout: 25_000, interval: 100 }).toBe(200)
  return started
}

afterEach(() => {
  for (const child of children.splice(0)) if (child.exitCode === null && child.signalCode === null) child.kill('SIGKILL')
})

/** Sends bytes as they are. @returns everything that came back until the connection was closed */
function raw(port: number, bytes: string | Buffer): Promise<string> {
  return new Promise((resolve, reject) => {
    let answer = ''
    const socket = connect(port, '127.0.0.1', () => socket.write(bytes))
    socket.setEncoding('utf8').on('data', (part: string) => (answer += part)).on('end', () => resolve(answer)).on('error', reject)
    socket.setTimeout(5000, () => socket.destroy(new Error(`nothing came back but ${JSON.stringify(answer)}`)))
  })
}

const problemIn = (answer: string): Problem => JSON.parse(answer.slice(answer.indexOf('\r\n\r\n') + 4)) as Problem

describe('starting', () => {
  it('says in one sentence which settings are missing or bad, and repeats no secret', async () => {
    const started = await start({ DATABASE_URL: 'mysql://me:hunter2@db/x', PORT: 'http' })
    expect(await started.ended()).toBe(1)
    expect(started.output()).toMatch(/^The server was not started\. .*DATABASE_URL.*SESSION_SECRET.*\n$/)
    expect(started.output()).not.toMatch(/hunter2|\.ts:\d|node:internal/)
  })

  it('refuses a database that is not up to date', async () => {
    const name = databaseName('unmigrated')
    await administer((client) => client.query(`create database ${name}`))
    try {
      const started = await start({ DATABASE_URL: database().url.replace(/[^/]+$/, name), SESSION_SECRET: 'p'.repeat(40) })
      expect(await started.ended()).toBe(2)
      expect(started.output()).toContain('the database lacks 0001_people')
    } finally {
      await administer((client) => client.query(`drop database if exists ${name} with (force)`))
    }
  })

  it('says that a port is taken', async () => {
    const first = await running()
    const second = await start({ DATABASE_URL: database().url, SESSION_SECRET: 'p'.repeat(40), PORT: String(first.port) })
    expect(await second.ended()).toBe(1)
    expect(second.output()).toContain(`cannot listen on 127.0.0.1:${first.port}`)
  })
})

describe('requests that are none', () => {
  it('get a problem document, and the server goes on', async () => {
    const { port, url } = await running()
    const broken: [string, number][] = [
      ['hello\r\n\r\n', 400],
      ['GET / HTTP/9.9\r\n\r\n', 400],
      ['GET /api/health HTTP/1.1\r\nHost: a\r\nX-Bad\u0000: b\r\n\r\n', 400],
      ['POST /api/session HTTP/1.1\r\nHost: a\r\nContent-Length: 5\r\nTransfer-Encoding: chunked\r\n\r\n0\r\n\r\n', 400],
      ['POST /api/session HTTP/1.1\r\nHost: a\r\nContent-Length: -5\r\n\r\n', 400],
      [`GET /api/galaxies?q=${'x'.repeat(20_000)} HTTP/1.1\r\nHost: a\r\n\r\n`, 431],
      [`GET /api/health HTTP/1.1\r\nHost: a\r\nCookie: ${'x'.repeat(20_000)}\r\n\r\n`, 431],
    ]
    for (const [bytes, status] of broken) {
      const answer = await raw(port, bytes)
      expect(answer, bytes.slice(0, 60)).toMatch(new RegExp(`^HTTP/1\\.1 ${status} `))
      expect(answer).toContain('application/problem+json')
      expect(problemIn(answer)).toMatchObject({ status, detail: expect.stringContaining('Nothing was changed') as string })
    }
    expect((await fetch(`${url}/api/health`)).status).toBe(200)
  })

  it('a body that breaks off is let go, and so is TRACE', async () => {
    const { port, url } = await running()
    const socket = connect(port, '127.0.0.1', () => {
      socket.write('POST /api/session HTTP/1.1\r\nHost: a\r\nContent-Type: application/json\r\nContent-Length: 500\r\n\r\n{"email":')
      setTimeout(() => socket.destroy(), 200)
    })
    await once(socket, 'close')
    expect(await raw(port, 'TRACE /api/health HTTP/1.1\r\nHost: a\r\nConnection: close\r\n\r\n')).toMatch(/^HTTP\/1\.1 405 /)
    expect((await fetch(`${url}/api/health`)).status).toBe(200)
  })
})

describe('stopping', () => {
  it.each(['SIGTERM', 'SIGINT'] as const)('by %s answers what is under way, takes nothing new, and ends well', async (signal) => {
    const { child, port, url, ended, output } = await running()
    const { knex } = database()
    // Somebody holds a table, so that a question waits in the middle of its answer.
    const holder = await knex.transaction()
    await holder.raw('lock table releases in access exclusive mode')
    const slow = fetch(`${url}/api/releases`)
    await expect.poll(async () => (await knex.raw<{ rows: unknown[] }>(`select from pg_stat_activity where wait_event_type = 'Lock' and datname = current_database()`)).rows.length).toBeGreaterThan(0)
    child.kill(signal)
    await expect.poll(() => fetch(`${url}/api/health`).then(() => 'answers', () => 'refuses')).toBe('refuses')
    await holder.rollback()
    const answer = await slow
    expect(answer.status).toBe(200)
    expect(await answer.json()).toEqual({ releases: [], current: null })
    expect(await ended()).toBe(0)
    expect(output()).not.toMatch(/Error|"level":50/)
    expect(port).toBeGreaterThan(0)
  })
})

describe('a database that goes away', () => {
  it('makes the server not ready, and it recovers by itself', async () => {
    const { url } = await running()
    const name = new URL(database().url).pathname.slice(1)
    await administer((client) => client.query('select pg_terminate_backend(pid) from pg_stat_activity where datname = $1', [name]))
    await expect.poll(() => fetch(`${url}/api/ready`).then((r) => r.status), { timeout: 15_000 }).toBe(200)
    await administer((client) => client.query(`alter database ${name} allow_connections false`))
    try {
      await administer((client) => client.query('select pg_terminate_backend(pid) from pg_stat_activity where datname = $1', [name]))
      await expect.poll(() => fetch(`${url}/api/ready`).then((r) => r.status), { timeout: 15_000 }).toBe(503)
      expect((await fetch(`${url}/api/health`)).status).toBe(200)
      const asked = await fetch(`${url}/api/releases`)
      expect(asked.status).toBe(503)
      expect(asked.headers.get('content-type')).toContain('application/problem+json')
    } finally {
      await administer((client) => client.query(`alter database ${name} allow_connections true`))
    }
    await expect.poll(() => fetch(`${url}/api/releases`).then((r) => r.status), { timeout: 15_000 }).toBe(200)
  })
})
