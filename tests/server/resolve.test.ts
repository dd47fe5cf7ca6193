import { describe, expect, it } from 'vitest'
import { resolveSchema } from '../../core/schema/catalogue.ts'
import { makeRevision, placeGalaxy } from './harness/catalogue-rows.ts'
import { useReaders } from './harness/readers.ts'

const readers = useReaders(async (knex) => {
  await makeRevision(knex, 1, { release: '2026.1' })
  await makeRevision(knex, 2)
  await placeGalaxy(knex, 1, { name: 'NGC 9224', class: 'spiral', ra: 10.6847, dec: 41.2688 }, ['Great Ostrel', 'UGC 00454'])
  await placeGalaxy(knex, 1, { name: 'NGC 922', ra: 150, dec: -10 })
  await placeGalaxy(knex, 1, { name: 'Ostrel IX', ra: 11, dec: 41.3, host: 'ngc-9224' }, ['Óstrel 9'])
  await placeGalaxy(knex, 1, { name: 'Vanished', ra: 5, dec: 5, status: 'withdrawn' })
  await placeGalaxy(knex, 2, { name: 'Unreleased', ra: 5, dec: 5 })
})

const found = async (name: string, who: 'visitor' | 'researcher' = 'visitor') =>
  (await readers()[who].get(`/api/resolve?name=${encodeURIComponent(name)}`, resolveSchema)).matches

describe('GET /api/resolve', () => {
  it.each(['NGC 9224', 'ngc9224', 'N 9224', 'NGC 09224', ' ngc-9224 '])('%s is exactly that galaxy, first', async (name) => {
    expect((await found(name))[0]).toMatchObject({ slug: 'ngc-9224', matched: 'NGC 9224', exact: true })
  })

  it('finds by any other name, and says by which', async () => {
    expect(await found('ugc 454')).toEqual([
      { slug: 'ngc-9224', name: 'NGC 9224', matched: 'UGC 00454', class: 'spiral', ra: 10.6847, dec: 41.2688, exact: true },
    ])
    expect((await found('OSTREL 9'))[0]).toMatchObject({ slug: 'ostrel-ix', matched: 'Óstrel 9', exact: true })
  })

  it('puts the exact name before longer ones, and beginnings before what only holds the word', async () => {
    expect((await found('NGC 922')).map((m) => [m.slug, m.exact])).toEqual([['ngc-922', true], ['ngc-9224', false]])
    expect((await found('ostrel')).map((m) => m.matched)).toEqual(['Ostrel IX', 'Great Ostrel'])
  })

  it('finds names like it only when nothing else is found', async () => {
    expect((await found('Grate Ostrel')).map((m) => [m.slug, m.exact])).toContainEqual(['ngc-9224', false])
    expect(await found('qqqqqqqqq')).toEqual([])
  })

  it.each(['10.6847 41.2688', '00 42 44.3 +41 16 08', '0h42m44.3s +41d16m08s', 'J004244.3+411608'])('takes the position %s', async (position) => {
    expect((await found(position)).map((m) => m.slug)).toEqual(['ngc-9224', 'ostrel-ix'])
  })

  it('keeps what is withdrawn or unreleased to itself', async () => {
    expect(await found('Vanished')).toEqual([])
    expect(await found('Unreleased')).toEqual([])
    expect((await found('Unreleased', 'researcher'))[0]?.slug).toBe('unreleased')
  })

  it('refuses an empty or an endless name, and survives strange ones', async () => {
    expect((await readers().visitor.problem('/api/resolve?name=%20', 400)).errors?.[0]?.path).toBe('name')
    expect((await readers().visitor.problem(`/api/resolve?name=${'x'.repeat(201)}`, 400)).errors?.[0]?.path).toBe('name')
    expect((await readers().visitor.problem('/api/resolve', 400)).errors?.[0]?.path).toBe('name')
    for (const name of ['%', '_', '%%%', "'; drop table galaxies; --", '🌌', '\\', 'a%00b']) expect(Array.isArray(await found(name))).toBe(true)
  })
})
