/** The interface, described by itself. */
import { documentationPage } from '../http/documentation.ts'
import { openApiOf } from '../http/openapi.ts'
import { route, type Route } from '../http/route.ts'

/** @param all - every route of the application, these two among them */
export function openApiRoutes(all: () => readonly Route[]): Route[] {
  let document: unknown
  let page: string | undefined
  return [
    route({
      method: 'get', path: '/api/openapi.json', summary: 'This interface as OpenAPI 3.1', permission: 'session.use',
      handle: () => Promise.resolve((document ??= openApiOf(all()))),
    }),
    route({
      method: 'get', path: '/api/docs', summary: 'This interface, to read', permission: 'session.use',
      handle: ({ response, config }) => {
        response.type('html').send((page ??= documentationPage(all(), config.publicUrl)))
        return Promise.resolve(undefined)
      },
    }),
  ]
}
