import type { Knex } from 'knex'
import { describe, expect, it } from 'vitest'
import { galaxySchema, historySchema, measurementsSchema, neighboursSchema } from '../../core/schema/catalogue.ts'
import { nameKey } from '../../core/names.ts'
import { layTheScale } from '../../seeds/genesis.ts'
import { rebuildCatalogue } from '../../server/services/revision/rebuild.ts'
import { useReaders } from './harness/readers.ts'

/** A catalogue computed from measurements: revision 2 is released, revision 3 adds a measurement and renames the satellite. */
const readers = useReaders(async (knex) => {
  await knex.transaction((trx) => layTheScale(trx, null, new Date('2026-01-01T00:00:00Z')))
  const [user] = (await knex('users').insert({ name: 'Cara Lind', email: 'cara@readers.test', roles: ['curator'], state: 'active', passwordHash: 'x' }).returning('id')) as { id: number }[]
  const [source] = (await knex('sources').insert({ label: 'Ansel et al. 2021', title: 'Distances', authors: '["Ansel, B."]', year: 2021, kind: 'demonstration' }).returning('id')) as { id: number }[]
  const people = { user: user?.id ?? 0, source: source?.id ?? 0 }
  await revision(knex, 2, 'The first galaxies', people.user, async (trx) => {
    const ostrel = await galaxy(trx, 'Ostrel', 'ostrel', 'spiral', 10, 40, ['NGC 9001'])
    await measure(trx, 2, people, ostrel, 'distance_modulus', 27.4)
    await measure(trx, 2, people, ostrel, 'k_mag', 4)
    await measure(trx, 2, people, ostrel, 'velocity', 210)
    const first = await galaxy(trx, 'Ostrel I', 'ostrel-i', 'dwarf-spheroidal', 11, 40.5)
    await measure(trx, 2, people, first, 'distance_modulus', 27.41)
    await galaxy(trx, 'Tarn', 'tarn', 'unknown', 200, 0)
  })
  await knex('releases').insert({ label: '2026.1', revision: 2, title: 'First' })
  await revision(knex, 3, 'A second distance of Ostrel I', people.user, async (trx) => {
    const held = (await trx('galaxyVersions').where({ slug: 'ostrel-i' }).first('galaxy', 'ra', 'dec', 'class', 'status')) as { galaxy: number }
    await measure(trx, 3, people, held.galaxy, 'distance_modulus', 27.5)
    await trx('galaxyVersions').where({ galaxy: held.galaxy, revTo: null }).update({ revTo: 3 })
    await trx('galaxyVersions').insert({ ...held, designation: 'Ostrel Prime', slug: 'ostrel-prime', revFrom: 3 })
  })
})

async function revision(knex: Knex, number: number, summary: string, by: number, act: (trx: Knex.Transaction) => Promise<void>): Promise<void> {
  await knex.transaction(async (trx) => {
    await trx('revisions').insert({ number, summary, approvedBy: by, approvedAt: `2026-0${number}-01T00:00:00Z` })
    await act(trx)
    await rebuildCatalogue(trx, number)
  })
}

async function galaxy(trx: Knex, designation: string, slug: string, kind: string, ra: number, dec: number, aliases: string[] = []): Promise<number> {
  const [made] = (await trx('galaxies').insert({}).returning('id')) as { id: number }[]
  const id = made?.id ?? 0
  await trx('galaxyVersions').insert({ galaxy: id, designation, slug, status: 'confirmed', ra, dec, class: kind, revFrom: 2 })
  for (const [i, name] of [designation, ...aliases].entries()) await trx('galaxyNames').insert({ galaxy: id, name, nameKey: nameKey(name), preferred: i === 0, revFrom: 2 })
  return id
}

async function measure(trx: Knex, revFrom: number, people: { user: number; source: number }, id: number, quantity: string, value: number): Promise<void> {
  await trx('measurements').insert({
    galaxy: id, quantity, value, errPlus: 0.05, errMinus: 0.05, method: quantity === 'distance_modulus' ? 'trgb' : null, source: people.source, enteredBy: people.user, revFrom,
  })
}

describe('GET /api/galaxies/:slug', () => {
  it('gives names, row, adopted values with reasons, and the host', async () => {
    const answer = await readers().visitor.get('/api/galaxies/ostrel-i', galaxySchema)
    expect(answer).toMatchObject({ slug: 'ostrel-i', designation: 'Ostrel I', revision: 2, host: { slug: 'ostrel', name: 'Ostrel' }, mainDisturber: { slug: 'ostrel', name: 'Ostrel' }, satellites: 0 })
    const distance = answer.adopted.find((a) => a.quantity === 'distance_modulus')
    expect(distance).toMatchObject({ value: 27.41, nUsed: 1, nAll: 1, method: 'trgb' })
    expect(distance?.reasons).toHaveLength(1)
    expect(distance?.reasons[0]).toMatchObject({ used: true, weight: 1 })
    expect(answer.row.dm).toBe(27.41)
    const host = await readers().visitor.get('/api/galaxies/ostrel', galaxySchema)
    expect(host.names.map((n) => [n.name, n.preferred])).toEqual([['Ostrel', true], ['NGC 9001', false]])
    expect(host).toMatchObject({ satellites: 1, host: null })
  })

  it('answers for a galaxy of which nothing was measured', async () => {
    const answer = await readers().visitor.get('/api/galaxies/tarn', galaxySchema)
    expect(answer).toMatchObject({ adopted: [], host: null, mainDisturber: null })
    expect(answer.row.distance).toBeNull()
  })

  it('is found by a former identifier, and answers with the one that holds', async () => {
    for (const slug of ['ostrel-i', 'ostrel-prime']) expect((await readers().researcher.get(`/api/galaxies/${slug}`, galaxySchema)).slug).toBe('ostrel-prime')
    expect((await readers().researcher.get('/api/galaxies/ostrel-i?at=2', galaxySchema)).slug).toBe('ostrel-i')
  })

  it('does not tell a visitor an identifier that is not released', async () => {
    expect((await readers().visitor.problem('/api/galaxies/ostrel-prime', 404)).detail).toContain('Did you mean ostrel')
  })

  it('says 404 with names like it, and what is wrong with the revision', async () => {
    expect((await readers().visitor.problem('/api/galaxies/ostrell-i', 404)).detail).toMatch(/"ostrell-i"\. Did you mean ostrel-i/)
    expect((await readers().visitor.problem('/api/galaxies/zzz', 404)).detail).toBe('No galaxy of this catalogue has the identifier "zzz".')
    expect((await readers().visitor.problem('/api/galaxies/ostrel?at=%20', 400)).errors?.[0]?.path).toBe('at')
    expect((await readers().visitor.problem('/api/galaxies/ostrel?columns=dm', 400)).status).toBe(400)
  })
})

describe('what belongs to a galaxy', () => {
  it('has every measurement, with who entered it for those who signed in', async () => {
    const released = await readers().visitor.get('/api/galaxies/ostrel-i/measurements', measurementsSchema)
    expect(released.measurements.map((m) => [m.value, m.enteredBy, m.revision])).toEqual([[27.41, null, 2]])
    expect(released.measurements[0]?.source).toMatchObject({ label: 'Ansel et al. 2021', year: 2021 })
    const now = await readers().researcher.get('/api/galaxies/ostrel-prime/measurements', measurementsSchema)
    expect(now.measurements.map((m) => [m.value, m.enteredBy, m.revision])).toEqual([[27.41, 'Cara Lind', 2], [27.5, 'Cara Lind', 3]])
  })

  it('has its history, newest first, with what changed', async () => {
    const { entries } = await readers().researcher.get('/api/galaxies/ostrel-prime/history', historySchema)
    expect(entries.map((e) => [e.revision, e.by, e.summary, e.release])).toEqual([[3, 'Cara Lind', 'A second distance of Ostrel I', null], [2, 'Cara Lind', 'The first galaxies', '2026.1']])
    const changed = Object.fromEntries((entries[0]?.changes ?? []).map((c) => [c.column, [c.before, c.after]]))
    expect(changed.slug).toEqual(['ostrel-i', 'ostrel-prime'])
    expect(changed.n_distance).toEqual([1, 2])
    expect(changed.dm?.[0]).toBe(27.41)
    expect(changed.dm?.[1]).toBeGreaterThan(27.41)
    expect(changed.updated_at).toBeUndefined()
    expect(entries[1]?.changes.find((c) => c.column === 'dm')).toEqual({ column: 'dm', before: null, after: 27.41 })
    const released = await readers().visitor.get('/api/galaxies/ostrel-i/history', historySchema)
    expect(released.entries.map((e) => [e.revision, e.by])).toEqual([[2, null]])
  })

  it('has neighbours in three dimensions, nearest first, in kpc', async () => {
    const row = (await readers().visitor.get('/api/galaxies/ostrel-i', galaxySchema)).row
    const { neighbours } = await readers().visitor.get('/api/galaxies/ostrel-i/neighbours', neighboursSchema)
    expect(neighbours.map((n) => n.slug)).toEqual(['ostrel'])
    expect(neighbours[0]?.separation).toBeCloseTo(Number(row.host_sep), 6)
    expect((await readers().visitor.get('/api/galaxies/tarn/neighbours', neighboursSchema)).neighbours).toEqual([])
  })

  it('answers 304 as long as the content stays', async () => {
    const path = '/api/galaxies/ostrel-i/history'
    const etag = (await readers().visitor.fetch(path)).headers.get('etag') ?? ''
    const same = { 'if-none-match': etag, 'cache-control': 'max-age=0' }
    expect((await readers().visitor.fetch(path, same)).status).toBe(304)
    expect((await readers().researcher.fetch(path, same)).status).toBe(200)
  })
})
