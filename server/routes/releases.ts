/** Releases. */
import { z } from 'zod'
import { releaseInputSchema, releaseListSchema, releaseSchema } from '../../core/schema/releases.ts'
import { route, type Route } from '../http/route.ts'
import { listReleases, publish, releaseByLabel } from '../services/releases.ts'

export const releaseRoutes: Route[] = [
  route({
    method: 'get', path: '/api/releases', summary: 'Releases, newest first', permission: 'catalogue.read', answer: releaseListSchema,
    handle: (context) => listReleases(context, context.reader),
  }),
  route({
    method: 'post', path: '/api/releases', summary: 'Publish the current revision under a label', permission: 'release.publish', body: releaseInputSchema, answer: releaseSchema, status: 201,
    handle: (context) => publish(context, context.reader, context.body),
  }),
  route({
    method: 'get', path: '/api/releases/:label', summary: 'One release', permission: 'catalogue.read', params: z.object({ label: z.string().min(1).max(40) }), answer: releaseSchema,
    handle: (context) => releaseByLabel(context, context.params.label),
  }),
]
