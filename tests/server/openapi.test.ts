import { Validator } from '@seriousme/openapi-schema-validator'
import { beforeAll, describe, expect, it } from 'vitest'
import { COLUMNS } from '../../core/columns.ts'
import { layTheScale } from '../../seeds/genesis.ts'
import { placeGalaxy } from './harness/catalogue-rows.ts'
import { useServer } from './harness/server.ts'
import { walkedRoutes } from './harness/walk.ts'

const server = useServer({
  fill: async (knex, people) => {
    await knex.transaction((trx) => layTheScale(trx, null, new Date('2026-01-01T00:00:00Z')))
    await knex('releases').insert({ label: '2026.1', revision: 1, title: 'The first' })
    await placeGalaxy(knex, 1, { name: 'Ostrel', class: 'spiral', distance: 3, host_relation: 'host' })
    await placeGalaxy(knex, 1, { name: 'Ostrel I', class: 'dwarf-spheroidal', distance: 3.05, host: 'ostrel' })
    const [source] = (await knex('sources').insert({ label: 'Ansel 2021', title: 'On Ostrel', authors: JSON.stringify(['Ansel, B.']), year: 2021, kind: 'article' }).returning('id')) as { id: number }[]
    await knex('measurements').insert({ galaxy: 1, quantity: 'velocity', value: -120, errPlus: 3, errMinus: 3, source: source?.id, revFrom: 1 })
    await knex('figures').insert({ owner: people.steward.id, title: 'All', recipe: JSON.stringify({ view: 'sky' }) })
    await knex('submissions').insert({ author: people.steward.id, title: 'A draft', baseRevision: 1 })
  },
})

type Node = Record<string, unknown>
interface Document {
  paths: Record<string, Record<string, { operationId: string; parameters: { $ref?: string; name?: string }[]; requestBody?: unknown; responses: Node }>>
}
let document: Document
beforeAll(async () => {
  document = JSON.parse((await server().visitor().get('/api/openapi.json')).text) as Document
})

describe('GET /api/openapi.json', () => {
  it('is OpenAPI 3.1, by the standard’s own schema', async () => {
    const validator = new Validator()
    const result = await validator.validate(structuredClone(document) as unknown as Node)
    expect(result.errors).toBeUndefined()
    expect(result.valid).toBe(true)
    expect(validator.version).toBe('3.1')
  })

  it('refers to nothing that it does not hold', () => {
    const missing: string[] = []
    const look = (node: unknown): void => {
      if (typeof node !== 'object' || node === null) return
      for (const [key, value] of Object.entries(node)) {
        if (key === '$ref' && typeof value === 'string') {
          const found = value.replace(/^#\//, '').split('/').reduce<unknown>((at, part) => (at as Node | undefined)?.[part], document)
          if (!value.startsWith('#/') || found === undefined) missing.push(value)
        } else look(value)
      }
    }
    look(document)
    expect(missing).toEqual([])
  })

  it('describes every route, its body, and its parameters', () => {
    const described = Object.entries(document.paths).flatMap(([path, methods]) => Object.keys(methods).map((method) => `${method.toUpperCase()} ${path}`))
    expect(described.sort()).toEqual(walkedRoutes.map((w) => `${w.method} ${w.path.replace(/:(\w+)/g, '{$1}')}`).sort())
    const operations = Object.values(document.paths).flatMap((methods) => Object.values(methods))
    expect(new Set(operations.map((o) => o.operationId)).size).toBe(operations.length)
    for (const { title, method, path, route } of walkedRoutes) {
      const operation = document.paths[path.replace(/:(\w+)/g, '{$1}')]?.[method.toLowerCase()]
      expect(operation?.requestBody !== undefined, title).toBe(route.body !== undefined || route.upload !== undefined)
      for (const [, name] of path.matchAll(/:(\w+)/g)) expect(operation?.parameters.some((p) => p.name === name), title).toBe(true)
    }
  })

  it('has every column as a parameter of the list', () => {
    const refs = document.paths['/api/galaxies']?.get?.parameters.map((p) => p.$ref) ?? []
    for (const { key } of COLUMNS) expect(refs).toContain(`#/components/parameters/filter.${key}`)
  })
})

describe('answers', () => {
  const VALUES: Readonly<Record<string, string>> = { slug: 'ostrel', id: '1', label: '2026.1', format: 'csv' }
  const reads = walkedRoutes.filter((w) => w.method === 'GET' && w.route.answer)

  it('are many', () => {
    expect(reads.length).toBeGreaterThan(18)
  })

  it.each(reads.map((w) => [w.title, w] as const))('%s is as the interface says', async (_title, walked) => {
    const address = walked.path.replace(/:(\w+)/g, (_, name: string) => VALUES[name] ?? '1')
    const query = walked.path === '/api/resolve' ? '?name=ostrel' : ''
    const steward = await server().as('steward')
    const answer = await steward.get(`${address}${query}`)
    // There is no import in this catalogue.
    if (walked.path.startsWith('/api/imports/')) answer.problem(404)
    else if (walked.route.answer) answer.ok(walked.route.answer)
  })
})

describe('GET /api/docs', () => {
  it('is a page that names every route and column, and asks nothing of anybody else', async () => {
    const answer = await server().visitor().get('/api/docs')
    expect(answer.headers.get('content-type')).toBe('text/html; charset=utf-8')
    for (const { method, path } of walkedRoutes) expect(answer.text).toContain(`<h3>${method} ${path}</h3>`)
    for (const { key } of COLUMNS) expect(answer.text).toContain(`<code>${key}</code>`)
    expect(answer.text).not.toMatch(/<script|<link(?! rel="icon" href="\/mark\.svg")|src=|@import|url\(|https?:\/\/(?!127\.0\.0\.1)/)
  })
})
