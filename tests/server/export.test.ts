import { parse } from 'csv-parse/sync'
import { describe, expect, it } from 'vitest'
import { COLUMNS, type CatalogueValue } from '../../core/columns.ts'
import { galaxyListSchema, type Row } from '../../core/schema/catalogue.ts'
import { makeRevision, placeGalaxy } from './harness/catalogue-rows.ts'
import { astropyTable, votlint, wrongWords } from './harness/judges.ts'
import { useReaders } from './harness/readers.ts'

const awkward = 0.1 + 0.2

/** Among them names that a file could stumble over. */
const readers = useReaders(async (knex) => {
  await makeRevision(knex, 1, { release: '2026.1' })
  const measured = Object.fromEntries(COLUMNS.filter((c) => c.type === 'real').map((c, i) => [c.key, awkward * (i + 1)]))
  const full = { ...measured, host_probability: awkward, distance_method: 'trgb', n_distance: 3, n_distance_all: 5, morphology: 'SA(s)b: pec?' }
  await placeGalaxy(knex, 1, { ...full, name: 'Ostrel', class: 'spiral', ra: 10, dec: -41.3, host_relation: 'host' })
  await placeGalaxy(knex, 1, { ...full, name: 'Óstrel “Δ” ☉ <&> II', slug: 'ostrel-ii', host: 'ostrel', main_disturber: 'ostrel', ra: 359.99999, dec: -89.5 })
  await placeGalaxy(knex, 1, { name: '=HYPERLINK("x")', slug: 'formula', host: 'ostrel' })
  await placeGalaxy(knex, 1, { name: 'Two, "three"', slug: 'two-three', morphology: '-dSph' })
  await placeGalaxy(knex, 1, { name: 'Gone', status: 'withdrawn' })
})

async function download(path: string): Promise<{ text: string; headers: Headers }> {
  const response = await readers().visitor.fetch(path)
  const text = await response.text()
  if (response.status !== 200) throw new Error(`${path} answered ${response.status}: ${text}`)
  return { text, headers: response.headers }
}

async function listed(query: string): Promise<Row[]> {
  return (await readers().visitor.get(`/api/galaxies?${query}`, galaxyListSchema)).rows
}

describe('GET /api/export.csv', () => {
  it('holds every column and row of the list, to the last digit', async () => {
    const { text, headers } = await download('/api/export.csv?sort=-dec')
    const [head, ...lines] = parse(text, { record_delimiter: '\r\n' })
    expect(head).toEqual(COLUMNS.map((c) => c.key))
    const rows = await listed('sort=-dec')
    expect(rows).toHaveLength(4)
    const numbers = new Set(COLUMNS.filter((c) => c.type === 'real' || c.type === 'integer').map((c) => c.key))
    const value = (cell: string, key: string): CatalogueValue => (cell === '' ? null : numbers.has(key) ? Number(cell) : cell.replace(/^'/, ''))
    expect(lines.map((line) => Object.fromEntries(COLUMNS.map(({ key }, i) => [key, value(line[i] ?? '', key)])))).toEqual(rows)
    expect(headers.get('content-type')).toBe('text/csv; charset=utf-8; header=present')
    expect(headers.get('content-disposition')).toBe('attachment; filename="vicinage-r1.csv"')
    expect(headers.get('x-catalogue-revision')).toBe('1')
    expect(headers.get('etag')).toMatch(/^W\/"r1-/)
  })

  it('neutralises formulas in texts, never in numbers, and begins without a byte-order mark', async () => {
    const { text } = await download('/api/export.csv?columns=name,morphology,dec&sort=slug')
    expect(text).toBe(
      'name,morphology,dec\r\n"\'=HYPERLINK(""x"")",,20\r\nOstrel,SA(s)b: pec?,-41.3\r\nÓstrel “Δ” ☉ <&> II,SA(s)b: pec?,-89.5\r\n"Two, ""three""",\'-dSph,20\r\n',
    )
  })

  it('takes the filter and the columns of the list, and is a head alone when nothing matches', async () => {
    expect((await download('/api/export.csv?host=ostrel&columns=slug&limit=1')).text).toBe('slug\r\nformula\r\nostrel-ii\r\n')
    expect((await download('/api/export.csv?distance=1000..&columns=slug,dm')).text).toBe('slug,dm\r\n')
  })

  it('answers HEAD without a body', async () => {
    const response = await fetch(`${readers().base}/api/export.csv`, { method: 'HEAD' })
    expect([response.status, await response.text()]).toEqual([200, ''])
  })
})

describe('GET /api/export.vot', () => {
  it('passes votlint and opens in astropy with every value, unit and UCD', async () => {
    const { text, headers } = await download('/api/export.vot?sort=name&host=ostrel&status=confirmed')
    expect(await votlint(text)).toEqual([])
    const table = await astropyTable(text)
    expect(table.warnings).toEqual([])
    expect(table.fields.map((f) => [f.name, f.ucd])).toEqual(COLUMNS.map((c) => [c.key, c.ucd]))
    expect(table.fields.filter((f) => f.ref === 'icrs').map((f) => f.name)).toEqual(['ra', 'dec'])
    expect(table.coosys).toEqual(['ICRS'])
    expect(table.infos).toEqual({ QUERY_STATUS: 'OK', revision: '1', release: '2026.1', filter: 'Confirmed satellites of Ostrel', query: 'status=confirmed&host=ostrel&sort=name' })
    const rows = await listed('sort=name&host=ostrel')
    expect(rows).toHaveLength(2)
    for (const { key, type } of COLUMNS) {
      const expected = rows.map((row) => (type === 'time' ? String(row[key]).replace('Z', '') : (row[key] ?? null)))
      // An empty cell and an empty text are one in VOTable.
      expect(table.columns[key]?.map((v) => (v === '' ? null : v)), key).toEqual(expected)
    }
    expect(headers.get('content-type')).toBe('application/x-votable+xml; charset=utf-8; serialization=tabledata')
    expect(headers.get('content-disposition')).toBe('attachment; filename="vicinage-r1.vot"')
  })

  it('gives units that astropy understands as ours', async () => {
    const { fields } = await astropyTable((await download('/api/export.vot?columns=ra,distance,v_lg,mu_half,hi_flux,host_sep,r_half,r_half_pc,dm,class')).text)
    expect(Object.fromEntries(fields.map((f) => [f.name, f.unit?.replaceAll(' ', '') ?? null]))).toEqual({
      ra: 'deg', distance: 'Mpc', v_lg: 'km.s**-1', mu_half: 'arcsec**-2.mag', hi_flux: 'Jy.km.s**-1', host_sep: 'kpc', r_half: 'arcmin', r_half_pc: 'pc', dm: 'mag', class: null,
    })
  })

  it('passes both judges when nothing matches, and names the release that it was read by', async () => {
    const { text } = await download('/api/export.vot?distance=1000..&columns=name&at=2026.1')
    expect(await votlint(text)).toEqual([])
    const table = await astropyTable(text)
    expect(table.warnings).toEqual([])
    expect(table.infos.release).toBe('2026.1')
    expect(table.columns.name).toEqual([])
  })

  it('has UCDs and units of the IVOA lists in every column', async () => {
    expect(await wrongWords(COLUMNS)).toEqual([])
  })
})

describe('what an export refuses', () => {
  it.each([
    ['/api/export.csv?distnace=1..2', 400, 'distnace'],
    ['/api/export.vot?distance=5..2', 400, 'distance'],
    ['/api/export.vot?within=nobody,10', 400, 'within'],
    ['/api/export.csv?at=2030.1', 404, undefined],
    ['/api/export.xyz', 404, undefined],
  ])('%s before any byte', async (path, status, field) => {
    const problem = await readers().visitor.problem(path, status)
    expect(problem.errors?.[0]?.path).toBe(field)
  })

  it('refuses what only the database notices before any byte, too', async () => {
    expect((await readers().visitor.problem('/api/export.csv?name=a%00b', 400)).detail).toContain('character')
  })
})

/** Without compression, so that a file is as large on its way as it is. */
const PLAIN = { 'accept-encoding': 'identity' }

describe('an export of any size', () => {
  it('stops the query when its reader turns away, and leaves the connections free', async () => {
    const { knex, base } = readers()
    // 60,000 rows more, so that the file does not fit into the buffers between us and the reader.
    await knex.raw(`
      WITH made AS (INSERT INTO galaxies (created_at) SELECT now() FROM generate_series(1, 60000) RETURNING id)
      INSERT INTO catalogue_rows (galaxy, slug, name, status, class, ra, dec, glon, glat, sgl, sgb, n_distance, n_distance_all, host_relation, n_measurements, n_sources, revision, updated_at, unit_vector, rev_from)
      SELECT id, 'made-' || id, 'Made ' || id, 'confirmed', 'unknown', 1, 2, 3, 4, 5, 6, 0, 0, 'field', 0, 0, 1, now(), cube(ARRAY[1, 0, 0]), 1 FROM made`)
    // Known by its many columns: PostgreSQL shows no more than the first kilobyte of a query.
    const running = async (): Promise<number> => {
      const { rows } = await knex.raw<{ rows: { n: number }[] }>("SELECT count(*)::int AS n FROM pg_stat_activity WHERE datname = current_database() AND query LIKE 'SELECT %' AND length(query) > 400 AND pid <> pg_backend_pid() AND state = 'active'")
      return rows[0]?.n ?? -1
    }
    const free = async (): Promise<boolean> => {
      for (let i = 0; i < 100; i++) {
        if ((await running()) === 0) return true
        await new Promise((later) => setTimeout(later, 50))
      }
      return false
    }
    for (let i = 0; i < 5; i++) {
      const controller = new AbortController()
      const response = await fetch(`${base}/api/export.vot?sort=-dec`, { headers: PLAIN, signal: controller.signal })
      expect(response.status).toBe(200)
      await response.body?.getReader().read()
      expect(await running()).toBe(1)
      controller.abort()
      expect(await free()).toBe(true)
    }
    expect((await readers().visitor.fetch('/api/galaxies?limit=1')).status).toBe(200)
  })

  it('reads all of them, once each, with a memory that does not grow with the file', async () => {
    const { base } = readers()
    const response = await fetch(`${base}/api/export.csv?sort=-name`, { headers: PLAIN })
    const before = process.memoryUsage().rss
    let lines = 0
    let most = 0
    for await (const piece of response.body as unknown as AsyncIterable<Uint8Array>) {
      for (const byte of piece) if (byte === 10) lines++
      most = Math.max(most, process.memoryUsage().rss)
    }
    expect(lines).toBe(60_005)
    expect((most - before) / 2 ** 20).toBeLessThan(120)
  })

  it('lets only a few run at a time, and says so to the next', async () => {
    const { base } = readers()
    const controller = new AbortController()
    const open = await Promise.all([1, 2, 3, 4].map((n) => fetch(`${base}/api/export.csv?dec=0..${10 * n}`, { headers: PLAIN, signal: controller.signal })))
    expect(open.map((r) => r.status)).toEqual([200, 200, 200, 200])
    const problem = await readers().visitor.problem('/api/export.csv?dec=0..5', 503)
    expect(problem.detail).toContain('try again')
    controller.abort()
  })
})
