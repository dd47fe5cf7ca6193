/** The interface, described by itself. */
import { COLUMNS } from '../../core/columns.ts'
import { jsonSchemaOf } from '../http/json-schema.ts'
import { problemSchema } from '../../core/problem.ts'
import { route, type Route, type RouteDefinition } from '../http/route.ts'
import { documentationPage } from '../http/documentation.ts'

type AnyRoute = RouteDefinition<unknown, unknown, unknown>

/** OpenAPI 3.1 of a list of routes, from the same schemas that read the requests. */
export function openApiOf(routes: readonly Route[]): Record<string, unknown> {
  const paths: Record<string, Record<string, unknown>> = {}
  for (const r of routes as readonly unknown[] as readonly AnyRoute[]) {
    const path = r.path.replace(/:(\w+)/g, '{$1}')
    paths[path] = { ...paths[path], [r.method]: operation(r) }
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Vicinage', version: '1', description: 'The neighbour-galaxy atlas and data-curation desk. Errors are problem details (RFC 9457).' },
    paths,
    components: { schemas: { Problem: jsonSchemaOf(problemSchema, 'output') } },
    'x-columns': COLUMNS.map(({ key, label, unit, ucd, type, description }) => ({ key, label, unit, ucd, type, description })),
  }
}

function operation(r: AnyRoute): Record<string, unknown> {
  const parameters = [...r.path.matchAll(/:(\w+)/g)].map(([, name]) => ({ name, in: 'path', required: true, schema: { type: 'string' } }))
  const query = r.query ? (jsonSchemaOf(r.query, 'input') as { properties?: Record<string, unknown>; required?: string[] }) : {}
  const queries = Object.entries(query.properties ?? {}).map(([name, schema]) => ({ name, in: 'query', required: query.required?.includes(name) ?? false, schema }))
  const ok = r.answer ? { description: 'Done', content: { 'application/json': { schema: jsonSchemaOf(r.answer, 'output') } } } : { description: 'Done' }
  return {
    summary: r.summary,
    'x-permission': r.permission,
    parameters: [...parameters, ...queries],
    ...(r.body && { requestBody: { required: true, content: { 'application/json': { schema: jsonSchemaOf(r.body, 'input') } } } }),
    ...(r.upload && { requestBody: { required: true, content: { 'multipart/form-data': { schema: { type: 'object', properties: { [r.upload.field]: { type: 'string', format: 'binary' } } } } } } }),
    responses: { [String(r.status ?? 200)]: ok, default: { description: 'A problem', content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } } } },
  }
}

/** @param all - every route of the application, these two among them */
export function openApiRoutes(all: () => readonly Route[]): Route[] {
  return [
    route({
      method: 'get', path: '/api/openapi.json', summary: 'This interface as OpenAPI 3.1', permission: 'catalogue.read',
      handle: () => Promise.resolve(openApiOf(all())),
    }),
    route({
      method: 'get', path: '/api/docs', summary: 'This interface, to read', permission: 'catalogue.read',
      handle: ({ response }) => {
        response.type('html').send(documentationPage(all()))
        return Promise.resolve(undefined)
      },
    }),
  ]
}
