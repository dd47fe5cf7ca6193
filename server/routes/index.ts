/** Every route of the application. */
import type { Route } from '../http/route.ts'
import { auditRoutes } from './audit.ts'
import { exportRoutes } from './export.ts'
import { figureRoutes } from './figures.ts'
import { galaxyRoutes } from './galaxies.ts'
import { healthRoutes } from './health.ts'
import { hostRoutes } from './hosts.ts'
import { importRoutes } from './imports.ts'
import { openApiRoutes } from './openapi.ts'
import { releaseRoutes } from './releases.ts'
import { scaleRoutes } from './scale.ts'
import { sessionRoutes } from './session.ts'
import { sourceRoutes } from './sources.ts'
import { submissionRoutes } from './submissions.ts'
import { summaryRoutes } from './summary.ts'

export const routes: Route[] = [
  ...healthRoutes,
  ...sessionRoutes,
  ...summaryRoutes,
  ...galaxyRoutes,
  ...exportRoutes,
  ...hostRoutes,
  ...sourceRoutes,
  ...scaleRoutes,
  ...submissionRoutes,
  ...importRoutes,
  ...releaseRoutes,
  ...figureRoutes,
  ...auditRoutes,
  ...openApiRoutes(() => routes),
]
