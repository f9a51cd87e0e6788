/** Every route there is. */
import { changeRoutes } from '../features/changes/changes.routes.ts'
import { comparisonRoutes } from '../features/comparisons/comparisons.routes.ts'
import { demonstrationRoutes } from '../features/demonstrations/demonstrations.routes.ts'
import { downloadRoutes } from '../features/downloads/downloads.routes.ts'
import { healthRoutes } from '../features/health/health.routes.ts'
import { landUnitRoutes } from '../features/land-units/land-units.routes.ts'
import { layoutRoutes } from '../features/layouts/layouts.routes.ts'
import { leafRoutes } from '../features/leaves/leaves.routes.ts'
import { mailRoutes } from '../features/mails/mails.routes.ts'
import { recordRoutes } from '../features/records/records.routes.ts'
import { registerRoutes } from '../features/registers/registers.routes.ts'
import { ruleRoutes } from '../features/rules/rules.routes.ts'
import { sessionRoutes } from '../features/session/session.routes.ts'
import { sheetRoutes } from '../features/sheets/sheets.routes.ts'
import { tokenRoutes } from '../features/tokens/tokens.routes.ts'
import { trailRoutes } from '../features/trail/trail.routes.ts'
import { uploadRoutes } from '../features/uploads/uploads.routes.ts'
import { passwordRoutes } from '../features/users/passwords.routes.ts'
import { userRoutes } from '../features/users/users.routes.ts'
import { webhookRoutes } from '../features/webhooks/webhooks.routes.ts'
import { openapiRoute } from './openapi.ts'
import type { Route } from './route.ts'

/** Each feature lists its own. */
const routes: readonly Route[] = [
  ...healthRoutes,
  ...sessionRoutes,
  ...passwordRoutes,
  ...userRoutes,
  ...registerRoutes,
  ...landUnitRoutes,
  ...uploadRoutes,
  ...demonstrationRoutes,
  ...layoutRoutes,
  ...sheetRoutes,
  ...recordRoutes,
  ...leafRoutes,
  ...ruleRoutes,
  ...comparisonRoutes,
  ...downloadRoutes,
  ...changeRoutes,
  ...tokenRoutes,
  ...webhookRoutes,
  ...mailRoutes,
  ...trailRoutes,
]

export const allRoutes: readonly Route[] = [...routes, openapiRoute(routes)]
