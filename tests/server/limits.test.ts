import { describe, expect, it } from 'vitest'
import { useServer } from './harness/server.ts'
import { emailOf, PASSWORD } from './harness/people.ts'
import { walkedRoutes } from './harness/walk.ts'
import type { Limit } from '../../server/http/route.ts'
import { DEFAULT_LIMITS } from '../../server/security/limits.ts'

const MOST = 4
const server = useServer({
  limits: { 'read': { most: 12, perSeconds: 60 }, 'write': { most: MOST, perSeconds: 60 }, 'sign-in': { most: MOST, perSeconds: 60 }, 'export': { most: MOST, perSeconds: 60 }, 'upload': { most: MOST, perSeconds: 60 } },
  environment: { TRUST_PROXY: '1' },
})

/** From an address of one's own, as the proxy in front of the server tells it. */
const from = (address: string): Record<string, string> => ({ 'x-forwarded-for': address })

describe('asking too often', () => {
  it('signing in: refused after so many failures, told when to come back, and others are not locked out', async () => {
    const guess = (address: string, password = 'guess') => server().visitor().send('POST', '/api/session', { body: { email: emailOf('curator'), password }, headers: from(address) })
    for (let i = 0; i < MOST; i++) (await guess('198.51.100.1')).problem(401)
    const refused = await guess('198.51.100.1', PASSWORD)
    const problem = refused.problem(429)
    const wait = Number(refused.headers.get('retry-after'))
    expect(wait).toBeGreaterThan(0)
    expect(wait).toBeLessThanOrEqual(60)
    expect(problem.type).toBe('urn:vicinage:problem:too-often')
    expect(problem.detail).toContain(`wait ${wait} seconds`)
    expect(refused.headers.getSetCookie()).toEqual([])
    expect((await guess('198.51.100.2', PASSWORD)).status).toBe(200)
    // What the client claims on top of what the proxy saw changes nothing.
    const claimed = await server().visitor().send('POST', '/api/session', { body: { email: emailOf('curator'), password: PASSWORD }, headers: from('203.0.113.9, 198.51.100.1') })
    claimed.problem(429)
  })

  it('signing in: those who may come in are not counted', async () => {
    for (let i = 0; i < MOST + 3; i++) {
      const answer = await server().visitor().send('POST', '/api/session', { body: { email: emailOf('researcher'), password: PASSWORD }, headers: from('198.51.100.7') })
      expect(answer.status).toBe(200)
    }
  })

  it('writing: counted by person, whatever the address', async () => {
    const curator = await server().as('curator')
    const approver = await server().as('approver')
    for (let i = 0; i < MOST; i++) expect((await curator.send('POST', '/api/sources', { body: {}, headers: from(`192.0.2.${i}`) })).status).toBe(400)
    const refused = await curator.send('POST', '/api/sources', { body: { title: 'A', authors: ['B'], year: 2020 }, headers: from('192.0.2.99') })
    expect(refused.problem(429).detail).toContain('Nothing was changed')
    expect(await server().knex('sources').count()).toEqual([{ count: 0 }])
    expect((await approver.send('POST', '/api/sources', { body: {} })).status).toBe(400)
    // Reading draws from another bucket.
    expect((await curator.get('/api/session')).status).toBe(200)
  })

  it('exporting and reading have buckets of their own', async () => {
    const visitor = server().visitor()
    const ask = (path: string) => visitor.get(path, { headers: from('198.51.100.20') })
    for (let i = 0; i < MOST; i++) expect((await ask('/api/export.csv')).status).not.toBe(429)
    ;(await ask('/api/export.csv')).problem(429)
    for (let i = 0; i < 12; i++) expect((await ask('/api/health')).status).toBe(200)
    ;(await ask('/api/health')).problem(429)
    expect((await visitor.get('/api/health', { headers: from('198.51.100.21') })).status).toBe(200)
  })
})

describe('the buckets', () => {
  it('are chosen by what a route does', () => {
    const bucketOf = (title: string): Limit | undefined => walkedRoutes.find((w) => w.title === title)?.route.limit
    expect(bucketOf('POST /api/session')).toBe('sign-in')
    expect(bucketOf('GET /api/export.:format')).toBe('export')
    expect(bucketOf('POST /api/figures/render')).toBe('export')
    for (const { title, route } of walkedRoutes) if (route.upload) expect(route.limit, title).toBe('upload')
  })

  it('by default leave room for work, and little for guessing', () => {
    expect(DEFAULT_LIMITS['sign-in'].most / DEFAULT_LIMITS['sign-in'].perSeconds).toBeLessThan(0.1)
    expect(DEFAULT_LIMITS.read.most / DEFAULT_LIMITS.read.perSeconds).toBeGreaterThan(10)
  })
})
