import { beforeAll, describe, expect, it } from 'vitest'
import { PERMISSIONS, ROLES, type Role } from '../../core/permissions.ts'
import { sessionSchema } from '../../core/schema/session.ts'
import { footprint } from './desk/catalogue.ts'
import { makeRevision, placeGalaxy } from './harness/catalogue-rows.ts'
import type { Client } from './harness/client.ts'
import { emailOf, PASSWORD } from './harness/people.ts'
import { useServer } from './harness/server.ts'
import { walkedRoutes } from './harness/walk.ts'

const server = useServer({
  environment: { PUBLIC_URL: 'https://atlas.example', COOKIE_SECURE: 'false' },
  fill: async (knex) => {
    await makeRevision(knex, 1, { release: '2026.1' })
    await placeGalaxy(knex, 1, { name: 'Ostrel', distance: 3 })
  },
})

const writes = walkedRoutes.filter((w) => w.method !== 'GET')

describe('every write, by somebody who may', () => {
  const clients = new Map<Role, Client>()
  let stranger = ''
  beforeAll(async () => {
    for (const role of ROLES) clients.set(role, await server().as(role))
    stranger = (await server().as('curator')).token
  })

  it.each(writes.map((w) => [w.title, w] as const))('%s needs the session’s token and its own site', async (title, walked) => {
    const who = [...ROLES].reverse().find((role) => (PERMISSIONS[walked.permission] as readonly string[]).includes(role))
    const client = who && clients.get(who)
    if (!client) throw new Error(`nobody may ${title}`)
    const body = walked.route.body ? { body: {} } : {}
    const host = new URL(client.base).host
    const refused: [string, Record<string, string>, boolean][] = [
      ['no token', {}, true],
      ['an empty token', { 'x-csrf-token': '' }, true],
      ['a made-up token', { 'x-csrf-token': 'x'.repeat(client.token.length) }, true],
      ['somebody else’s token', { 'x-csrf-token': stranger }, true],
      ['half the token', { 'x-csrf-token': client.token.slice(0, 20) }, true],
      ['another site', { 'sec-fetch-site': 'cross-site' }, false],
      ['a sister site', { 'sec-fetch-site': 'same-site' }, false],
      ['another origin', { origin: 'https://elsewhere.example' }, false],
      ['another port', { origin: 'http://127.0.0.1:1' }, false],
      ['the public name without its https', { origin: 'http://atlas.example' }, false],
      ['an origin that hides', { origin: 'null' }, false],
      ['an origin that begins alike', { origin: `http://${host}.elsewhere.example` }, false],
    ]
    const before = await footprint(server().knex)
    for (const [what, headers, withoutToken] of refused) {
      const answer = await client.send(walked.method, walked.address, { ...body, headers, withoutToken })
      expect(answer.problem(403).detail, `${title}, ${what}`).toContain('Nothing was changed')
    }
    expect(await footprint(server().knex)).toBe(before)
    // Signing out would end the session of the next test.
    if (walked.path === '/api/session') return
    const own: Record<string, string>[] = [{}, { 'origin': client.base, 'sec-fetch-site': 'same-origin' }, { 'sec-fetch-site': 'none' }, { 'origin': 'https://atlas.example', 'sec-fetch-site': 'same-origin' }]
    for (const headers of own) {
      const answer = await client.send(walked.method, walked.address, { ...body, headers })
      expect([400, 404, 415], `${title}: ${answer.text.slice(0, 200)}`).toContain(answer.status)
    }
  })

  it('keeps its session through all that', async () => {
    expect((await clients.get('curator')?.get('/api/session'))?.ok(sessionSchema).user?.email).toBe(emailOf('curator'))
  })
})

describe('a visitor', () => {
  it.each<Record<string, string>>([{ 'sec-fetch-site': 'cross-site' }, { origin: 'https://elsewhere.example' }, { origin: 'null' }])('cannot be signed in by another site: %j', async (headers) => {
    const answer = await server().visitor().send('POST', '/api/session', { body: { email: emailOf('curator'), password: PASSWORD }, headers })
    answer.problem(403)
    expect(answer.headers.getSetCookie()).toEqual([])
  })

  it.each(['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data; boundary=x', 'application/jsonp', ''])('signs in with JSON alone, not %j', async (type) => {
    const raw = JSON.stringify({ email: emailOf('curator'), password: PASSWORD })
    ;(await server().visitor().send('POST', '/api/session', { raw, headers: { 'content-type': type } })).problem(415)
  })
})

it('tells no other site that it may read, with a session least of all', async () => {
  const client = await server().as('curator')
  for (const path of ['/api/galaxies', '/api/session', '/api/export.csv']) {
    const answer = await client.get(path, { headers: { origin: 'https://elsewhere.example' } })
    expect([...answer.headers.keys()].filter((name) => name.startsWith('access-control-'))).toEqual([])
    const asked = await client.send('OPTIONS', path, { headers: { 'origin': 'https://elsewhere.example', 'access-control-request-method': 'POST' } })
    expect([...asked.headers.keys()].filter((name) => name.startsWith('access-control-'))).toEqual([])
  }
})

it('changes nothing by reading: every GET, by everybody', async () => {
  const { knex } = server()
  const before = await footprint(knex)
  const others = async (): Promise<unknown> => (await knex.raw<{ rows: unknown[] }>('select (select count(*) from audit_log) as entries, (select count(*) from figures) as figures, (select count(*) from releases) as releases, (select md5(string_agg(u::text, $$|$$ order by id)) from users u) as people')).rows
  const clients = [server().visitor(), ...(await Promise.all(ROLES.map((role) => server().as(role))))]
  const start = await others()
  for (const client of clients) for (const { method, address } of walkedRoutes) if (method === 'GET') await client.get(address)
  expect(await footprint(knex)).toBe(before)
  expect(await others()).toEqual(start)
})
