import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { pino } from 'pino'
import { afterAll, beforeEach, describe, expect, it } from 'vitest'
import { permissionsOf } from '../../core/permissions.ts'
import { sessionSchema } from '../../core/schema/session.ts'
import { createApp, type App } from '../../server/app.ts'
import { hashPassword } from '../../server/auth/passwords.ts'
import { ABSOLUTE_MS, IDLE_MS } from '../../server/auth/sessions.ts'
import { loadConfig } from '../../server/config.ts'
import { Client } from './harness/client.ts'
import { addPerson, emailOf, PASSWORD } from './harness/people.ts'
import { NO_LIMITS, useServer } from './harness/server.ts'

let later = 0
const server = useServer({ now: () => Date.now() + later })

const COOKIE = 'vicinage.sid'
/** Only somebody who signed in as a curator may ask this. */
const PROTECTED = '/api/submissions'

async function rows(): Promise<{ sid: string; user: string | null; expire: Date }[]> {
  const { rows: found } = await server().knex.raw<{ rows: { sid: string; user: string | null; expire: Date }[] }>(`select sid, sess #>> '{passport,user}' as user, expire from sessions order by sid`)
  return found
}

/** The id inside a signed cookie. */
const idOf = (cookie: string | undefined): string => decodeURIComponent(cookie ?? '').replace(/^s:/, '').split('.')[0] ?? ''

beforeEach(async () => {
  later = 0
  await server().knex('sessions').delete()
})

describe('a visitor', () => {
  it('gets no cookie and no row by reading, by being refused, or by signing out', async () => {
    const visitor = server().visitor()
    const session = (await visitor.get('/api/session')).ok(sessionSchema)
    expect(session).toEqual({ user: null, permissions: permissionsOf([]), csrfToken: '', catalogue: { kind: 'empty', revision: 0, release: null } })
    await visitor.get('/api/health')
    ;(await visitor.get(PROTECTED)).problem(401)
    ;(await visitor.post('/api/session', { email: emailOf('curator'), password: 'wrong' })).problem(401)
    ;(await visitor.delete('/api/session')).ok(sessionSchema)
    expect(visitor.cookies.size).toBe(0)
    expect(await rows()).toEqual([])
  })
})

describe('signing in', () => {
  it('says who one is, and writes it down', async () => {
    const { people, knex } = server()
    const client = server().visitor()
    const session = await client.signIn(emailOf('curator').toUpperCase())
    expect(session.user).toEqual({ id: people.curator.id, name: 'curator', email: 'curator@people.test', roles: ['curator'] })
    expect(session.permissions).toEqual(permissionsOf(['curator']))
    expect(session.csrfToken.length).toBeGreaterThan(40)
    expect(await client.get('/api/session').then((a) => a.ok(sessionSchema))).toEqual(session)
    const [entry] = (await knex('auditLog').orderBy('id', 'desc').limit(1)) as { action: string; actor: number; subject: string; at: Date }[]
    expect(entry).toMatchObject({ action: 'session.begin', actor: people.curator.id, subject: `user:${people.curator.id}` })
    const seen = (await knex('users').where({ id: people.curator.id }).first('lastSeenAt')) as { lastSeenAt: Date }
    expect(Date.now() - seen.lastSeenAt.getTime()).toBeLessThan(60_000)
  })

  it('gives nothing of the account away but what the page needs', async () => {
    const answer = await server().visitor().post('/api/session', { email: emailOf('curator'), password: PASSWORD })
    sessionSchema.strict().parse(JSON.parse(answer.text))
    expect(answer.text).not.toMatch(/argon2|password/i)
    expect(answer.headers.get('cache-control')).toContain('no-store')
  })

  it('answers alike for an unknown address, a wrong password, and accounts that may not come in', async () => {
    await addPerson(server().knex, { email: 'suspended@people.test', roles: ['steward'], state: 'suspended' })
    await addPerson(server().knex, { email: 'invited@people.test', roles: ['steward'], state: 'invited' })
    const attempts = [
      { email: 'nobody@people.test', password: PASSWORD },
      { email: emailOf('curator'), password: `${PASSWORD} ` },
      { email: 'suspended@people.test', password: PASSWORD },
      { email: 'invited@people.test', password: PASSWORD },
    ]
    const said = []
    for (const attempt of attempts) {
      const answer = await server().visitor().post('/api/session', attempt)
      const { instance, ...problem } = answer.problem(401)
      expect(instance).toMatch(/^[0-9a-f-]{36}$/)
      expect(answer.headers.getSetCookie()).toEqual([])
      said.push(problem)
    }
    expect(new Set(said.map((s) => JSON.stringify(s))).size).toBe(1)
    const { rows: refused } = await server().knex.raw<{ rows: { email: string }[] }>(`select details ->> 'email' as email from audit_log where action = 'session.refuse' order by id desc limit 4`)
    expect(refused.map((r) => r.email).reverse()).toEqual(attempts.map((a) => a.email))
  })

  it('works as hard for an unknown address as for a known one', async () => {
    const quickest = async (email: string): Promise<number> => {
      const times = []
      for (let i = 0; i < 6; i++) {
        const start = performance.now()
        await server().visitor().post('/api/session', { email, password: 'not the password' })
        times.push(performance.now() - start)
      }
      return Math.min(...times)
    }
    const unknown = await quickest('nobody-at-all@people.test')
    const known = await quickest(emailOf('approver'))
    expect(unknown / known).toBeGreaterThan(0.5)
    expect(unknown / known).toBeLessThan(2)
  })

  it('keeps passwords as argon2id of at least 19 MiB and two passes', async () => {
    const { passwordHash } = (await server().knex('users').first('passwordHash')) as { passwordHash: string }
    const [, memory, passes] = /^\$argon2id\$v=19\$m=(\d+),t=(\d+),p=\d+\$/.exec(passwordHash) ?? []
    expect(Number(memory)).toBeGreaterThanOrEqual(19 * 1024)
    expect(Number(passes)).toBeGreaterThanOrEqual(2)
  })

  it('takes long passwords whole', async () => {
    const long = `${'pässword '.repeat(20)}end`
    await addPerson(server().knex, { email: 'long@people.test', roles: ['researcher'], state: 'invited' })
    await server().knex('users').where({ email: 'long@people.test' }).update({ passwordHash: await hashPassword(long), state: 'active' })
    ;(await server().visitor().post('/api/session', { email: 'long@people.test', password: long.slice(0, -1) })).problem(401)
    expect((await server().visitor().signIn('long@people.test', long)).user?.email).toBe('long@people.test')
  })
})

describe('the session', () => {
  it('has a new id after signing in, whatever cookie came along', async () => {
    const client = server().visitor()
    client.cookies.set(COOKIE, 's%3Aplanted-by-somebody-else.c2lnbmF0dXJl')
    await client.signIn(emailOf('curator'))
    expect(client.cookie).not.toContain('planted')
    const first = client.cookies.get(COOKIE)
    await client.signIn(emailOf('approver'))
    expect(client.cookies.get(COOKIE)).not.toBe(first)
    const left = await rows()
    expect(left).toHaveLength(1)
    expect(left[0]).toMatchObject({ sid: idOf(client.cookies.get(COOKIE)), user: String(server().people.approver.id) })
    const replayed = server().visitor()
    replayed.cookies.set(COOKIE, first ?? '')
    ;(await replayed.get(PROTECTED)).problem(401)
  })

  it('is gone from the server after signing out: its cookie opens nothing', async () => {
    const client = await server().as('curator')
    const cookie = client.cookies.get(COOKIE) ?? ''
    expect((await client.get(PROTECTED)).status).toBe(200)
    await client.signOut()
    expect(client.cookies.size).toBe(0)
    expect(await rows()).toEqual([])
    const replayed = server().visitor()
    replayed.cookies.set(COOKIE, cookie)
    ;(await replayed.get(PROTECTED)).problem(401)
    expect((await replayed.get('/api/session')).ok(sessionSchema).user).toBeNull()
  })

  it('ends when nobody has asked for so long, and is drawn out by asking', async () => {
    const client = await server().as('curator')
    const { knex } = server()
    await knex('sessions').update({ expire: new Date(Date.now() + 60_000) })
    expect((await client.get(PROTECTED)).status).toBe(200)
    await expect.poll(async () => (await rows())[0]?.expire.getTime() ?? 0).toBeGreaterThan(Date.now() + IDLE_MS - 60_000)
    await knex('sessions').update({ expire: new Date(Date.now() - 1000) })
    ;(await client.get(PROTECTED)).problem(401)
  })

  it('is not written anew for every reading', async () => {
    const client = await server().as('curator')
    await client.get(PROTECTED)
    const version = async (): Promise<unknown> => (await server().knex.raw<{ rows: unknown[] }>('select xmin::text, sess::text, expire from sessions')).rows
    const before = await version()
    for (let i = 0; i < 5; i++) expect((await client.get(PROTECTED)).status).toBe(200)
    expect(await version()).toEqual(before)
  })

  it('ends after the longest time however busy it was, and leaves work as it is', async () => {
    const client = await server().as('curator')
    const made = await client.post('/api/submissions', { title: 'A draft' })
    expect(made.status).toBe(201)
    later = ABSOLUTE_MS - 60_000
    expect((await client.get(PROTECTED)).status).toBe(200)
    later = ABSOLUTE_MS + 1000
    ;(await client.get(PROTECTED)).problem(401)
    ;(await client.post('/api/submissions', { title: 'Another' })).problem(401)
    later = 0
    const again = await server().as('curator')
    expect((await again.get(PROTECTED)).text).toContain('A draft')
  })

  it('that does not say since when lets nobody in', async () => {
    const client = await server().as('curator')
    await server().knex.raw(`update sessions set sess = (sess::jsonb - 'startedAt')::json`)
    ;(await client.get(PROTECTED)).problem(401)
  })

  it.each([
    ['suspended', { state: 'suspended' }],
    ['given other roles', { roles: ['researcher'] }],
    ['given another password', { passwordHash: 'another' }],
  ])('ends at once, on every device, when the account is %s', async (what, change) => {
    const email = `${what.replaceAll(' ', '-')}@ends.test`
    const person = await addPerson(server().knex, { email, roles: ['curator'] })
    const [one, two] = [server().visitor(), server().visitor()]
    await one.signIn(email)
    await two.signIn(email)
    const other = await server().as('approver')
    expect((await two.get(PROTECTED)).status).toBe(200)
    await server().knex('users').where({ id: person.id }).update(change)
    ;(await one.get(PROTECTED)).problem(401)
    ;(await two.post('/api/submissions', { title: 'Too late' })).problem(401)
    await server().knex('users').where({ id: person.id }).update({ state: 'active' })
    ;(await one.get(PROTECTED)).problem(401)
    expect((await other.get(PROTECTED)).status).toBe(200)
  })

  it.each(['', 'nonsense', 's%3A', 's%3Aabc', `s%3A${'x'.repeat(3000)}.${'y'.repeat(43)}`, '%00', '%ff'])('is not opened by the cookie %j', async (value) => {
    const client = server().visitor()
    client.cookies.set(COOKIE, value)
    ;(await client.get(PROTECTED)).problem(401)
  })

  it('does not open with another signature', async () => {
    const client = await server().as('curator')
    const cookie = client.cookies.get(COOKIE) ?? ''
    client.cookies.set(COOKIE, cookie.slice(0, -3) + (cookie.endsWith('AAA') ? 'BBB' : 'AAA'))
    ;(await client.get(PROTECTED)).problem(401)
  })
})

describe('the cookie', () => {
  let app: App | undefined
  let secured: Server | undefined
  afterAll(async () => {
    await new Promise<void>((closed) => (secured ? secured.close(() => closed()) : closed()))
    await app?.close()
  })

  it('over http is HttpOnly and SameSite=Lax', async () => {
    const answer = await server().visitor().post('/api/session', { email: emailOf('curator'), password: PASSWORD })
    const [line = '', ...more] = answer.headers.getSetCookie()
    expect(more).toEqual([])
    expect(line).toMatch(/^vicinage\.sid=s%3A[\w-]{43}\./)
    expect(line.split('; ').slice(1).sort()).toEqual([expect.stringMatching(/^Expires=/), 'HttpOnly', 'Path=/', 'SameSite=Lax'])
  })

  it('over https is Secure and bound to the host, and the browser is told to stay with https', async () => {
    const { knex, config } = server()
    const behindProxy = loadConfig({ DATABASE_URL: config.databaseUrl, SESSION_SECRET: 'y'.repeat(40), PUBLIC_URL: 'https://atlas.example', TRUST_PROXY: '1', LOG_LEVEL: 'silent' })
    app = createApp({ knex, config: behindProxy, log: pino({ level: 'silent' }) }, { limits: NO_LIMITS })
    secured = createServer(app.express)
    await new Promise<void>((listening) => secured?.listen(0, '127.0.0.1', listening))
    const client = new Client(`http://127.0.0.1:${(secured.address() as AddressInfo).port}`)
    const answer = await client.send('POST', '/api/session', { body: { email: emailOf('curator'), password: PASSWORD }, headers: { 'x-forwarded-proto': 'https' } })
    const [line = ''] = answer.headers.getSetCookie()
    expect(line).toMatch(/^__Host-vicinage\.sid=/)
    expect(line.split('; ')).toEqual(expect.arrayContaining(['HttpOnly', 'Path=/', 'SameSite=Lax', 'Secure']))
    expect(line).not.toMatch(/domain/i)
    expect(answer.headers.get('strict-transport-security')).toBe('max-age=31536000; includeSubDomains')
    const inside = await client.send('GET', PROTECTED, { headers: { 'x-forwarded-proto': 'https' } })
    expect(inside.status).toBe(200)
  })
})
