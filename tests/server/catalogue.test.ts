import { describe, expect, it } from 'vitest'
import { COLUMNS } from '../../core/columns.ts'
import { facetsSchema, galaxyListSchema, pointsSchema } from '../../core/schema/catalogue.ts'
import { NEVER_MISSING } from '../../server/queries/keyset.ts'
import { changeGalaxy, makeRevision, placeGalaxy } from './harness/catalogue-rows.ts'
import { useReaders } from './harness/readers.ts'

/** Revision 1 is released as 2026.1; revision 2 moves Mirrow, renames Tarn and brings in Newcomer. */
const readers = useReaders(async (knex) => {
  await makeRevision(knex, 1, { release: '2026.1' })
  await makeRevision(knex, 2)
  await placeGalaxy(knex, 1, { name: 'Ostrel', class: 'spiral', ra: 10, dec: 40, distance: 3, distance_method: 'cepheids', abs_v: -21, v_lg: 250, host_relation: 'host' }, ['NGC 9001'])
  const mirrow = await placeGalaxy(knex, 1, { name: 'Mirrow', class: 'spiral', ra: 359.9, dec: -30, distance: 5, distance_method: 'trgb', abs_v: -20, v_lg: 400, host_relation: 'host' })
  await placeGalaxy(knex, 1, { name: 'Ostrel I', class: 'dwarf-spheroidal', ra: 11, dec: 41, distance: 3.05, distance_method: 'trgb', abs_v: -9, host: 'ostrel', host_sep: 80 })
  await placeGalaxy(knex, 1, { name: 'Ostrel II', class: 'dwarf-irregular', ra: 12, dec: 39, distance: 3.2, distance_method: 'trgb', abs_v: -12, host: 'ostrel', host_sep: 210, v_lg: 230, updated_at: '2026-03-01T10:00:00Z' })
  await placeGalaxy(knex, 1, { name: 'Mirrow I', class: 'dwarf-spheroidal', ra: 0.1, dec: -30.2, distance: 5.1, distance_method: 'trgb', abs_v: -12, host: 'mirrow', host_sep: 120 })
  const tarn = await placeGalaxy(knex, 1, { name: 'Tarn', class: 'dwarf-irregular', ra: 180, dec: 0, v_lg: 700, updated_at: '2026-02-01T10:00:00Z' }, ['UGC 0815'])
  await placeGalaxy(knex, 1, { name: 'Gone', class: 'unknown', status: 'withdrawn', ra: 90, dec: 10, distance: 1 })
  await changeGalaxy(knex, 2, mirrow, { distance: 5.5 })
  await changeGalaxy(knex, 2, tarn, { name: 'Tarn A', slug: 'tarn-a' })
  await placeGalaxy(knex, 2, { name: 'Newcomer', class: 'ultra-faint', ra: 200, dec: 5, distance: 0.4, abs_v: -5, status: 'candidate' })
})

async function names(query: string, who: 'visitor' | 'researcher' = 'visitor'): Promise<unknown[]> {
  const list = await readers()[who].get(`/api/galaxies?${query}`, galaxyListSchema)
  expect(list.total).toBe(list.rows.length)
  return list.rows.map((row) => row.name)
}

describe('GET /api/galaxies: the filter language', () => {
  it.each([
    ['', ['Mirrow', 'Mirrow I', 'Ostrel', 'Ostrel I', 'Ostrel II', 'Tarn']],
    ['host=ostrel', ['Ostrel I', 'Ostrel II']],
    ['host=ostrel,mirrow&class=dwarf-spheroidal', ['Mirrow I', 'Ostrel I']],
    ['host=!ostrel', ['Mirrow', 'Mirrow I', 'Ostrel', 'Tarn']],
    ['distance=3..3.05', ['Ostrel', 'Ostrel I']],
    ['distance=..3', ['Ostrel']],
    ['distance=5..', ['Mirrow', 'Mirrow I']],
    ['distance=!3..4', ['Mirrow', 'Mirrow I', 'Tarn']],
    ['distance=3,5', ['Mirrow', 'Ostrel']],
    ['ra=350..360,0..5', ['Mirrow', 'Mirrow I']],
    ['abs_v=..-20', ['Mirrow', 'Ostrel']],
    ['has=v_lg&lacks=distance', ['Tarn']],
    ['status=withdrawn', ['Gone']],
    ['status=!confirmed', ['Gone']],
    ['status=confirmed,withdrawn&distance=..2', ['Gone']],
    ['name=Ostrel%20I,Tarn', ['Ostrel I', 'Tarn']],
    ['q=ngc%2009001', ['Ostrel']],
    ['q=ostrel', ['Ostrel', 'Ostrel I', 'Ostrel II']],
    ['q=u%20815', ['Tarn']],
    ['cone=10,40,2', ['Ostrel', 'Ostrel I', 'Ostrel II']],
    ['cone=0,-30,0.3', ['Mirrow', 'Mirrow I']],
    ['cone=180,0,0.0001', ['Tarn']],
    ['cone=0,0,180', ['Mirrow', 'Mirrow I', 'Ostrel', 'Ostrel I', 'Ostrel II', 'Tarn']],
    ['within=ostrel,100', ['Ostrel', 'Ostrel I']],
    ['updated_at=2026-03-01', ['Ostrel II']],
    ['updated_at=2026-02-01..2026-03-01T09:59:59Z', ['Tarn']],
    ['host_relation=field', ['Tarn']],
    ['n_distance=0&class=!spiral,dwarf-spheroidal', ['Ostrel II', 'Tarn']],
  ])('%s', async (query, expected) => {
    expect(await names(query)).toEqual(expected)
  })

  it('takes a condition on every column, and sorts by every column both ways', async () => {
    const example: Record<string, string> = { real: '0..1', integer: '0..1', time: '2026-01-01..', text: 'a', choice: 'ostrel' }
    for (const { key, type, choices } of COLUMNS) {
      const text = choices?.[0] ?? example[type] ?? ''
      for (const sort of [key, `-${key}`]) await readers().visitor.get(`/api/galaxies?${key}=${text}&sort=${sort}`, galaxyListSchema)
    }
  })

  it('gives the columns asked for, and always the identifier', async () => {
    const { rows } = await readers().visitor.get('/api/galaxies?q=ngc9001&columns=name,dm,updated_at', galaxyListSchema)
    expect(rows).toEqual([{ slug: 'ostrel', name: 'Ostrel', dm: expect.closeTo(27.3856, 4) as number, updated_at: '2026-01-01T00:00:00Z' }])
    const all = await readers().visitor.get('/api/galaxies?q=ngc9001', galaxyListSchema)
    expect(Object.keys(all.rows[0] ?? {})).toEqual(COLUMNS.map((c) => c.key))
  })

  it('says what is wrong, naming the parameter', async () => {
    const problem = await readers().visitor.problem('/api/galaxies?distnace=2..5&limit=0', 400)
    expect(problem.errors).toEqual([
      { path: 'distnace', message: 'There is no column "distnace". Did you mean distance?' },
      { path: 'limit', message: expect.stringContaining('1 to 500 rows') as string },
    ])
    const centre = await readers().visitor.problem('/api/galaxies?within=ostrell,100', 400)
    expect(centre.errors?.[0]).toEqual({ path: 'within', message: 'No galaxy has the identifier "ostrell". Did you mean ostrel, ostrel-i or ostrel-ii?' })
    const nowhere = await readers().visitor.problem('/api/galaxies?within=tarn,100', 400)
    expect(nowhere.detail).toContain('no distance')
    const nul = await readers().visitor.problem('/api/galaxies?name=a%00b', 400)
    expect(nul.status).toBe(400)
  })
})

describe('GET /api/galaxies: pages', () => {
  const sorts = ['', '-name', 'distance', '-distance', 'class,-distance', '-host_sep,name', 'v_lg,-abs_v', 'host,-host_sep', '-abs_v,distance', 'updated_at', '-updated_at,v_lg']

  it.each(sorts)('sort=%s: pages of any size join up to the whole, missing values last', async (sort) => {
    const path = (more: string): string => `/api/galaxies?columns=name,class,distance,host,host_sep,v_lg,abs_v&${sort === '' ? '' : `sort=${sort}&`}${more}`
    const whole = await readers().visitor.get(path('limit=500'), galaxyListSchema)
    expect(whole.rows).toHaveLength(6)
    expect(whole.next).toBeNull()
    for (const limit of [1, 2, 4, 6]) {
      const rows: unknown[] = []
      let next: string | null = null
      do {
        const page: { rows: unknown[]; next: string | null; total: number } = await readers().visitor.get(path(`limit=${limit}${next === null ? '' : `&cursor=${next}`}`), galaxyListSchema)
        expect(page.total).toBe(6)
        expect(page.rows.length).toBeLessThanOrEqual(limit)
        rows.push(...page.rows)
        next = page.next
      } while (next !== null && rows.length <= 20)
      expect(rows).toEqual(whole.rows)
    }
    const first = sort.split(',')[0]?.replace('-', '') ?? ''
    if (first !== '' && first !== 'updated_at') {
      const values = whole.rows.map((row) => row[first] ?? null)
      const present = values.filter((v) => v !== null)
      expect(values).toEqual([...present, ...values.filter((v) => v === null)])
      const rising = [...present].sort((a, b) => (a < b ? -1 : a > b ? 1 : 0))
      expect(present).toEqual(sort.startsWith('-') ? rising.reverse() : rising)
    }
  })

  it('refuses a cursor of another sort, or a made-up one', async () => {
    const { next } = await readers().visitor.get('/api/galaxies?limit=2&sort=distance', galaxyListSchema)
    const other = await readers().visitor.problem(`/api/galaxies?limit=2&sort=-distance&cursor=${next}`, 400)
    expect(other.errors).toEqual([{ path: 'cursor', message: 'This cursor belongs to a list in another order.' }])
    const forged = ['distance', 'x', 3, 'distance,1', ['distance', '1; drop table users', 3], ['distance', 1, 1e20], ['distance', 1]]
    for (const content of forged) {
      const cursor = Buffer.from(JSON.stringify(content)).toString('base64url')
      await readers().visitor.problem(`/api/galaxies?sort=distance&cursor=${cursor}`, 400)
    }
    const badTime = Buffer.from(JSON.stringify(['updated_at', '2026-02-30T00:00:00+00:00', 1])).toString('base64url')
    await readers().visitor.problem(`/api/galaxies?sort=updated_at&cursor=${badTime}`, 400)
  })

  it('knows which columns are never missing', async () => {
    const { rows } = await readers().knex.raw<{ rows: { column_name: string }[] }>(
      "SELECT column_name FROM information_schema.columns WHERE table_name = 'catalogue_rows' AND is_nullable = 'NO'",
    )
    const held = COLUMNS.map((c) => c.key).filter((key) => rows.some((row) => row.column_name === key))
    expect([...NEVER_MISSING].sort()).toEqual(held.sort())
  })
})

describe('which revision is read', () => {
  it('shows a visitor the newest release only, and the researcher what holds now', async () => {
    expect(await names('class=ultra-faint&status=candidate')).toEqual([])
    expect(await names('class=ultra-faint&status=candidate', 'researcher')).toEqual(['Newcomer'])
    expect(await names('q=tarn')).toEqual(['Tarn'])
    expect(await names('q=tarn', 'researcher')).toEqual(['Tarn A'])
  })

  it('reads the past by number or by label', async () => {
    for (const at of ['1', '2026.1']) {
      const past = await readers().researcher.get(`/api/galaxies?at=${at}&columns=name,distance&q=mirrow&sort=-distance`, galaxyListSchema)
      expect(past.rows.map((row) => row.distance)).toEqual([5.1, 5])
      expect(past.revision).toBe(1)
    }
    const now = await readers().researcher.get('/api/galaxies?columns=distance&q=mirrow&sort=-distance', galaxyListSchema)
    expect(now.rows.map((row) => row.distance)).toEqual([5.5, 5.1])
  })

  it('tells a visitor nothing of revisions that are not released', async () => {
    expect((await readers().visitor.problem('/api/galaxies?at=2', 403)).detail).toContain('sign in')
    expect((await readers().visitor.problem('/api/galaxies?at=2027.1', 404)).detail).toContain('2027.1')
    expect((await readers().researcher.problem('/api/galaxies?at=99', 404)).detail).toBe('There is no revision 99 yet.')
    expect((await readers().researcher.problem('/api/galaxies?at=99999999999', 400)).errors?.[0]?.path).toBe('at')
  })

  it('says at which revision it read, and answers 304 to who holds the answer', async () => {
    const first = await readers().visitor.fetch('/api/galaxies?limit=2')
    const etag = first.headers.get('etag') ?? ''
    expect(first.headers.get('x-catalogue-revision')).toBe('1')
    expect(first.headers.get('cache-control')).toBe('public, no-cache')
    expect(first.headers.get('vary')).toMatch(/cookie/i)
    const again = await readers().visitor.fetch('/api/galaxies?limit=2', { 'if-none-match': etag, 'cache-control': 'max-age=0' })
    expect([again.status, await again.text(), again.headers.get('x-catalogue-revision')]).toEqual([304, '', '1'])
    const other = await readers().researcher.fetch('/api/galaxies?limit=2', { 'if-none-match': etag, 'cache-control': 'max-age=0' })
    expect(other.status).toBe(200)
    expect(other.headers.get('cache-control')).toBe('private, no-cache')
    expect(other.headers.get('x-catalogue-revision')).toBe('2')
  })
})

describe('GET /api/galaxies/facets', () => {
  const choices = async (query: string, facet: string) => {
    const facets = await readers().visitor.get(`/api/galaxies/facets?${query}`, facetsSchema)
    return Object.fromEntries((facets.choices[facet] ?? []).map(({ label, count }) => [label, count]))
  }

  it('counts every choice', async () => {
    expect(await choices('', 'host')).toEqual({ 'Ostrel': 2, 'Mirrow': 1, 'No host': 3 })
    expect(await choices('', 'class')).toEqual({ 'spiral': 2, 'dwarf spheroidal': 2, 'dwarf irregular': 2 })
    expect(await choices('', 'distance_method')).toEqual({ 'TRGB': 4, 'Cepheids': 1, 'No distance': 1 })
    expect(await choices('', 'status')).toEqual({ confirmed: 6, withdrawn: 1 })
    expect(await choices('', 'host_relation')).toEqual({ 'Satellite': 3, 'Host of satellites': 2, 'In the field': 1 })
  })

  it('counts each facet without its own condition, under all others', async () => {
    expect(await choices('class=dwarf-spheroidal', 'class')).toEqual({ 'spiral': 2, 'dwarf spheroidal': 2, 'dwarf irregular': 2 })
    expect(await choices('class=dwarf-spheroidal', 'host')).toEqual({ Ostrel: 1, Mirrow: 1 })
    expect(await choices('class=dwarf-spheroidal&host=ostrel', 'class')).toEqual({ 'dwarf spheroidal': 1, 'dwarf irregular': 1 })
    expect(await choices('class=dwarf-spheroidal&host=ostrel&distance=5..', 'host')).toEqual({ Ostrel: 0, Mirrow: 1 })
  })

  it('agrees with the list: the count of a choice is the total when it is chosen', async () => {
    const facets = await readers().visitor.get('/api/galaxies/facets?distance=3..6', facetsSchema)
    expect(facets.total).toBe(5)
    for (const facet of ['host', 'class', 'host_relation', 'distance_method']) {
      for (const { value, count } of facets.choices[facet] ?? []) {
        const condition = value === null ? `lacks=${facet}` : `${facet}=${value}`
        expect((await readers().visitor.get(`/api/galaxies?distance=3..6&${condition}`, galaxyListSchema)).total, `${facet} ${value}`).toBe(count)
      }
    }
  })

  it('spreads numbers over equal bins, and counts the missing', async () => {
    const { histograms } = await readers().visitor.get('/api/galaxies/facets?distance=3..3.2', facetsSchema)
    expect(histograms.distance).toMatchObject({ lo: 3, hi: 5.1, missing: 1 })
    const counts = histograms.distance?.counts ?? []
    expect(counts).toHaveLength(40)
    expect(counts.reduce((sum, n) => sum + n, 0)).toBe(5)
    expect([counts[0], counts[3], counts[38], counts[39]]).toEqual([2, 1, 1, 1])
    expect(histograms.abs_v).toMatchObject({ lo: -21, hi: -9 })
    expect(histograms.tidal_index).toBeUndefined()
  })
})

describe('GET /api/galaxies/points', () => {
  it('gives all matching galaxies column by column, at the revision', async () => {
    const points = await readers().visitor.get('/api/galaxies/points?class=spiral', pointsSchema)
    expect(points).toMatchObject({ revision: 1, slug: ['ostrel', 'mirrow'], distance: [3, 5], relation: ['host', 'host'], host: [null, null] })
    const now = await readers().researcher.get('/api/galaxies/points?class=spiral', pointsSchema)
    expect(now.distance).toEqual([3, 5.5])
  })

  it('is empty when nothing matches', async () => {
    const points = await readers().visitor.get('/api/galaxies/points?distance=100..', pointsSchema)
    expect(points.slug).toEqual([])
    expect(points.ra).toEqual([])
  })
})
