import { beforeAll, describe, expect, it } from 'vitest'
import { releaseListSchema, releaseSchema } from '../../core/schema/releases.ts'
import { sessionSchema } from '../../core/schema/session.ts'
import { summarySchema } from '../../core/schema/catalogue.ts'
import { changeGalaxy, makeRevision, placeGalaxy, type PlacedGalaxy } from './harness/catalogue-rows.ts'
import type { Client } from './harness/client.ts'
import { useServer } from './harness/server.ts'

const server = useServer()
let steward: Client
let visitor: Client
let ostrel: PlacedGalaxy
beforeAll(async () => {
  steward = await server().as('steward')
  visitor = server().visitor()
})

describe('releases, in the order of a catalogue’s life', () => {
  it('there is nothing to publish before the first revision', async () => {
    expect((await steward.post('/api/releases', { label: '2026.1', title: 'Too early' })).problem(409).detail).toContain('no revision yet')
    expect((await visitor.get('/api/releases')).ok(releaseListSchema)).toEqual({ releases: [], current: null })
    expect((await visitor.get('/api/summary')).problem(404).detail).toContain('No release is published yet')
  })

  it('the first makes the catalogue readable for visitors', async () => {
    const { knex, people } = server()
    await makeRevision(knex, 1)
    ostrel = await placeGalaxy(knex, 1, { name: 'Ostrel', distance: 3 })
    await placeGalaxy(knex, 1, { name: 'Gone', status: 'withdrawn' })
    ;(await visitor.get('/api/galaxies')).problem(404)
    const made = (await steward.post('/api/releases', { label: '2026.1', title: 'The first', notes: 'All of it.' })).ok(releaseSchema, 201)
    expect(made).toMatchObject({ label: '2026.1', revision: 1, title: 'The first', notes: 'All of it.', publishedBy: 'steward', galaxies: 1, measurements: 0, sameAs: null })
    expect(Date.now() - Date.parse(made.publishedAt)).toBeLessThan(60_000)
    expect((await visitor.get('/api/releases/2026.1')).ok(releaseSchema)).toEqual(made)
    expect((await visitor.get('/api/summary')).ok(summarySchema)).toMatchObject({ revision: 1, galaxies: 1, release: { label: '2026.1' }, waiting: [] })
    const [entry] = (await knex('auditLog').orderBy('id', 'desc').limit(1)) as unknown[]
    expect(entry).toMatchObject({ action: 'release.publish', subject: 'release:2026.1', actor: people.steward.id, details: { revision: 1 } })
  })

  it('a visitor stays at the release while the catalogue moves', async () => {
    const { knex } = server()
    await makeRevision(knex, 2)
    ostrel = await changeGalaxy(knex, 2, ostrel, { distance: 3.5 })
    await placeGalaxy(knex, 2, { name: 'Newcomer', distance: 1 })
    expect((await visitor.get('/api/summary')).ok(summarySchema)).toMatchObject({ revision: 1, galaxies: 1 })
    expect((await steward.get('/api/summary')).ok(summarySchema)).toMatchObject({ revision: 2, galaxies: 2 })
    expect((await visitor.get('/api/galaxies/newcomer')).status).toBe(404)
    expect((await visitor.get('/api/releases')).ok(releaseListSchema).current).toBeNull()
    expect((await steward.get('/api/releases')).ok(releaseListSchema).current).toEqual({ revision: 2, unreleased: 1 })
  })

  it('a label is given once, and a release never changes', async () => {
    const problem = (await steward.post('/api/releases', { label: '2026.1', title: 'Again' })).problem(409)
    expect(problem.errors).toEqual([{ path: 'label', message: 'This label is taken.' }])
    await expect(server().knex('releases').where({ label: '2026.1' }).update({ title: 'Changed' })).rejects.toThrow(/append-only/)
    await expect(server().knex('releases').delete()).rejects.toThrow(/append-only/)
    expect((await visitor.get('/api/releases/2026.1')).ok(releaseSchema).title).toBe('The first')
  })

  it('a second shows both, newest first, and says when nothing changed in between', async () => {
    const second = (await steward.post('/api/releases', { label: '2026.2', title: 'The second' })).ok(releaseSchema, 201)
    expect(second).toMatchObject({ revision: 2, galaxies: 2, sameAs: null })
    const third = (await steward.post('/api/releases', { label: '2026.2a', title: 'The same again' })).ok(releaseSchema, 201)
    expect(third).toMatchObject({ revision: 2, galaxies: 2, sameAs: '2026.2' })
    const { releases } = (await visitor.get('/api/releases')).ok(releaseListSchema)
    expect(releases.map((r) => [r.label, r.galaxies, r.sameAs])).toEqual([['2026.2a', 2, '2026.2'], ['2026.2', 2, null], ['2026.1', 1, null]])
    expect((await visitor.get('/api/session')).ok(sessionSchema).catalogue).toEqual({ kind: 'empty', revision: 2, release: '2026.2a' })
    expect((await visitor.get('/api/summary')).ok(summarySchema).release?.label).toBe('2026.2a')
  })

  it('older ones stay readable exactly as they were', async () => {
    const distance = async (at: string): Promise<unknown> => (JSON.parse((await visitor.get(`/api/galaxies?q=ostrel&columns=distance&at=${at}`)).text) as { rows: { distance: number }[] }).rows[0]?.distance
    expect(await distance('2026.1')).toBe(3)
    expect(await distance('2026.2')).toBe(3.5)
    expect((await visitor.get('/api/summary?at=2026.1')).ok(summarySchema)).toMatchObject({ revision: 1, galaxies: 1 })
  })

  it('the same label published by many at once is made once', async () => {
    const answers = await Promise.all(Array.from({ length: 5 }, (_, i) => steward.post('/api/releases', { label: '2026.3', title: `Attempt ${i}` })))
    expect(answers.map((a) => a.status).sort()).toEqual([201, 409, 409, 409, 409])
  })

  it('has nothing under another label', async () => {
    expect((await visitor.get('/api/releases/2030.1')).problem(404).detail).toContain('2030.1')
  })
})
