/** Every route there is. */
import { healthRoutes } from '../features/health/health.routes.ts'
import { sessionRoutes } from '../features/session/session.routes.ts'
import { trailRoutes } from '../features/trail/trail.routes.ts'
import type { Route } from './route.ts'

export const allRoutes: readonly Route[] = [...healthRoutes, ...sessionRoutes, ...trailRoutes]
