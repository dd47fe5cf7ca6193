import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import type { ImportAnswer, ImportRow, Mapping } from '../../core/schema/imports.ts'
import type { SubmissionAnswer } from '../../core/schema/submissions.ts'
import { footprint, galaxyAdd } from './desk/catalogue.ts'
import { useDesk } from './desk/desk.ts'

const desk = useDesk()
const HEAD = 'galaxy,ra,dec,quantity,value,err,unit,method,source\n'

async function upload(text: string | Uint8Array, name = 'table.csv'): Promise<ImportAnswer> {
  return (await desk().curator.upload('/api/imports', name, text)).ok<ImportAnswer>(201)
}

async function rows(id: number, only = 'all'): Promise<ImportRow[]> {
  return (await desk().curator.get(`/api/imports/${id}/rows?only=${only}`)).ok<{ rows: ImportRow[] }>(200).rows
}

const makeDraft = (id: number, title = 'From a table') => desk().curator.post(`/api/imports/${id}/draft`, { title })

async function approve(id: number): Promise<SubmissionAnswer> {
  const { curator, approver } = desk()
  const draft = (await curator.get(`/api/submissions/${id}`)).ok<SubmissionAnswer>(200)
  const waiting = (await curator.post(`/api/submissions/${id}/submit`, { lockVersion: draft.lockVersion })).ok<SubmissionAnswer>(200)
  return (await approver.post(`/api/submissions/${id}/approve`, { contentHash: waiting.contentHash })).ok<SubmissionAnswer>(200)
}

describe('an uploaded table', () => {
  it.each([
    ['UTF-8 with its mark', Buffer.from(`\uFEFF${HEAD}Söl A,1,2,velocity,10,1,,,Ref+2020\n`), 'CSV, UTF-8'],
    ['UTF-16', Buffer.from(`\uFEFF${HEAD}Söl A,1,2,velocity,10,1,,,Ref+2020\n`, 'utf16le'), 'CSV, UTF-16'],
    ['Latin letters', Buffer.from(`${HEAD}Söl A,1,2,velocity,10,1,,,Ref+2020\n`, 'latin1'), 'CSV, Windows-1252'],
    ['tabs', Buffer.from(`${HEAD}Söl A,1,2,velocity,10,1,,,Ref+2020\n`.replaceAll(',', '\t')), 'TSV, UTF-8'],
    ['semicolons and Windows line ends', Buffer.from(`${HEAD}Söl A,1,2,velocity,10,1,,,Ref+2020\n`.replaceAll(',', ';').replaceAll('\n', '\r\n')), 'CSV parted by semicolons, UTF-8'],
    ['comment lines and blank ones', Buffer.from(`# made by hand\n${HEAD}\nSöl A,1,2,velocity,10,1,,,Ref+2020\n,,,,,,,,\n\n`), 'CSV, UTF-8'],
  ])('is read with %s', async (_what, bytes, format) => {
    const made = await upload(bytes)
    expect(made).toMatchObject({ format, rows: 1, rowsOk: 1, rowsBad: 0, newGalaxies: 1, newSources: 1, headers: HEAD.trim().split(',') })
    expect((await rows(made.id))[0]).toMatchObject({ reading: 'Söl A (new), heliocentric velocity 10\u00a0±\u00a01\u00a0km/s, Ref+2020 (new source)', problems: [] })
  })

  it.each([
    ['an empty file', '', 'empty'],
    ['a head alone', HEAD, 'no rows'],
    ['one column', 'galaxy\nOstrel\n', 'only one column'],
    ['ten thousand columns', `${Array.from({ length: 10_000 }, (_, i) => `c${i}`).join(',')}\n1\n`, '10000 columns'],
    ['NUL bytes', `${HEAD}Ost\u0000rel,1,2,velocity,3,,,,R+2020\n`, 'NUL'],
    ['a renamed archive', Buffer.from([0x50, 0x4b, 3, 4, 20, 0, 6, 0]), 'spreadsheet'],
    ['a renamed picture', Buffer.from([0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10]), 'picture'],
    ['noise', Buffer.from(Array.from({ length: 4000 }, (_, i) => (i * 7919) % 256)), 'no table of text'],
    ['a quotation mark never closed', `${HEAD}"Ostrel,1,2,velocity,3,,,,R+2020\nMarl,1,2,velocity,3,,,,R+2020\n`, 'quotation mark'],
    ['a hundred thousand rows and one', `galaxy,v\n${'A,1\n'.repeat(100_001)}`, '100000 rows'],
    ['a cell without end', `${HEAD}${'O'.repeat(5000)},1,2,velocity,3,,,,R+2020\n`, '5000 characters'],
  ])('is refused when it is %s, with a sentence, and nothing is kept', async (_what, bytes, words) => {
    const { curator, knex, uploads } = desk()
    const before = [await footprint(knex), filesIn(uploads)]
    const refused = await curator.upload('/api/imports', 'table.csv', bytes)
    expect([refused.status, refused.problem().errors]).toEqual([400, [{ path: 'file', message: expect.stringContaining(words) as string }]])
    expect([await footprint(knex), filesIn(uploads)]).toEqual(before)
  })

  it('is refused when it is too large', async () => {
    const { curator, knex, uploads } = desk()
    const before = [await footprint(knex), filesIn(uploads)]
    const refused = await curator.upload('/api/imports', 'table.csv', new Uint8Array(20_000_001).fill(65))
    expect(refused.status).toBe(413)
    const empty = await curator.post('/api/imports', {})
    expect(empty.status).toBe(415)
    expect([await footprint(knex), filesIn(uploads)]).toEqual(before)
  })

  it('is kept under a name of our own, and shown under its own without folders', async () => {
    const { knex, uploads } = desk()
    const text = `${HEAD}Pathless,1,2,velocity,10,1,,,Ref+2020\n`
    const made = await upload(text, '../../etc/Tabelle ä 光.csv')
    expect(made.fileName).toBe('Tabelle ä 光.csv')
    const kept = (await knex('imports').where({ id: made.id }).first()) as { storeKey: string; bytes: number; sha256: string }
    expect(kept).toMatchObject({ bytes: text.length, storeKey: expect.stringMatching(/^[0-9a-f-]{36}$/) as string })
    expect(readFileSync(join(uploads, kept.storeKey.slice(0, 2), kept.storeKey), 'utf8')).toBe(text)
  })

  it('is its owner’s alone', async () => {
    const { otherCurator, researcher } = desk()
    const made = await upload(`${HEAD}Secretive,1,2,velocity,10,1,,,Ref+2020\n`)
    expect((await otherCurator.get(`/api/imports/${made.id}`)).status).toBe(404)
    expect((await otherCurator.get(`/api/imports/${made.id}/rows`)).status).toBe(404)
    expect((await otherCurator.patch(`/api/imports/${made.id}/rows/1`, { leftOut: 'no' })).status).toBe(404)
    expect((await otherCurator.post(`/api/imports/${made.id}/draft`, { title: 'Mine' })).status).toBe(404)
    expect((await researcher.get('/api/imports')).status).toBe(403)
  })
})

function filesIn(folder: string): string[] {
  return readdirSync(folder, { recursive: true }).map(String).sort()
}

describe('the mapping', () => {
  it('is guessed, corrected, and read again; a bad one is refused field by field', async () => {
    const { curator, ground, knex } = desk()
    const made = await upload('who,what,how much\nMapped A,ignored,3.61 ± 0.05\nMapped B,ignored,277\n')
    expect(made.mapping.columns.map((c) => c.role)).toEqual(['galaxy', 'ignore', 'ignore'])
    expect(made).toMatchObject({ rowsOk: 0, rowsBad: 2 })
    const mapping: Mapping = {
      ...made.mapping,
      columns: [{ role: 'galaxy', unit: '' }, { role: 'ignore', unit: '' }, { role: 'value', unit: '' }],
      constants: { ...made.mapping.constants, quantity: 'distance_modulus', method: 'trgb', unit: 'Mpc', sourceId: ground.source },
    }
    const read = (await curator.patch(`/api/imports/${made.id}`, { mapping })).ok<ImportAnswer>(200)
    expect(read.mapping).toEqual(mapping)
    const [a, b] = await rows(made.id)
    expect(a?.problems).toEqual([{ column: 'who', message: 'The catalogue knows no galaxy "Mapped A", and the table gives no position to add it with.' }])
    expect(b?.problems).toContainEqual({ column: 'how much', message: expect.stringContaining('277 Mpc (37.212 mag)') as string })

    const before = await footprint(knex)
    const bad: [Mapping, string][] = [
      [{ ...mapping, columns: mapping.columns.slice(1) }, 'mapping.columns'],
      [{ ...mapping, columns: mapping.columns.map(() => ({ role: 'galaxy' as const, unit: '' })) }, 'mapping.columns.1.role'],
      [{ ...mapping, columns: [mapping.columns[0] as Mapping['columns'][number], { role: 'value:velocity', unit: 'Mpc' }, { role: 'ignore', unit: '' }] }, 'mapping.columns.1.unit'],
      [{ ...mapping, constants: { ...mapping.constants, sourceId: 999_999 } }, 'mapping.constants.sourceId'],
      [{ ...mapping, constants: { ...mapping.constants, anchor: 'sirius' } }, 'mapping.constants.anchor'],
      [{ ...mapping, constants: { ...mapping.constants, anchorValueAssumed: 18.5 } }, 'mapping.constants.anchor'],
      [{ ...mapping, columns: mapping.columns.map((c) => ({ ...c, role: 'value:charm' })) }, 'mapping.columns.0.role'],
    ]
    for (const [wrong, path] of bad) {
      const refused = await curator.patch(`/api/imports/${made.id}`, { mapping: wrong })
      expect([path, refused.status, refused.problem().errors?.map((e) => e.path)]).toEqual([path, 400, expect.arrayContaining([path])])
    }
    expect(await footprint(knex)).toBe(before)
  })
})

describe('rows', () => {
  it('say in words what is wrong, are mended or left out, and drafted once', async () => {
    const { curator, knex } = desk()
    const made = await upload(
      `${HEAD}Mended A,120,5,velocity,10,1,,,Ref+2020 X 1 2\nMended A,120,5,velocity,fast,1,,,Ref+2020 X 1 2\nMended A,120,5,velocity,10,1,,,Ref+2020 X 1 2\nMended B,121,5\nMended C,122,5,velocity,12,,,,nobody knows\n`,
    )
    expect(made).toMatchObject({ rows: 5, rowsOk: 1, rowsBad: 4 })
    const bad = await rows(made.id, 'bad')
    expect(bad.map((r) => [r.number, r.problems[0]?.column, r.problems[0]?.message])).toEqual([
      [2, 'value', expect.stringContaining('"fast" cannot be read as a value')],
      [3, null, expect.stringContaining('The same measurement as row 1')],
      [4, null, expect.stringContaining('3 cells where the head of the table has 9')],
      [5, 'source', expect.stringContaining('"nobody knows" gives no year')],
    ])

    const first = (await makeDraft(made.id)).ok<{ submission: number; changes: number; left: number }>(201)
    expect(first).toMatchObject({ changes: 2, left: 4 })
    expect((await makeDraft(made.id)).status).toBe(400)
    const taken = await curator.patch(`/api/imports/${made.id}/rows/1`, { leftOut: 'no' })
    expect([taken.status, taken.problem().detail]).toEqual([409, expect.stringContaining('already')])

    const cells = (bad[0]?.raw ?? []).map((cell) => (cell === 'fast' ? '11 ± 2' : cell))
    const mended = (await curator.patch(`/api/imports/${made.id}/rows/2`, { cells })).ok<ImportAnswer>(200)
    expect(mended).toMatchObject({ rowsOk: 2, rowsBad: 3 })
    ;(await curator.patch(`/api/imports/${made.id}/rows/3`, { leftOut: 'stands twice' })).ok(200)
    expect((await curator.patch(`/api/imports/${made.id}/rows/2`, { cells: ['too', 'few'] })).status).toBe(400)
    expect((await curator.patch(`/api/imports/${made.id}/rows/99`, { leftOut: 'none' })).status).toBe(404)
    // While the first draft is a draft, what is mended joins it, and its galaxy is not added twice.
    const second = (await makeDraft(made.id)).ok<{ submission: number; changes: number; left: number }>(201)
    expect(second).toEqual({ submission: first.submission, changes: 1, left: 2 })
    const approved = await approve(second.submission)
    expect(approved.items.map((i) => [i.action, i.galaxy?.slug])).toEqual([['galaxy.add', 'mended-a'], ['measurement.add', 'mended-a'], ['measurement.add', 'mended-a']])
    const sources = (await knex('sources').whereRaw(`'Ref+2020 X 1 2' = ANY(cited_as)`)) as { label: string; venue: string; year: number }[]
    expect(sources).toMatchObject([{ label: 'Ref et al. 2020', venue: 'X 1 2', year: 2020 }])

    // The same table again: everything is known, and nothing is entered twice.
    const again = await upload(`${HEAD}mended-A,120,5,velocity,10,1,,,Ref+2020 X 1 2\n`)
    expect(again).toMatchObject({ newGalaxies: 0, newSources: 0, rowsBad: 1 })
    expect((await rows(again.id))[0]?.problems[0]?.message).toContain('The catalogue holds this measurement already: Mended A')
  })

  it('are free again when their draft is removed, and wait for a galaxy that is under review', async () => {
    const { curator } = desk()
    const made = await upload(`${HEAD}Freed,130,5,velocity,10,1,,,Ref+2020\nFreed,130,5,B magnitude,bright,,,,Ref+2020\n`)
    const first = (await makeDraft(made.id)).ok<{ submission: number; changes: number }>(201)
    ;(await curator.delete(`/api/submissions/${first.submission}`)).ok(204)
    expect((await curator.get(`/api/imports/${made.id}`)).ok<ImportAnswer>(200).submission).toBeNull()
    const second = (await makeDraft(made.id)).ok<{ submission: number; changes: number }>(201)
    expect(second.changes).toBe(first.changes)
    const draft = (await curator.get(`/api/submissions/${second.submission}`)).ok<SubmissionAnswer>(200)
    ;(await curator.post(`/api/submissions/${second.submission}/submit`, { lockVersion: draft.lockVersion })).ok(200)
    const cells = (await rows(made.id))[1]?.raw.map((cell) => (cell === 'bright' ? '14.2' : cell))
    ;(await curator.patch(`/api/imports/${made.id}/rows/2`, { cells })).ok(200)
    const early = await makeDraft(made.id)
    expect([early.status, early.problem().detail]).toEqual([409, expect.stringContaining('adds Freed and waits for review')])
    const { approver } = desk()
    const waiting = (await curator.get(`/api/submissions/${second.submission}`)).ok<SubmissionAnswer>(200)
    ;(await approver.post(`/api/submissions/${second.submission}/approve`, { contentHash: waiting.contentHash })).ok(200)
    expect((await makeDraft(made.id)).ok<{ changes: number; left: number }>(201)).toMatchObject({ changes: 1, left: 0 })
  })

  it('find galaxies by any name, then by position, and say so', async () => {
    const { curator } = desk()
    const known = (await curator.post('/api/submissions', { title: 'Known ones' })).ok<SubmissionAnswer>(201)
    const added = galaxyAdd('Skerry', 200, -30)
    ;(await curator.post(`/api/submissions/${known.id}/changes`, { ...added, payload: { ...added.payload, names: ['Marl 0042'] } })).ok(201)
    ;(await curator.post(`/api/submissions/${known.id}/changes`, galaxyAdd('Skerry B', 210, -30))).ok(201)
    await approve(known.id)

    const made = await upload(
      `${HEAD}marl42,200.001,-30.001,velocity,100,1,,,Ref+2021\nDG 7,200.005,-30,velocity,101,1,,,Ref+2021\nSkerry B,250,-30,velocity,102,1,,,Ref+2021\nLone,20,1,velocity,103,1,,,Ref+2021\nLone Alias,20.001,1,velocity,104,1,,,Ref+2021\n`,
    )
    const read = await rows(made.id)
    expect(read.map((r) => r.galaxy)).toEqual([
      { slug: 'skerry', name: 'Skerry', isNew: false }, { slug: 'skerry', name: 'Skerry', isNew: false }, null, { slug: null, name: 'Lone', isNew: true }, { slug: null, name: 'Lone', isNew: true },
    ])
    expect(read[1]?.reading).toContain('Skerry, taken for the "DG 7" of the table, 16″ away')
    expect(read[2]?.problems[0]?.message).toMatch(/Skerry B of the catalogue lies 34\.\d° from the position in this row/)
    expect(read[4]?.reading).toContain('Lone (new), taken for the "Lone Alias" of the table, 3.6″ away')

    const { submission } = (await makeDraft(made.id)).ok<{ submission: number }>(201)
    const draft = (await curator.get(`/api/submissions/${submission}`)).ok<SubmissionAnswer>(200)
    expect(draft.items.map((i) => i.action)).toEqual(['galaxy.add', 'name.add', 'measurement.add', 'measurement.add', 'measurement.add', 'measurement.add'])
    expect(draft.items[0]?.payload).toMatchObject({ designation: 'Lone', names: ['Lone Alias'] })
    expect(draft.items[1]).toMatchObject({ payload: { galaxy: { slug: 'skerry' }, name: 'DG 7' }, galaxy: { slug: 'skerry' } })
  })

  it('are read from a wide table', async () => {
    const { ground, curator } = desk()
    const made = await upload('Name,RAJ2000,DEJ2000,Dist (Mpc),e_Dist,v_hel,Type,Ref\nWide A,01 20 00,+10 30 00,3.60,0.05,−120 ± 3,dSph,\nWide B,01:21:00,-10:30:00,,,130,,Ref+2022\n')
    const mapping = { ...made.mapping, constants: { ...made.mapping.constants, sourceId: ground.source, method: 'trgb' } }
    expect((await curator.patch(`/api/imports/${made.id}`, { mapping })).ok<ImportAnswer>(200)).toMatchObject({ rowsOk: 2, newGalaxies: 2, newSources: 1 })
    const { submission } = (await makeDraft(made.id)).ok<{ submission: number }>(201)
    const draft = (await curator.get(`/api/submissions/${submission}`)).ok<SubmissionAnswer>(200)
    expect(draft.items.map((i) => i.subject)).toEqual([
      'Wide A, a new galaxy', 'Wide B, a new galaxy', 'Wide A, distance modulus', 'Wide A, heliocentric velocity', 'Wide A, morphological type', 'Wide B, heliocentric velocity',
    ])
    expect(draft.items[0]?.payload).toMatchObject({ ra: 20, dec: 10.5, class: 'dwarf-spheroidal' })
  })
})

describe('the published sample', () => {
  const table = (name: string): string => readFileSync(new URL(`../reference/${name}`, import.meta.url), 'utf8')

  it('goes in through the import, and its satellites are those of the field', async () => {
    const { knex } = desk()
    const made = await upload(table('published.csv'), 'published.csv')
    expect(made).toMatchObject({ rows: 289, rowsBad: 0, rowsOk: 289, newGalaxies: 58 })
    const { submission, changes, left } = (await makeDraft(made.id, 'The published sample')).ok<{ submission: number; changes: number; left: number }>(201)
    expect([changes, left]).toEqual([289 + 58, 0])
    const approved = await approve(submission)
    expect(approved.state).toBe('approved')

    const { rows: held } = (await knex.raw(
      `SELECT g.name, coalesce(h.name, '') AS host FROM catalogue_rows g LEFT JOIN catalogue_rows h ON h.slug = g.host AND h.rev_to IS NULL WHERE g.rev_to IS NULL`,
    )) as { rows: { name: string; host: string }[] }
    const hostOf = new Map(held.map((r) => [r.name, r.host]))
    const wanted = table('membership.csv').trim().split('\n').slice(1).map((line) => line.split(','))
    expect(wanted.length).toBe(31)
    expect(wanted.map(([galaxy]) => [galaxy, hostOf.get(galaxy ?? '')])).toEqual(wanted.map(([galaxy, host]) => [galaxy, host]))
  })
})
