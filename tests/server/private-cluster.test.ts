import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { chmodSync, existsSync, mkdirSync, mkdtempSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs'
import type { Server } from 'node:net'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import pg from 'pg'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Cluster } from '../../scripts/postgres/cluster.mjs'
import { ensureCluster } from '../../scripts/postgres/cluster.mjs'
import { asOwner, databaseOwner } from '../../scripts/postgres/owner.mjs'
import { processesOf } from '../../scripts/postgres/postmaster.mjs'

const folder = mkdtempSync(join(tmpdir(), 'vicinage-cluster-'))
chmodSync(folder, 0o755)
const home = join(folder, 'postgres')
const dataFolder = join(home, 'cluster')
const open = () => ensureCluster({ home, durable: false })

async function query<T extends pg.QueryResultRow>(url: string, sql: string): Promise<T[]> {
  const client = new pg.Client({ connectionString: url })
  await client.connect()
  try {
    return (await client.query<T>(sql)).rows
  } finally {
    await client.end()
  }
}

const remembered = (url: string) => query(url, 'select word from memory')

describe('the private cluster', () => {
  let cluster: Cluster
  beforeAll(async () => {
    cluster = await open()
    await query(cluster.url, "create table memory as select 'kept' as word")
  })
  afterAll(async () => {
    await cluster.stop()
    rmSync(folder, { recursive: true, force: true })
  })

  it('gives the application a role that is no superuser, yet may create the extensions it needs', async () => {
    const [role] = await query(cluster.url, 'select rolsuper, rolcreaterole, rolcreatedb from pg_roles where rolname = current_user')
    expect(role).toEqual({ rolsuper: false, rolcreaterole: false, rolcreatedb: false })
    await query(cluster.url, 'create extension cube; create extension pg_trgm; create extension citext')
  })

  it('asks for the password, keeps it private, and listens on loopback alone', async () => {
    await expect(query(cluster.url.replace(/:[^:@]+@/, ':wrong@'), 'select 1')).rejects.toThrow(/password authentication failed/)
    expect(statSync(join(dataFolder, 'vicinage-access.json')).mode & 0o077).toBe(0)
    const settings = await query<{ name: string; setting: string }>(
      cluster.superuserUrl,
      "select name, setting from pg_settings where name in ('listen_addresses', 'unix_socket_directories', 'password_encryption') order by name",
    )
    expect(settings.map(({ setting }) => setting)).toEqual(['127.0.0.1', 'scram-sha-256', ''])
    const rules = await query<{ auth_method: string }>(cluster.superuserUrl, 'select distinct auth_method from pg_hba_file_rules')
    expect(rules).toEqual([{ auth_method: 'scram-sha-256' }])
  })

  it('is found running by a second start', async () => {
    const again = await open()
    expect(again).toMatchObject({ startedHere: false, pid: cluster.pid, port: cluster.port })
  })

  it('comes back at the same port, with its data, after kill -9 in the middle of work', async () => {
    const busy = new pg.Client({ connectionString: cluster.url })
    busy.on('error', () => undefined)
    await busy.connect()
    const work = busy.query('select pg_sleep(60)').catch((error: unknown) => error)
    process.kill(cluster.pid, 'SIGKILL')
    const { port } = cluster
    cluster = await open()
    expect(await work).toBeInstanceOf(Error)
    expect(cluster).toMatchObject({ startedHere: true, port })
    expect(await remembered(cluster.url)).toEqual([{ word: 'kept' }])
  })

  it('starts although a stale pid file names another living process of the same user', async () => {
    await cluster.stop()
    const bystander = spawn('sleep', ['60'], { ...asOwner(databaseOwner()), stdio: 'ignore' })
    writeFileSync(
      join(dataFolder, 'postmaster.pid'),
      `${bystander.pid}\n${dataFolder}\n1700000000\n${cluster.port}\n\n127.0.0.1\n 1 1\nready   \n`,
    )
    cluster = await open()
    expect(cluster.startedHere).toBe(true)
    expect(await remembered(cluster.url)).toEqual([{ word: 'kept' }])
    expect(bystander.exitCode).toBeNull()
    bystander.kill('SIGKILL')
  })

  it('moves to another port when its own has been taken', async () => {
    await cluster.stop()
    const squatter: Server = createServer().listen(cluster.port, '127.0.0.1')
    await once(squatter, 'listening')
    const taken = cluster.port
    cluster = await open()
    expect(cluster.port).not.toBe(taken)
    expect(await remembered(cluster.url)).toEqual([{ word: 'kept' }])
    squatter.close()
  })

  it('leaves nothing running when it is stopped, and can be started again', async () => {
    await cluster.stop()
    expect(processesOf(dataFolder)).toEqual([])
    cluster = await open()
    expect(await remembered(cluster.url)).toEqual([{ word: 'kept' }])
  })
})

describe('a first start', () => {
  const script = (code: string) => spawn(process.execPath, ['--input-type=module', '-e', code], { stdio: ['ignore', 'pipe', 'inherit'] })
  const ensure = (where: string) => `
    import { ensureCluster } from './scripts/postgres/cluster.mjs'
    const { url } = await ensureCluster({ home: ${JSON.stringify(where)}, durable: false })
    console.log(url)`

  it('may happen twice at once, and clears away what a killed one left', async () => {
    const place = mkdtempSync(join(tmpdir(), 'vicinage-cluster-'))
    chmodSync(place, 0o755)
    const both = join(place, 'postgres')
    mkdirSync(join(both, 'cluster.unfinished-2147483646-00000000', 'base'), { recursive: true })
    const starts = [script(ensure(both)), script(ensure(both))]
    const said = await Promise.all(starts.map(async ({ stdout }) => (await stdout.setEncoding('utf8').toArray()).join('').trim()))
    expect(said[0]).toMatch(/^postgres:/)
    expect(said[1]).toBe(said[0])
    expect(readdirSync(both).sort()).toEqual(['cluster', 'postgres.log'])
    await (await ensureCluster({ home: both })).stop()
    rmSync(place, { recursive: true, force: true })
  })
})

describe('a throwaway cluster', () => {
  it('ends and leaves no folder when its starter is killed', async () => {
    const starter = spawn(
      process.execPath,
      [
        '--input-type=module',
        '-e',
        "import { startThrowaway } from './scripts/postgres/throwaway.mjs'; const { base } = await startThrowaway(); console.log(base); setInterval(() => {}, 1000)",
      ],
      { stdio: ['ignore', 'pipe', 'inherit'] },
    )
    const [base] = (await once(starter.stdout.setEncoding('utf8'), 'data')) as [string]
    const [row] = await query<{ folder: string }>(
      `${base.trim()}/vicinage`,
      "select setting as folder from pg_settings where name = 'port'",
    )
    expect(base.trim().endsWith(`:${row?.folder}`)).toBe(true)
    const [home] = readdirSync(tmpdir())
      .filter((name) => name.startsWith(`vicinage-throwaway-${starter.pid}-`))
      .map((name) => join(tmpdir(), name))
    if (!home) throw new Error('the throwaway cluster is not in the temporary folder')
    starter.kill('SIGKILL')
    const deadline = Date.now() + 20_000
    while (existsSync(home) && Date.now() < deadline) await new Promise((resolve) => setTimeout(resolve, 50))
    expect(existsSync(home)).toBe(false)
    await expect(query(`${base.trim()}/vicinage`, 'select 1')).rejects.toThrow(/ECONNREFUSED/)
  })
})
