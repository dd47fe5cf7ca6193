import { beforeAll, describe, expect, it } from 'vitest'
import { PERMISSIONS, ROLES, type Role } from '../../core/permissions.ts'
import type { Client } from './harness/client.ts'
import { makeRevision } from './harness/catalogue-rows.ts'
import { addPerson } from './harness/people.ts'
import { useServer } from './harness/server.ts'
import { walkedRoutes } from './harness/walk.ts'

const server = useServer({ fill: (knex) => makeRevision(knex, 1, { release: '2026.1' }) })

/** The whole of what somebody without an account may send other than a question. */
const OPEN_WRITES = ['POST /api/session', 'DELETE /api/session', 'POST /api/figures/render']
/** What the team's steward alone may. */
const STEWARDS = ['GET /api/audit', 'POST /api/releases']

describe('the list of routes', () => {
  it('states a permission of the table for every route', () => {
    expect(walkedRoutes.length).toBeGreaterThan(40)
    for (const { title, permission } of walkedRoutes) expect(Object.keys(PERMISSIONS), title).toContain(permission)
  })

  it('has each address and method once', () => {
    const titles = walkedRoutes.map((w) => w.title)
    expect(titles.filter((t, i) => titles.indexOf(t) !== i)).toEqual([])
  })

  it('is all that the application answers', () => {
    const layers = (server().app.express.router as unknown as { stack: { route?: { path: string; methods: Record<string, boolean> } }[] }).stack
    const known = new Set(walkedRoutes.map((w) => w.path))
    const found = layers.flatMap((layer) => (layer.route ? [layer.route.path] : []))
    expect(found.length).toBeGreaterThanOrEqual(walkedRoutes.length)
    expect(found.filter((path) => !known.has(path))).toEqual([])
  })

  it('lets a visitor write nowhere but at signing in and drawing', () => {
    const open = walkedRoutes.filter((w) => w.method !== 'GET' && (PERMISSIONS[w.permission] as readonly string[]).includes('visitor'))
    expect(open.map((w) => w.title).sort()).toEqual([...OPEN_WRITES].sort())
  })

  it('keeps the steward’s own for the steward', () => {
    for (const title of STEWARDS) {
      const walked = walkedRoutes.find((w) => w.title === title)
      expect(walked && PERMISSIONS[walked.permission], title).toEqual(['steward'])
    }
  })

  it('gives the role of a reader nothing of the desk', () => {
    const desk = walkedRoutes.filter((w) => /^\/api\/(submissions|imports)/.test(w.path))
    expect(desk.length).toBeGreaterThan(15)
    for (const { title, permission } of desk) {
      const who: readonly string[] = PERMISSIONS[permission]
      expect(who.some((w) => ['visitor', 'researcher', 'outreach'].includes(w)), title).toBe(false)
    }
  })
})

describe('every route, asked by everybody', () => {
  const clients = new Map<Role | 'visitor', Client>()
  beforeAll(async () => {
    clients.set('visitor', server().visitor())
    for (const role of ROLES) clients.set(role, await server().as(role))
  })

  it.each(walkedRoutes.map((w) => [w.title, w] as const))('%s', async (title, walked) => {
    const allowed: readonly string[] = PERMISSIONS[walked.permission]
    for (const who of ['visitor', ...ROLES] as const) {
      // Signing out ends the session, so it is done in one that nobody else needs.
      const client = walked.path === '/api/session' ? (who === 'visitor' ? server().visitor() : await server().as(who)) : clients.get(who)
      const answer = await client?.send(walked.method, walked.address, walked.route.body ? { body: {} } : {})
      if (!answer) throw new Error('nobody asked')
      const context = `${title} by ${who}: ${answer.text.slice(0, 300)}`
      expect(answer.status, context).toBeLessThan(500)
      if (allowed.includes(who)) expect([401, 403], context).not.toContain(answer.status)
      else {
        const problem = answer.problem(who === 'visitor' ? 401 : 403)
        expect(problem.type, context).toBe(who === 'visitor' ? 'urn:vicinage:problem:not-signed-in' : 'urn:vicinage:problem:forbidden')
        expect(problem.detail, context).toContain('Nothing was changed')
      }
    }
  })

  it('adds up what several roles may', async () => {
    const { knex, visitor } = server()
    await addPerson(knex, { email: 'both@people.test', roles: ['outreach', 'steward'] })
    const both = visitor()
    const session = await both.signIn('both@people.test')
    expect(session.permissions).toEqual(expect.arrayContaining(['audit.read', 'figure.write', 'release.publish']))
    expect((await both.get('/api/audit')).status).toBe(200)
  })

  it('gives somebody without any role what a visitor has', async () => {
    await addPerson(server().knex, { email: 'none@people.test', roles: [] })
    const none = server().visitor()
    const session = await none.signIn('none@people.test')
    const visitor = JSON.parse((await server().visitor().get('/api/session')).text) as { permissions: string[] }
    expect(session.permissions).toEqual(visitor.permissions)
    ;(await none.get('/api/submissions')).problem(403)
  })
})
