import { gzipSync } from 'node:zlib'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Problem } from '../../core/problem.ts'
import { footprint } from './desk/catalogue.ts'
import { makeRevision, placeGalaxy } from './harness/catalogue-rows.ts'
import type { Client, Sending } from './harness/client.ts'
import { useServer } from './harness/server.ts'
import { walkedRoutes } from './harness/walk.ts'

const server = useServer({
  fill: async (knex) => {
    await makeRevision(knex, 1, { release: '2026.1' })
    await placeGalaxy(knex, 1, { name: 'Ostrel', distance: 3 })
  },
})

const source = { title: 'A title', authors: ['Ansel, B.'], year: 2021 }
const json = (raw: string | Uint8Array, headers: Record<string, string> = {}): Sending => ({ raw, headers: { 'content-type': 'application/json', ...headers } })
const nested = (depth: number): string => `${'['.repeat(depth)}1${']'.repeat(depth)}`

/** What is sent, the status it gets, and the path of the field that the document names ('' for the body as a whole; null for none). */
const BODIES: [string, string, string, Sending, number, string | null][] = [
  ['no JSON', 'POST', '/api/sources', json('{"title": '), 400, ''],
  ['a word', 'POST', '/api/sources', json('hello'), 400, ''],
  ['a bare string', 'POST', '/api/sources', json('"hello"'), 400, ''],
  ['a bare number', 'POST', '/api/sources', json('12'), 400, ''],
  ['a bare null', 'POST', '/api/sources', json('null'), 400, ''],
  ['a list', 'POST', '/api/sources', json('[]'), 400, ''],
  ['nothing at all', 'POST', '/api/sources', {}, 400, ''],
  ['an empty body that says JSON', 'POST', '/api/sources', json(''), 400, 'title'],
  ['an empty object', 'POST', '/api/sources', json('{}'), 400, 'title'],
  ['two values', 'POST', '/api/sources', json('{}{}'), 400, ''],
  ['NaN', 'POST', '/api/sources', json('{"title":"a","authors":["b"],"year":NaN}'), 400, ''],
  ['a byte order mark and a word', 'POST', '/api/sources', json('\uFEFFhello'), 400, ''],
  ['text', 'POST', '/api/sources', { raw: 'title=x', headers: { 'content-type': 'text/plain' } }, 415, null],
  ['a form', 'POST', '/api/sources', { raw: 'title=x', headers: { 'content-type': 'application/x-www-form-urlencoded' } }, 415, null],
  ['no content type', 'POST', '/api/sources', { raw: new Uint8Array([123, 125]) }, 415, null],
  ['XML', 'POST', '/api/sources', { raw: '<title/>', headers: { 'content-type': 'application/xml' } }, 415, null],
  ['an unknown charset', 'POST', '/api/sources', json('{}', { 'content-type': 'application/json; charset=klingon' }), 415, null],
  ['UTF-16', 'POST', '/api/sources', { raw: Buffer.from(JSON.stringify({ ...source, title: 'ü' }), 'utf16le'), headers: { 'content-type': 'application/json; charset=utf-16le' } }, 400, ''],
  ['an unknown encoding', 'POST', '/api/sources', json('{}', { 'content-encoding': 'snappy' }), 415, null],
  ['gzip that is none', 'POST', '/api/sources', json('{}', { 'content-encoding': 'gzip' }), 400, null],
  ['a small body that unpacks to a large one', 'POST', '/api/sources', json(gzipSync(Buffer.alloc(30e6, 32)), { 'content-encoding': 'gzip' }), 413, null],
  ['bytes that are no UTF-8', 'POST', '/api/sources', json(Buffer.concat([Buffer.from('{"title":"'), Buffer.from([0xc3, 0x28, 0xff]), Buffer.from('"}')])), 400, ''],
  ['a surrogate in UTF-8', 'POST', '/api/sources', json(Buffer.concat([Buffer.from('{"title":"'), Buffer.from([0xed, 0xa0, 0x80]), Buffer.from('"}')])), 400, ''],
  ['half of a character', 'POST', '/api/sources', json(JSON.stringify({ ...source, title: 'A \ud800 title' })), 400, 'title'],
  ['a NUL', 'POST', '/api/sources', { body: { ...source, title: 'A\u0000title' } }, 400, 'title'],
  ['a NUL in a list', 'POST', '/api/sources', { body: { ...source, authors: ['Ansel', 'B\u0000rk'] } }, 400, 'authors.1'],
  ['a NUL in a key', 'POST', '/api/sources', { body: { ...source, 'ti\u0000tle': 1 } }, 400, ''],
  ['a very long body', 'POST', '/api/sources', { body: { ...source, title: 'x'.repeat(3e6) } }, 413, null],
  ['a long title', 'POST', '/api/sources', { body: { ...source, title: 'x'.repeat(401) } }, 400, 'title'],
  ['a title of blanks', 'POST', '/api/sources', { body: { ...source, title: ' \t\n ' } }, 400, 'title'],
  ['a deep value', 'POST', '/api/sources', json(`{"title":${nested(40)}}`), 400, 'title.0.0'],
  ['a bottomless value', 'POST', '/api/sources', json(`{"title":${nested(200_000)}}`), 400, 'title.0.0'],
  ['a deep recipe', 'POST', '/api/figures', json(`{"title":"a","recipe":{"view":${nested(40)}}}`), 400, 'recipe.view.0'],
  ['another type', 'POST', '/api/sources', { body: { ...source, title: { is: 'a title' } } }, 400, 'title'],
  ['a year as text', 'POST', '/api/sources', { body: { ...source, year: '2021' } }, 400, 'year'],
  ['half a year', 'POST', '/api/sources', { body: { ...source, year: 2021.5 } }, 400, 'year'],
  ['a year beyond numbers', 'POST', '/api/sources', json(JSON.stringify(source).replace('2021', '1e400')), 400, 'year'],
  ['a year beyond integers', 'POST', '/api/sources', { body: { ...source, year: 2 ** 53 + 2 } }, 400, 'year'],
  ['a negative year', 'POST', '/api/sources', { body: { ...source, year: -1 } }, 400, 'year'],
  ['no authors', 'POST', '/api/sources', { body: { ...source, authors: [] } }, 400, 'authors'],
  ['too many authors', 'POST', '/api/sources', { body: { ...source, authors: Array.from({ length: 3001 }, () => 'A') } }, 400, 'authors'],
  ['authors as an object', 'POST', '/api/sources', { body: { ...source, authors: { 0: 'A', length: 1 } } }, 400, 'authors'],
  ['a field too many', 'POST', '/api/sources', { body: { ...source, id: 1 } }, 400, ''],
  ['a field that is nobody’s to set', 'POST', '/api/sources', { body: { ...source, createdBy: 1 } }, 400, ''],
  ['__proto__', 'POST', '/api/sources', json(`{"title":"a","authors":["b"],"year":2021,"__proto__":{"kind":"private"}}`), 400, ''],
  ['constructor', 'POST', '/api/sources', json(`{"title":"a","authors":["b"],"year":2021,"constructor":{"prototype":{"admin":true}}}`), 400, ''],
  ['a bad bibcode', 'POST', '/api/sources', { body: { ...source, bibcode: '2005ApJ' } }, 400, 'bibcode'],
  ['a bad DOI', 'POST', '/api/sources', { body: { ...source, doi: 'doi:10.1086/430903' } }, 400, 'doi'],
  ['a script as an address', 'POST', '/api/sources', { body: { ...source, url: 'javascript:alert(1)' } }, 400, 'url'],
  ['a kind that is none', 'POST', '/api/sources', { body: { ...source, kind: 'rumour' } }, 400, 'kind'],
  ['a kind of the demonstration', 'POST', '/api/sources', { body: { ...source, kind: 'demonstration' } }, 400, 'kind'],
  ['an address that is none', 'POST', '/api/session', { body: { email: 'curator', password: 'x' } }, 400, 'email'],
  ['an endless address', 'POST', '/api/session', { body: { email: `${'a'.repeat(300)}@people.test`, password: 'x' } }, 400, 'email'],
  ['an address in a list', 'POST', '/api/session', { body: { email: ['curator@people.test'], password: 'x' } }, 400, 'email'],
  ['an endless password', 'POST', '/api/session', { body: { email: 'curator@people.test', password: 'x'.repeat(1025) } }, 400, 'password'],
  ['an empty password', 'POST', '/api/session', { body: { email: 'curator@people.test', password: '' } }, 400, 'password'],
  ['a query as password', 'POST', '/api/session', { body: { email: 'curator@people.test', password: { $ne: null } } }, 400, 'password'],
  ['a role with the sign-in', 'POST', '/api/session', { body: { email: 'curator@people.test', password: 'x', roles: ['steward'] } }, 400, ''],
  ['a bad label', 'POST', '/api/releases', { body: { label: '../etc', title: 'x' } }, 400, 'label'],
  ['a label with a line break', 'POST', '/api/releases', { body: { label: '2026.2\nx', title: 'x' } }, 400, 'label'],
  ['a release of somebody else', 'POST', '/api/releases', { body: { label: '2026.2', title: 'x', publishedBy: 1 } }, 400, ''],
  ['a recipe without a view', 'POST', '/api/figures', { body: { title: 'x', recipe: {} } }, 400, 'recipe.view'],
  ['a recipe that is a word', 'POST', '/api/figures', { body: { title: 'x', recipe: 'sky' } }, 400, 'recipe'],
  ['a recipe with a key too many', 'POST', '/api/figures', { body: { title: 'x', recipe: { view: 'sky', script: 'x' } } }, 400, 'recipe'],
  ['a figure for somebody else', 'POST', '/api/figures', { body: { title: 'x', recipe: { view: 'sky' }, owner: 1 } }, 400, ''],
  ['a format that is none', 'POST', '/api/figures/render', { body: { recipe: { view: 'sky' }, format: 'exe' } }, 400, 'format'],
  ['a picture of a kilometre', 'POST', '/api/figures/render', { body: { recipe: { view: 'sky', widthMm: 1e6 }, format: 'png' } }, 400, 'recipe.widthMm'],
  ['more pixels than can be drawn', 'POST', '/api/figures/render', { body: { recipe: { view: 'plane', widthMm: 420, dpi: 1200 }, format: 'png' } }, 400, 'recipe.dpi'],
  ['a filter in a recipe that is none', 'POST', '/api/figures/render', { body: { recipe: { view: 'sky', filter: 'distnace=2..5' }, format: 'svg' } }, 400, 'recipe.filter.distnace'],
  ['a figure’s change of nothing', 'PATCH', '/api/figures/1', { body: {} }, 400, ''],
]

/** Addresses, and the status each gets. */
const ADDRESSES: [string, number][] = [
  ['/api/sources/0', 404], ['/api/sources/-1', 404], ['/api/sources/1.5', 404], ['/api/sources/1e3', 404], ['/api/sources/99999999999999999999', 404], ['/api/sources/NaN', 404],
  ['/api/sources/%31%27%20or%201=1', 404], ['/api/sources/%00', 400], ['/api/sources/%ff', 400], ['/api/sources/%', 400], ['/api/sources/1%00', 400],
  ['/api/figures/2147483648', 404], ['/api/figures/12', 404], ['/api/galaxies/%c3%28', 400], ['/api/galaxies/a%00b', 400], [`/api/galaxies/${'x'.repeat(5000)}`, 404],
  ['/api/releases/..%2f..%2fetc', 404], ['/api/releases/%f0%9f%9a%80', 404], [`/api/releases/${'9'.repeat(41)}`, 404],
  ['/api/sources?q=%ff', 400], ['/api/sources?q=%00', 400], ['/api/sources?q=a&q=b', 400], ['/api/sources?__proto__=x', 400], ['/api/sources?q[]=a', 400], ['/api/sources?limit=5', 400],
  [`/api/sources?q=${'x'.repeat(201)}`, 400], ['/api/sources?q=%25%27%22%5c', 200], ['/api/sources?q=%F0%9F%9A%80', 200], ['/api/sources?at=zz%20z', 400], ['/api/sources?at=nothing', 404], ['/api/sources?at=77', 404],
  ['/api/scale?at=0', 400], ['/api/scale?at=99999999999', 400], ['/api/scale?at=1;drop', 400], ['/api/summary?at=%27', 400], ['/api/summary?until=1', 400],
  ['/api/audit?before=x', 400], ['/api/audit?limit=0', 400], ['/api/audit?limit=501', 400], ['/api/audit?limit=1e400', 400], ['/api/audit?before=-3', 400], ['/api/audit?action=%00', 400], ['/api/audit?sort=id;drop', 400],
  ['/api/galaxies?sort=id;drop', 400], ['/api/galaxies?limit=1e9', 400], ['/api/galaxies?cursor=zzz', 400], ['/api/galaxies?cone=1,2', 400], ['/api/galaxies?cone=NaN,0,1', 400], ['/api/galaxies?cone=0,91,1', 400],
  ['/api/galaxies?distance=5..2', 400], ['/api/galaxies?distance=１２', 400], ['/api/galaxies?columns=password_hash', 400], ['/api/galaxies?q=%ff', 400], ['/api/galaxies?%ff=1', 400],
  ['/api/nothing', 404], ['/api//sources', 404], ['/api/sources/1/2/3', 404], ['/api/%2e%2e/%2e%2e/etc/passwd', 404], ['/nothing.php', 404],
]

describe('what cannot be taken', () => {
  let steward: Client | undefined
  let before = ''
  beforeAll(async () => {
    steward = await server().as('steward')
    before = await footprint(server().knex)
  })
  const asked = async (method: string, path: string, sending?: Sending): Promise<{ status: number; problem: () => Problem; text: string }> => {
    if (!steward) throw new Error('nobody asks')
    const answer = await steward.send(method, path, sending)
    return { status: answer.status, text: answer.text, problem: () => answer.problem(answer.status) }
  }

  it.each(BODIES)('%s: %s %s', async (_what, method, path, sending, status, field) => {
    const answer = await asked(method, path, sending)
    expect(answer.status, answer.text).toBe(status)
    const problem = answer.problem()
    expect(problem.detail).toMatch(/Nothing was (changed|added|drawn|made|published|kept)/)
    if (field !== null) {
      expect(problem.errors?.map((e) => e.path)).toContain(field)
      for (const { message } of problem.errors ?? []) expect(message).toMatch(/\w{3}/)
    }
    expect(problem.instance).toMatch(/^[0-9a-f-]{36}$/)
    expect(answer.text).not.toMatch(/node_modules|\bat \w+ \(|select |insert |\/server\//i)
    expect(await footprint(server().knex)).toBe(before)
  })

  it.each(ADDRESSES)('GET %s is %i', async (path, status) => {
    const answer = await asked('GET', path)
    expect(answer.status, answer.text).toBe(status)
    if (status !== 200) expect(answer.problem().detail.length).toBeGreaterThan(10)
    expect(answer.text).not.toMatch(/node_modules|\bat \w+ \(|select |\/server\//i)
  })

  it.each(walkedRoutes.filter((w) => w.route.body).map((w) => [w.title, w] as const))('%s never fails of a hostile body', async (title, { method, address }) => {
    const bodies: Sending[] = [
      json('{'), json('[]'), json('""'), json('{"a":"\\u0000"}'), json('{"a":"\\ud800"}'), json(nested(5000)), json(Buffer.from([0xff, 0xfe])), json('{"__proto__":null}'),
      { raw: '{}', headers: { 'content-type': 'text/html' } }, { body: { lockVersion: 1e308, contentHash: ['x'], title: 0, changes: [null], payload: [], action: {}, mapping: 7, recipe: null } },
    ]
    for (const sending of bodies) {
      const answer = await asked(method, address, sending)
      expect([400, 404, 415], `${title} ${String(sending.raw).slice(0, 40)}: ${answer.text.slice(0, 300)}`).toContain(answer.status)
      answer.problem()
    }
  })

  it.each(walkedRoutes.filter((w) => w.method === 'GET').map((w) => [w.title, w] as const))('%s never fails of a hostile query', async (title, { address }) => {
    for (const query of ['%ff', 'at=%00', 'at=-1', 'at=1e9', 'q=%F0%9F%92%A9', 'limit=-1', 'cursor=%7B%7D', '__proto__=1', 'at=1&at=2', `q=${'a'.repeat(6000)}`, 'name=%27%3B--', 'state=zzz', 'mine=maybe']) {
      const answer = await asked('GET', `${address}?${query}`)
      expect(answer.status, `${title}?${query.slice(0, 40)}: ${answer.text.slice(0, 300)}`).toBeLessThan(500)
      if (answer.status >= 400) answer.problem()
    }
  })

  it('has more than sixty of them', () => {
    expect(BODIES.length).toBeGreaterThan(60)
  })
})

describe('uploads that are none', () => {
  const LIMIT = walkedRoutes.find((w) => w.title === 'POST /api/imports')?.route.upload?.maxBytes ?? 0
  const part = (head: string, content: string): string => `--x\r\n${head}\r\n\r\n${content}\r\n`
  const named = (name: string): string => `Content-Disposition: form-data; name="file"; filename="${name}"`
  const table = 'galaxy,value\nOstrel,27.5\n'

  it.each<[string, string, string, number]>([
    ['JSON', 'application/json', '{}', 415],
    ['a form that is not multipart', 'application/x-www-form-urlencoded', 'file=x', 415],
    ['no boundary', 'multipart/form-data', part(named('a.csv'), table), 400],
    ['another boundary', 'multipart/form-data; boundary=y', `${part(named('a.csv'), table)}--x--\r\n`, 400],
    ['an end that is missing', 'multipart/form-data; boundary=x', part(named('a.csv'), table), 400],
    ['a head that is missing', 'multipart/form-data; boundary=x', '--x\r\n\r\nabc\r\n--x--\r\n', 400],
    ['no file', 'multipart/form-data; boundary=x', `${part('Content-Disposition: form-data; name="file"', 'a word')}--x--\r\n`, 400],
    ['a file in another field', 'multipart/form-data; boundary=x', `${part(named('a.csv').replace('name="file"', 'name="other"'), table)}--x--\r\n`, 400],
    ['two files', 'multipart/form-data; boundary=x', `${part(named('a.csv'), table)}${part(named('b.csv'), table)}--x--\r\n`, 400],
    ['an empty file', 'multipart/form-data; boundary=x', `${part(named('a.csv'), '')}--x--\r\n`, 400],
    ['a hundred fields', 'multipart/form-data; boundary=x', `${Array.from({ length: 100 }, (_, i) => part(`Content-Disposition: form-data; name="f${i}"`, 'x')).join('')}--x--\r\n`, 400],
    ['a picture by another name', 'multipart/form-data; boundary=x', `${part(named('a.csv'), '\u0089PNG\r\n\u001a\n\u0000\u0000\u0000\rIHDR\u0000')}--x--\r\n`, 400],
    ['a file too large', 'multipart/form-data; boundary=x', `${part(named('a.csv'), 'x'.repeat(LIMIT + 1))}--x--\r\n`, 413],
  ])('%s', async (what, type, raw, status) => {
    const curator = await server().as('curator')
    const before = await footprint(server().knex)
    const answer = await curator.send('POST', '/api/imports', { raw, headers: { 'content-type': type } })
    expect(answer.status, `${what}: ${answer.text}`).toBe(status)
    expect(answer.problem(status).detail).toMatch(/Nothing was kept/)
    expect(await footprint(server().knex)).toBe(before)
  })

  it.each(['../../etc/passwd', '..\\\\..\\\\x.csv', 'a\u0000b.csv', `${'x'.repeat(400)}.csv`, '<img src=x>.csv', 'naïve 日本.csv', '.csv', 'con.csv'])('the name %j does no harm', async (name) => {
    const curator = await server().as('curator')
    const answer = await curator.upload('/api/imports', 'file', name, table)
    expect([201, 400], answer.text).toContain(answer.status)
    if (answer.status === 201) expect((JSON.parse(answer.text) as { fileName: string }).fileName).not.toMatch(/[\\/\u0000]/)
  })
})

describe('methods', () => {
  it.each(['PUT', 'PATCH', 'DELETE', 'POST'])('%s where it has no meaning is 405 and says what has', async (method) => {
    const answer = await server().visitor().send(method, '/api/summary')
    expect(answer.problem(405).detail).toContain('GET')
    expect(answer.headers.get('allow')).toBe('GET, HEAD, OPTIONS')
  })

  it('OPTIONS says what an address can', async () => {
    const answer = await server().visitor().send('OPTIONS', '/api/sources')
    expect(answer.status).toBe(204)
    expect(answer.headers.get('allow')).toBe('GET, POST, HEAD, OPTIONS')
  })

  it('HEAD answers as GET does, without the body', async () => {
    for (const path of ['/api/health', '/api/summary', '/api/galaxies', '/api/releases/2026.1', '/api/docs']) {
      const [head, get] = [await server().visitor().send('HEAD', path), await server().visitor().get(path)]
      expect(head.status, path).toBe(get.status)
      expect(head.bytes).toHaveLength(0)
      expect(head.headers.get('content-type')).toBe(get.headers.get('content-type'))
    }
  })
})
