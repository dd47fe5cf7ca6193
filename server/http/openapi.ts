/** The interface as an OpenAPI 3.1 document, from the same schemas that read the requests. */
import { COLUMNS, type Column } from '../../core/columns.ts'
import { FILTER_PARAMETERS } from '../../core/filters/filter.ts'
import { PERMISSIONS } from '../../core/permissions.ts'
import { problemSchema } from '../../core/problem.ts'
import { jsonSchemaOf } from './json-schema.ts'
import type { Route, RouteDefinition } from './route.ts'

export type AnyRoute = RouteDefinition<unknown, unknown, unknown>
type Node = Record<string, unknown>

const FILTER_WORDS: Readonly<Record<(typeof FILTER_PARAMETERS)[number], string>> = {
  has: 'Columns that must have a value, separated by commas.',
  lacks: 'Columns that must lack a value.',
  q: 'Words searched for in every name, however it is written.',
  cone: 'A circle on the sky: ra,dec,radius in degrees, ICRS.',
  within: 'A sphere about a galaxy: its slug, then the radius in kpc.',
  columns: 'Columns wanted, in this order; all when left out.',
  sort: 'Columns to sort by; a hyphen before one sorts downwards.',
  limit: 'Rows a page, 1 to 500.',
  cursor: 'Where the page begins: `next` of the page before.',
  at: 'The label of a release, or (signed in) the number of a revision.',
}

/** What a column's parameter takes. */
const CONDITION: Readonly<Record<Column['type'], string>> = {
  choice: 'A list, any of; ! before it excludes.',
  text: 'A list, any of; ! before it excludes.',
  real: 'A range lo..hi, either end open.',
  integer: 'A range lo..hi, either end open.',
  time: 'A range of days (2026-03-01..), either end open.',
}

export function openApiOf(routes: readonly Route[]): Node {
  const paths: Record<string, Node> = {}
  const all = routes as readonly unknown[] as readonly AnyRoute[]
  for (const r of all) {
    const path = r.path.replace(/:(\w+)/g, '{$1}')
    paths[path] = { ...paths[path], [r.method]: operation(r) }
  }
  const tags = [...new Set(all.map((r) => tagOf(r.path)))]
  return {
    openapi: '3.1.0',
    info: { title: 'Vicinage', version: '1', description: 'The neighbour-galaxy atlas and data-curation desk. Errors are problem details (RFC 9457).' },
    tags: tags.map((name) => ({ name })),
    paths,
    components: {
      schemas: { Problem: jsonSchemaOf(problemSchema, 'output') },
      responses: { Problem: { description: 'What went wrong, and in which field', content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } } } },
      parameters: {
        csrf: { name: 'X-CSRF-Token', in: 'header', required: true, description: 'The `csrfToken` of the session, as signing in answered it.', schema: { type: 'string' } },
        ...Object.fromEntries(filterParameters().map((p) => [`filter.${p.name}`, p])),
      },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'vicinage.sid', description: 'Set by POST /api/session; over https its name begins with __Host-.' } },
    },
    'x-columns': COLUMNS.map(({ key, label, unit, ucd, type, description }) => ({ key, label, unit, ucd, type, description })),
  }
}

/** The heading under which a route belongs: the first part of its path. */
export function tagOf(path: string): string {
  return /^\/(?:api\/)?([a-z]+)/.exec(path)?.[1] ?? 'other'
}

function filterParameters(): { name: string; in: 'query'; description: string; schema: Node }[] {
  const parameter = (name: string, description: string): { name: string; in: 'query'; description: string; schema: Node } => ({ name, in: 'query', description, schema: { type: 'string' } })
  const columns = COLUMNS.map((c) => parameter(c.key, `${c.description}${c.unit === '' ? '' : ` In ${c.unit}.`} ${CONDITION[c.type]}`))
  return [...columns, ...FILTER_PARAMETERS.map((name) => parameter(name, FILTER_WORDS[name]))]
}

function operation(r: AnyRoute): Node {
  const open = (PERMISSIONS[r.permission] as readonly string[]).includes('visitor')
  return {
    operationId: operationId(r),
    tags: [tagOf(r.path)],
    summary: r.summary,
    description: `Permission \`${r.permission}\`: ${PERMISSIONS[r.permission].join(', ')}.`,
    security: open ? [{}, { session: [] }] : [{ session: [] }],
    parameters: parametersOf(r, open),
    ...bodyOf(r),
    responses: { [String(r.status ?? 200)]: answerOf(r), default: { $ref: '#/components/responses/Problem' } },
  }
}

/** `get-galaxies-slug-measurements` */
function operationId({ method, path }: AnyRoute): string {
  return [method, ...path.split(/[/.:]+/).filter((part) => part !== '' && part !== 'api')].join('-')
}

function parametersOf(r: AnyRoute, open: boolean): Node[] {
  const shape = r.params ? (jsonSchemaOf(r.params, 'output') as { properties?: Record<string, Node> }).properties : undefined
  const inPath = [...r.path.matchAll(/:(\w+)/g)].map(([, name = '']) => ({ name, in: 'path', required: true, schema: shape?.[name] ?? { type: 'string' } }))
  const query = r.query ? (jsonSchemaOf(r.query, 'input') as { properties?: Record<string, Node>; required?: string[] }) : {}
  const inQuery = Object.entries(query.properties ?? {}).map(([name, schema]) => ({ name, in: 'query', required: query.required?.includes(name) ?? false, schema }))
  const filters = r.filtered ? filterParameters().map((p) => ({ $ref: `#/components/parameters/filter.${p.name}` })) : []
  return [...inPath, ...inQuery, ...filters, ...(r.method === 'get' || open ? [] : [{ $ref: '#/components/parameters/csrf' }])]
}

function bodyOf(r: AnyRoute): Node {
  if (r.upload) {
    const schema = { type: 'object', required: [r.upload.field], properties: { [r.upload.field]: { type: 'string', format: 'binary', description: `At most ${r.upload.maxBytes} bytes.` } } }
    return { requestBody: { required: true, content: { 'multipart/form-data': { schema } } } }
  }
  return r.body ? { requestBody: { required: true, content: { 'application/json': { schema: jsonSchemaOf(r.body, 'input') } } } } : {}
}

function answerOf(r: AnyRoute): Node {
  return r.answer ? { description: 'Done', content: { 'application/json': { schema: jsonSchemaOf(r.answer, 'output') } } } : { description: 'Done' }
}
