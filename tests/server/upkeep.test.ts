import { PassThrough } from 'node:stream'
import { describe, expect, it } from 'vitest'
import { openDatabase } from '../../server/database.ts'
import { asAnswer } from '../../server/http/problem.ts'
import { serverLog } from '../../server/log.ts'
import { makeRevision } from './harness/catalogue-rows.ts'
import { emailOf, PASSWORD } from './harness/people.ts'
import { useServer } from './harness/server.ts'

const lines: string[] = []
const sink = new PassThrough().setEncoding('utf8').on('data', (text: string) => lines.push(...text.split('\n').filter((l) => l !== '')))
const log = serverLog({ logLevel: 'debug' }, sink)
const server = useServer({ log, fill: (knex) => makeRevision(knex, 7, { release: '2026.1' }) })

describe('health and readiness', () => {
  it('says that the process lives and the database is up to date', async () => {
    expect(JSON.parse((await server().visitor().get('/api/health')).text)).toEqual({ status: 'alive' })
    expect(JSON.parse((await server().visitor().get('/api/ready')).text)).toEqual({ status: 'ready', database: 'answers', migrations: 'up to date' })
  })

  it('is not ready while a migration is missing, and lives all the same', async () => {
    const { knex, visitor } = server()
    const [last] = (await knex('knex_migrations').orderBy('id', 'desc').limit(1)) as { id: number; name: string }[]
    await knex('knex_migrations').where({ id: last?.id }).delete()
    try {
      const answer = await visitor().get('/api/ready')
      expect(answer.problem(503).detail).toContain('lacks 1 migration')
      expect(Number(answer.headers.get('retry-after'))).toBeGreaterThan(0)
      expect((await visitor().get('/api/health')).status).toBe(200)
    } finally {
      await knex.raw('insert into knex_migrations (name, batch, migration_time) values (?, 1, now())', [last?.name ?? ''])
    }
  })
})

describe('a database that is away', () => {
  it('is said as that, not as a fault of whoever asks', async () => {
    const nowhere = openDatabase({ databaseUrl: 'postgres://nobody:x@127.0.0.1:1/none' })
    const error = await nowhere('users').first().then(() => null, (e: unknown) => e)
    await nowhere.destroy()
    expect(asAnswer(error)).toMatchObject({ status: 503, extra: { kind: 'busy' } })
  })

  it.each([
    ['select pg_sleep(2)', 503], ['select 1/0', null], [`select 'a' || chr(0)`, null], ['select no_such_column', null],
    [`insert into users (name, email) values ('again', 'curator@people.test')`, 409],
  ] as const)('%s', async (sql, status) => {
    const { knex } = server()
    const error = await knex.transaction(async (trx) => {
      await trx.raw('set local statement_timeout = 300')
      await trx.raw(sql)
    }).then(() => null, (e: unknown) => e)
    expect(error).toBeInstanceOf(Error)
    expect(asAnswer(error)?.status ?? null).toBe(status)
  })
})

describe('GET /metrics', () => {
  it('has request times by route, under the route’s pattern, and the revision', async () => {
    const { visitor } = server()
    await visitor().get('/api/galaxies/no-such-galaxy')
    await visitor().get('/api/releases')
    const answer = await visitor().get('/metrics')
    expect(answer.headers.get('content-type')).toMatch(/^text\/plain/)
    expect(answer.text).toMatch(/^vicinage_catalogue_revision 7$/m)
    expect(answer.text).toMatch(/^vicinage_http_request_seconds_count\{route="\/api\/releases",method="GET",status="200"\} [1-9]/m)
    expect(answer.text).toMatch(/^vicinage_http_request_seconds_count\{route="\/api\/galaxies\/:slug",method="GET",status="404"\} [1-9]/m)
    expect(answer.text).toContain('vicinage_process_cpu_seconds_total')
    expect(answer.text).not.toContain('no-such-galaxy')
  })
})

describe('the log', () => {
  it('has a line for each request with its number, and no secret', async () => {
    const client = server().visitor()
    const { csrfToken } = await client.signIn(emailOf('curator'))
    await client.post('/api/session', { email: emailOf('curator'), password: 'a wrong secret' })
    const answer = await client.get('/api/submissions?state=draft')
    const id = answer.headers.get('x-request-id')
    await expect.poll(() => lines.some((l) => l.includes(id ?? '?'))).toBe(true)
    const line = JSON.parse(lines.find((l) => l.includes(id ?? '?')) ?? '{}') as { time: string; req: unknown; res: unknown; user: unknown }
    expect(line.user).toBe(server().people.curator.id)
    expect(line.req).toEqual({ id, method: 'GET', url: '/api/submissions?state=draft' })
    expect(line.res).toEqual({ status: 200 })
    expect(line.time).toMatch(/^\d{4}-\d\d-\d\dT[\d:.]+Z$/)
    const all = lines.join('\n')
    for (const secret of [PASSWORD, 'a wrong secret', csrfToken, client.cookie.split('=')[1] ?? '', server().config.sessionSecret]) expect(all).not.toContain(secret)
  })

  it('does not take a line break from outside for one of its own', async () => {
    const before = lines.length
    await server().visitor().get('/api/nothing%0a{"level":60}')
    await expect.poll(() => lines.length).toBeGreaterThan(before)
    for (const line of lines.slice(before)) expect(() => JSON.parse(line) as unknown).not.toThrow()
    expect(lines.slice(before).some((l) => (JSON.parse(l) as { level: number }).level === 60)).toBe(false)
  })

  it('leaves secrets out of whatever it is handed', async () => {
    const before = lines.length
    log.info({ password: 'S1', user: { passwordHash: 'S2' }, request: { headers: { 'cookie': 'S3', 'authorization': 'S4', 'x-csrf-token': 'S5' } }, config: { sessionSecret: 'S6', databaseUrl: 'S7' } }, 'everything')
    await expect.poll(() => lines.length).toBeGreaterThan(before)
    const [line = ''] = lines.slice(before)
    for (const secret of ['S1', 'S2', 'S3', 'S4', 'S5', 'S6', 'S7']) expect(line).not.toContain(secret)
    expect(line).toContain('(not logged)')
  })

  it('tells the whole fault to the log, and only its number to the world', async () => {
    const { knex, visitor } = server()
    await knex.raw('alter table releases rename to releases_away')
    try {
      const answer = await visitor().get('/api/releases')
      const problem = answer.problem(500)
      expect(answer.text).not.toMatch(/releases_away|select|relation|\.ts|\bat /i)
      const id = problem.instance ?? '?'
      await expect.poll(() => lines.some((l) => l.includes(id) && l.includes('does not exist') && l.includes('stack'))).toBe(true)
    } finally {
      await knex.raw('alter table releases_away rename to releases')
    }
    expect((await visitor().get('/api/releases')).status).toBe(200)
  })
})

describe('GET /api/audit', () => {
  it('goes back page by page, and by action, subject and person', async () => {
    const { knex, people } = server()
    for (let i = 0; i < 7; i++) await knex('auditLog').insert({ actor: people.curator.id, action: i % 2 ? 'test.odd' : 'test.even', subject: `thing:${i}`, details: JSON.stringify({ i }) })
    const steward = await server().as('steward')
    const ask = async (query: string) => JSON.parse((await steward.get(`/api/audit?${query}`)).text) as { entries: { id: number; subject: string; actor: string }[]; next: number | null }
    const seen: string[] = []
    let next: number | null = null
    do {
      const page: Awaited<ReturnType<typeof ask>> = await ask(`action=test&limit=3${next === null ? '' : `&before=${next}`}`)
      seen.push(...page.entries.map((e) => e.subject))
      next = page.next
    } while (next !== null && seen.length < 50)
    expect(seen).toEqual(['thing:6', 'thing:5', 'thing:4', 'thing:3', 'thing:2', 'thing:1', 'thing:0'])
    expect((await ask('action=test.odd')).entries.map((e) => e.subject)).toEqual(['thing:5', 'thing:3', 'thing:1'])
    expect((await ask('subject=thing:2')).entries).toEqual([expect.objectContaining({ actor: 'curator', subject: 'thing:2', details: { i: 2 } })])
    expect((await ask(`actor=${people.steward.id}`)).entries.every((e) => e.actor === 'steward')).toBe(true)
  })

  it('cannot be changed, by any path', async () => {
    const { knex } = server()
    await expect(knex('auditLog').update({ action: 'nothing' })).rejects.toThrow(/append-only/)
    await expect(knex('auditLog').delete()).rejects.toThrow(/append-only/)
    await expect(knex.raw('truncate audit_log')).rejects.toThrow(/append-only/)
  })
})
