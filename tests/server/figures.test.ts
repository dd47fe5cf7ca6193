import { beforeAll, describe, expect, it, vi } from 'vitest'
import sharp from 'sharp'
import { figureListSchema, figureSchema } from '../../core/schema/figures.ts'
import { figureRecipeSchema } from '../../core/figure/recipe.ts'
import { makeRevision, placeGalaxy } from './harness/catalogue-rows.ts'
import type { Client } from './harness/client.ts'
import { addPerson } from './harness/people.ts'
import { useServer } from './harness/server.ts'

// The first picture waits for its thread to start.
vi.setConfig({ testTimeout: 90_000 })

const server = useServer({
  fill: async (knex) => {
    await makeRevision(knex, 1, { release: '2026.1', at: '2026-01-05T12:00:00Z' })
    await makeRevision(knex, 2)
    await placeGalaxy(knex, 1, { name: 'Ostrel', class: 'spiral', ra: 10, dec: 40, distance: 3, abs_v: -21, host_relation: 'host' })
    await placeGalaxy(knex, 1, { name: 'Mirrow', class: 'spiral', ra: 200, dec: -30, distance: 5, abs_v: -20, host_relation: 'host' })
    await placeGalaxy(knex, 2, { name: 'Newcomer', class: 'dwarf-irregular', ra: 120, dec: 5, distance: 1, abs_v: -15 })
  },
})

const sky = { view: 'sky' as const, widthMm: 120, labels: { count: 10, hosts: true } }
let outreach: Client
let colleague: Client
let steward: Client
let visitor: Client
beforeAll(async () => {
  await addPerson(server().knex, { email: 'colleague@people.test', roles: ['outreach'] })
  outreach = await server().as('outreach')
  colleague = server().visitor()
  await colleague.signIn('colleague@people.test')
  steward = await server().as('steward')
  visitor = server().visitor()
})

const keep = async (more: object = {}, client = outreach) => (await client.post('/api/figures', { title: 'The whole sky', recipe: sky, ...more })).ok(figureSchema, 201)
const listed = async (client: Client) => (await client.get('/api/figures')).ok(figureListSchema).figures

describe('the gallery', () => {
  it('keeps a recipe whole, with all that was left to itself', async () => {
    const figure = await keep()
    expect(figure).toMatchObject({ title: 'The whole sky', shared: true, owner: { id: server().people.outreach.id, name: 'outreach' }, may: { edit: true } })
    expect(figure.recipe).toEqual(figureRecipeSchema.parse(sky))
    expect((await outreach.get(`/api/figures/${figure.id}`)).ok(figureSchema)).toEqual(figure)
  })

  it('shows shared figures to everybody, others to their keeper alone', async () => {
    const shared = await keep({ title: 'Shared' })
    const own = await keep({ title: 'My own', shared: false })
    for (const client of [visitor, colleague, steward]) {
      const titles = (await listed(client)).map((f) => f.id)
      expect(titles).toContain(shared.id)
      expect(titles).not.toContain(own.id)
      ;(await client.get(`/api/figures/${own.id}`)).problem(404)
    }
    expect((await listed(outreach)).map((f) => f.id)).toEqual(expect.arrayContaining([shared.id, own.id]))
    ;(await colleague.patch(`/api/figures/${own.id}`, { title: 'Found' })).problem(404)
    ;(await colleague.delete(`/api/figures/${own.id}`)).problem(404)
  })

  it('says who may change what, and it is so', async () => {
    const figure = await keep()
    const seen = async (client: Client) => (await client.get(`/api/figures/${figure.id}`)).ok(figureSchema).may.edit
    expect([await seen(visitor), await seen(colleague), await seen(outreach), await seen(steward)]).toEqual([false, false, true, true])
    expect((await colleague.patch(`/api/figures/${figure.id}`, { title: 'Mine now' })).problem(403).detail).toContain('outreach’s')
    ;(await colleague.delete(`/api/figures/${figure.id}`)).problem(403)
    ;(await visitor.delete(`/api/figures/${figure.id}`)).problem(401)
    expect((await outreach.patch(`/api/figures/${figure.id}`, { title: 'Renamed' })).ok(figureSchema)).toMatchObject({ title: 'Renamed', shared: true, recipe: figure.recipe })
    expect((await steward.patch(`/api/figures/${figure.id}`, { shared: false })).status).toBe(404)
    expect((await outreach.get(`/api/figures/${figure.id}`)).ok(figureSchema)).toMatchObject({ title: 'Renamed', shared: false })
  })

  it('changes the recipe only into one that can be drawn', async () => {
    const figure = await keep()
    const problem = (await outreach.patch(`/api/figures/${figure.id}`, { title: 'Wide', recipe: { ...sky, widthMm: 5 } })).problem(400)
    expect(problem.errors).toEqual([{ path: 'recipe.widthMm', message: expect.stringContaining('40 mm') as string }])
    expect((await outreach.get(`/api/figures/${figure.id}`)).ok(figureSchema)).toEqual(figure)
    const changed = (await outreach.patch(`/api/figures/${figure.id}`, { recipe: { ...sky, theme: 'night' } })).ok(figureSchema)
    expect(changed).toMatchObject({ title: 'The whole sky', recipe: { theme: 'night' } })
    expect(Date.parse(changed.updatedAt)).toBeGreaterThanOrEqual(Date.parse(figure.updatedAt))
  })

  it('deletes, and the log keeps what was deleted', async () => {
    const figure = await keep({ title: 'To go' })
    const answer = await outreach.delete(`/api/figures/${figure.id}`)
    expect([answer.status, answer.text]).toEqual([204, ''])
    ;(await outreach.get(`/api/figures/${figure.id}`)).problem(404)
    ;(await outreach.delete(`/api/figures/${figure.id}`)).problem(404)
    const [entry] = (await server().knex('auditLog').orderBy('id', 'desc').limit(1)) as unknown[]
    expect(entry).toMatchObject({ action: 'figure.delete', subject: `figure:${figure.id}`, actor: server().people.outreach.id, details: { title: 'To go', recipe: { view: 'sky' } } })
  })

  it('lets the steward delete what is shared', async () => {
    const figure = await keep({ title: 'Unsuitable' })
    expect((await steward.delete(`/api/figures/${figure.id}`)).status).toBe(204)
  })
})

describe('drawing', () => {
  const draw = (client: Client, format: string, more: object = {}) => client.post('/api/figures/render', { recipe: { ...sky, ...more }, format })

  it('gives a visitor the release, as a file with a name', async () => {
    const answer = await draw(visitor, 'svg')
    expect(answer.status, answer.text.slice(0, 500)).toBe(200)
    expect(answer.headers.get('content-type')).toMatch(/^image\/svg\+xml/)
    expect(answer.headers.get('content-disposition')).toMatch(/^attachment; filename="[a-z0-9-]+\.svg"$/)
    expect(answer.headers.get('x-catalogue-revision')).toBe('1')
    expect(answer.text).toContain('width="120mm"')
    for (const word of ['Ostrel', 'Mirrow', '2026.1']) expect(answer.text).toContain(word)
    expect(answer.text).not.toContain('Newcomer')
  })

  it('gives people of the team the current revision, or the one they name', async () => {
    const current = await draw(outreach, 'svg')
    expect(current.headers.get('x-catalogue-revision')).toBe('2')
    expect(current.text).toContain('Newcomer')
    const past = await draw(outreach, 'svg', { at: '2026.1' })
    expect(past.text).not.toContain('Newcomer')
    expect(past.text).toBe((await draw(visitor, 'svg', { at: '2026.1' })).text)
    ;(await draw(visitor, 'svg', { at: '2' })).problem(403)
    ;(await draw(visitor, 'svg', { at: 'never' })).problem(404)
  })

  it('draws what the filter lets through', async () => {
    const answer = await draw(outreach, 'svg', { filter: 'distance=..4&limit=1' })
    expect(answer.text).toContain('Ostrel')
    expect(answer.text).toContain('Newcomer')
    // The recipe inside the file may name it; the map does not.
    expect(answer.text).not.toContain('Mirrow')
    const problem = (await draw(outreach, 'svg', { filter: 'clas=spiral&distance=5..2' })).problem(400)
    expect(problem.errors?.map((e) => e.path)).toEqual(['recipe.filter.clas', 'recipe.filter.distance'])
  })

  it('as PNG has the pixels that width and resolution make', async () => {
    const answer = await draw(visitor, 'png', { dpi: 150 })
    expect(answer.headers.get('content-type')).toBe('image/png')
    const { width, density } = await sharp(answer.bytes).metadata()
    expect(width).toBe(Math.round((120 / 25.4) * 150))
    expect(density).toBe(150)
  })

  it('as PDF is the same file each time', async () => {
    const [one, two] = [await draw(visitor, 'pdf'), await draw(visitor, 'pdf')]
    expect(one.headers.get('content-type')).toBe('application/pdf')
    expect(one.bytes.subarray(0, 5).toString()).toBe('%PDF-')
    expect(one.bytes.equals(two.bytes)).toBe(true)
  })

  it('answers each of many at once with a figure, or with when to come back', async () => {
    const answers = await Promise.all(Array.from({ length: 8 }, () => draw(visitor, 'svg')))
    for (const answer of answers) {
      if (answer.status === 200) continue
      expect(answer.problem(503).detail).toContain('try again')
      expect(Number(answer.headers.get('retry-after'))).toBeGreaterThan(0)
    }
    expect(answers.some((a) => a.status === 200)).toBe(true)
    expect((await draw(visitor, 'svg')).status).toBe(200)
  })
})
