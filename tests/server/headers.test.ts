import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { makeRevision, placeGalaxy } from './harness/catalogue-rows.ts'
import type { Answer, Client } from './harness/client.ts'
import { useServer } from './harness/server.ts'
import { walkedRoutes } from './harness/walk.ts'

const folder = mkdtempSync(join(tmpdir(), 'vicinage-client-'))
mkdirSync(join(folder, 'assets'))
writeFileSync(join(folder, 'index.html'), '<!doctype html><title>The page</title>')
writeFileSync(join(folder, 'mark.svg'), '<svg xmlns="http://www.w3.org/2000/svg"/>')
writeFileSync(join(folder, 'assets', 'main-1a2b3c.js'), 'export {}')
afterAll(() => rmSync(folder, { recursive: true, force: true }))

const server = useServer({
  clientFolder: folder,
  fill: async (knex) => {
    await makeRevision(knex, 1, { release: '2026.1' })
    await placeGalaxy(knex, 1, { name: 'Ostrel', distance: 3 })
  },
})

const POLICY: Readonly<Record<string, string>> = {
  'default-src': `'self'`, 'script-src': `'self'`, 'style-src': `'self' 'unsafe-inline'`, 'img-src': `'self' data: blob:`, 'font-src': `'self' data:`, 'connect-src': `'self'`,
  'worker-src': `'self'`, 'object-src': `'none'`, 'base-uri': `'none'`, 'form-action': `'self'`, 'frame-ancestors': `'none'`,
}

function expectSecure({ headers }: Answer, what: string): void {
  const policy = Object.fromEntries((headers.get('content-security-policy') ?? '').split(';').map((part) => part.trim().split(/ (.*)/s).slice(0, 2) as [string, string]))
  expect(policy, what).toEqual(POLICY)
  expect(headers.get('x-content-type-options'), what).toBe('nosniff')
  expect(headers.get('referrer-policy'), what).toBe('strict-origin-when-cross-origin')
  expect(headers.get('cross-origin-opener-policy'), what).toBe('same-origin')
  expect(headers.get('cross-origin-resource-policy'), what).toBe('same-origin')
  expect(headers.get('x-frame-options'), what).toBe('SAMEORIGIN')
  expect(headers.get('x-powered-by'), what).toBeNull()
  expect(headers.get('server'), what).toBeNull()
  expect(headers.get('x-request-id'), what).toMatch(/^[0-9a-f-]{36}$/)
}

describe('security headers', () => {
  const clients: Client[] = []
  beforeAll(async () => {
    clients.push(server().visitor(), await server().as('steward'))
  })

  it.each(walkedRoutes.map((w) => [w.title, w] as const))('%s', async (title, walked) => {
    for (const client of clients) {
      // Signing out ends the session that the rest needs.
      if (walked.path === '/api/session' && walked.method === 'DELETE' && client.token !== '') continue
      const answer = await client.send(walked.method, walked.address, walked.route.body ? { body: {} } : {})
      expectSecure(answer, title)
      if (answer.status !== 204) expect(answer.headers.get('content-type'), title).toMatch(/charset=utf-8|^application\/(pdf|x-votable)|^image\//i)
      expect(answer.headers.get('cache-control'), title).toMatch(/no-store|no-cache/)
      if (client.token !== '' && answer.headers.get('cache-control')?.includes('public')) throw new Error(`${title}: what somebody reads who signed in would be kept for all`)
    }
  })

  it.each(['/', '/galaxies', '/mark.svg', '/assets/main-1a2b3c.js', '/assets/gone.js', '/api/nothing', '/api', '/%ff', '/%00', '/../package.json', '/.git/config', '/assets/..%2f..%2fpackage.json', '/server/index.ts', '/main.js.map'])(
    'GET %s',
    async (path) => {
      const answer = await server().visitor().get(path)
      expectSecure(answer, path)
      expect(answer.status, path).toBeLessThan(500)
      expect(answer.text).not.toContain('vicinage"')
    },
  )
})

describe('the client', () => {
  it('is answered at every address of its own, and asked for anew each time', async () => {
    for (const path of ['/', '/galaxies', '/submissions/12', '/releases/2026.1', '/galaxies/ostrel?tab=values']) {
      const answer = await server().visitor().get(path)
      expect(answer.status).toBe(200)
      expect(answer.headers.get('content-type')).toBe('text/html; charset=utf-8')
      expect(answer.text).toContain('The page')
      expect(answer.headers.get('cache-control')).toBe('no-cache')
      expect(answer.headers.getSetCookie()).toEqual([])
    }
  })

  it('keeps files with a hash in their name for a year, others not', async () => {
    const asset = await server().visitor().get('/assets/main-1a2b3c.js')
    expect(asset.headers.get('cache-control')).toBe('public, max-age=31536000, immutable')
    expect(asset.headers.get('content-type')).toContain('javascript')
    const mark = await server().visitor().get('/mark.svg')
    expect(mark.headers.get('cache-control')).toBe('public, max-age=0')
  })

  it.each(['/assets/gone-1a2b.js', '/gone.png', '/.git/config', '/.env', '/package.json', '/index.ts'])('has nothing at %s', async (path) => {
    const { status } = await server().visitor().get(path)
    expect(status).toBe(404)
  })

  it('is no page for a program: an unknown address of the interface is a problem', async () => {
    for (const method of ['GET', 'POST', 'DELETE']) (await server().visitor().send(method, '/api/nothing-here')).problem(404)
    ;(await server().visitor().get('/nothing', { headers: { accept: 'application/json' } })).problem(404)
  })
})
