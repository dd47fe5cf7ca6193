import { beforeAll, describe, expect, it } from 'vitest'
import { sourceDetailSchema, sourceListSchema, sourceSchema } from '../../core/schema/sources.ts'
import { changeGalaxy, makeRevision, placeGalaxy } from './harness/catalogue-rows.ts'
import type { Client } from './harness/client.ts'
import { useServer } from './harness/server.ts'

const ids = { released: 0, later: 0, never: 0, replaced: 0 }

/** Revision 1 is released; revision 2 brings a source of its own and replaces what another gave. */
const server = useServer({
  fill: async (knex) => {
    await makeRevision(knex, 1, { release: '2026.1' })
    await makeRevision(knex, 2)
    const add = async (label: string, more: object = {}): Promise<number> => {
      const [made] = (await knex('sources').insert({ label, title: `Distances by ${label}`, authors: JSON.stringify([label.split(' ')[0]]), year: Number(label.slice(-4)), kind: 'article', ...more }).returning('id')) as { id: number }[]
      return made?.id ?? 0
    }
    ids.released = await add('Ansel et al. 2021', { bibcode: '2021ApJ...628..695A', doi: '10.1234/ansel.2021' })
    ids.later = await add('Berk & Ito 2023')
    ids.never = await add('Cole 1999')
    ids.replaced = await add('Dorn 2010')
    const ostrel = await placeGalaxy(knex, 1, { name: 'Ostrel', distance: 3 })
    const measured = { galaxy: ostrel.id, quantity: 'distance_modulus', errPlus: 0.09, errMinus: 0.08, method: 'trgb' }
    const [used] = (await knex('measurements').insert({ ...measured, value: 27.39, source: ids.released, revFrom: 1 }).returning('lineage')) as { lineage: number }[]
    await knex('measurements').insert({ galaxy: ostrel.id, quantity: 'velocity', value: -120, errPlus: 3, errMinus: 3, source: ids.released, revFrom: 1 })
    await knex('measurements').insert({ ...measured, value: 27.1, source: ids.replaced, revFrom: 1, revTo: 2 })
    await knex('measurements').insert({ ...measured, value: 27.4, source: ids.later, revFrom: 2 })
    await knex('adoptedValues').insert({
      galaxy: ostrel.id, quantity: 'distance_modulus', value: 27.39, errPlus: 0.09, errMinus: 0.08, nUsed: 1, nAll: 1, sentence: 'One value.',
      reasons: JSON.stringify([{ measurementId: used?.lineage, used: true }]), revFrom: 1,
    })
    await changeGalaxy(knex, 2, ostrel, { name: 'Ostrel A', slug: 'ostrel-a' })
  },
})

let visitor: Client
let curator: Client
beforeAll(async () => {
  visitor = server().visitor()
  curator = await server().as('curator')
})

const found = async (client: Client, query: string): Promise<string[]> => (await client.get(`/api/sources${query}`)).ok(sourceListSchema).sources.map((s) => s.label)

describe('reading the literature', () => {
  it('shows a visitor what is behind the newest release, and nothing else', async () => {
    expect(await found(visitor, '')).toEqual(['Ansel et al. 2021', 'Dorn 2010'])
    ;(await visitor.get(`/api/sources/${ids.later}`)).problem(404)
    ;(await visitor.get(`/api/sources/${ids.never}`)).problem(404)
    const released = (await visitor.get(`/api/sources/${ids.replaced}`)).ok(sourceDetailSchema)
    expect(released).toMatchObject({ measurements: 1, galaxies: 1, contributed: [{ galaxy: 'Ostrel', slug: 'ostrel', used: false }] })
  })

  it('shows people of the team everything at the current revision', async () => {
    expect(await found(curator, '')).toEqual(['Berk & Ito 2023', 'Ansel et al. 2021', 'Dorn 2010', 'Cole 1999'])
    const later = (await curator.get(`/api/sources/${ids.later}`)).ok(sourceDetailSchema)
    expect(later.contributed).toEqual([expect.objectContaining({ slug: 'ostrel-a', galaxy: 'Ostrel A', quantity: expect.stringMatching(/modulus/i) as string, used: false })])
    expect((await curator.get(`/api/sources/${ids.replaced}`)).ok(sourceDetailSchema)).toMatchObject({ measurements: 0, contributed: [] })
  })

  it('goes back to a revision or a release', async () => {
    expect((await curator.get(`/api/sources/${ids.replaced}?at=1`)).ok(sourceDetailSchema)).toMatchObject({ measurements: 1, contributed: [{ galaxy: 'Ostrel' }] })
    expect((await curator.get(`/api/sources/${ids.later}?at=2026.1`)).ok(sourceDetailSchema)).toMatchObject({ measurements: 0 })
    ;(await visitor.get('/api/sources?at=2')).problem(403)
  })

  it('says what each value is in words, and which were used', async () => {
    const { contributed } = (await visitor.get(`/api/sources/${ids.released}`)).ok(sourceDetailSchema)
    expect(contributed).toHaveLength(2)
    const modulus = contributed.find((c) => /modulus/i.test(c.quantity))
    expect(modulus?.value).toBe('27.390 +0.090 −0.080 mag'.replaceAll(' ', '\u00a0'))
    expect(modulus?.used).toBe(true)
    expect(contributed.find((c) => /velocity/i.test(c.quantity))?.value).toContain('−120')
  })

  it.each([
    ['?q=ansel', ['Ansel et al. 2021']],
    ['?q=2021%20ANSEL', ['Ansel et al. 2021']],
    ['?q=10.1234/ansel', ['Ansel et al. 2021']],
    ['?q=2021ApJ', ['Ansel et al. 2021']],
    ['?q=ansel%20berk', []],
    ['?q=%25', []],
    ['?q=_', []],
    ['?q=%20', ['Berk & Ito 2023', 'Ansel et al. 2021', 'Dorn 2010', 'Cole 1999']],
  ])('finds %s', async (query, labels) => {
    expect(await found(curator, query)).toEqual(labels)
  })
})

describe('adding a source', () => {
  it.each([
    [['Cole, A. A.'], 1999, 'Cole 1999'],
    [['Jang, I. S.', 'Lee, M. G.'], 2014, 'Jang & Lee 2014'],
    [['Gieren, W.', 'Pietrzyński, G.', 'Soszyński, I.'], 2005, 'Gieren et al. 2005'],
    [['de Vaucouleurs, G.'], 1991, 'de Vaucouleurs 1991'],
    [['The Vicinity Survey'], 2020, 'The Vicinity Survey 2020'],
  ])('by %j in %i is called "%s"', async (authors, year, label) => {
    const made = (await curator.post('/api/sources', { title: `On ${label}`, authors, year })).ok(sourceSchema, 201)
    expect(made).toMatchObject({ label, authors, year, kind: 'article', measurements: 0, galaxies: 0, bibcode: null, doi: null })
    expect((await curator.get(`/api/sources/${made.id}`)).ok(sourceDetailSchema)).toMatchObject({ label, contributed: [] })
    const [entry] = (await server().knex('auditLog').orderBy('id', 'desc').limit(1)) as unknown[]
    expect(entry).toMatchObject({ action: 'source.add', subject: `source:${made.id}`, actor: server().people.curator.id, details: { label } })
  })

  it.each([
    ['bibcode', { bibcode: '2021ApJ...628..695A' }],
    ['doi', { doi: '10.1234/ANSEL.2021' }],
  ])('with a known %s names the one that has it', async (path, known) => {
    const problem = (await curator.post('/api/sources', { title: 'Again', authors: ['Ansel, B.'], year: 2021, ...known })).problem(409)
    expect(problem.detail).toContain(`Ansel et al. 2021, which the catalogue has already (source ${ids.released})`)
    expect(problem.errors).toEqual([{ path, message: expect.stringContaining('Ansel et al. 2021') as string }])
  })

  it('twice at once makes one', async () => {
    const body = { title: 'At once', authors: ['Erb, C.'], year: 2024, doi: '10.1234/at.once' }
    const answers = await Promise.all(Array.from({ length: 6 }, () => curator.post('/api/sources', body)))
    expect(answers.map((a) => a.status).sort()).toEqual([201, 409, 409, 409, 409, 409])
    expect(await found(curator, '?q=at.once')).toEqual(['Erb 2024'])
  })

  it('keeps strange words as they are', async () => {
    const title = `<script>alert('x')</script> "quoted" \\ ; drop table sources; -- 日本 ${'é'.normalize('NFD')}`
    const made = (await curator.post('/api/sources', { title, authors: ["O'Neil, <b>"], year: 2020 })).ok(sourceSchema, 201)
    expect(made).toMatchObject({ title, label: "O'Neil 2020" })
  })
})
