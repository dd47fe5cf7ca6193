/** Every route of the application, with an address at which it can be asked. */
import type { Permission } from '../../../core/permissions.ts'
import type { RouteDefinition } from '../../../server/http/route.ts'
import { routes } from '../../../server/routes/index.ts'

export type AnyRoute = RouteDefinition<unknown, unknown, unknown>

/** Values of path parameters: things that do not exist, so that walking changes nothing. */
const PARAMETERS: Readonly<Record<string, string>> = { id: '999999', n: '999999', slug: 'no-such-galaxy', label: 'no-such-release', format: 'csv', name: 'nothing' }

export interface WalkedRoute {
  title: string
  method: string
  path: string
  /** With the parameters filled in. */
  address: string
  permission: Permission
  route: AnyRoute
}

export const walkedRoutes: readonly WalkedRoute[] = (routes as readonly unknown[] as readonly AnyRoute[]).map((route) => ({
  title: `${route.method.toUpperCase()} ${route.path}`,
  method: route.method.toUpperCase(),
  path: route.path,
  address: route.path.replace(/:(\w+)/g, (_, name: string) => PARAMETERS[name] ?? '1'),
  permission: route.permission,
  route,
}))
