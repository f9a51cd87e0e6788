import type { RouteObject } from 'react-router-dom'
import { paths } from '../../lib/paths.ts'
import { onDemand } from '../on-demand.tsx'

/** Demonstrations, registers, people, trial book, outbox and trail. */
export const officeRoutes: RouteObject[] = [
  { path: paths.demonstrations.pattern, lazy: onDemand(() => import('./demonstrations.tsx')) },
  { path: paths.planDemonstration.pattern, lazy: onDemand(() => import('./plan-demonstration.tsx')) },
  { path: paths.demonstration.pattern, lazy: onDemand(() => import('./demonstration.tsx')) },
  { path: paths.editDemonstration.pattern, lazy: onDemand(() => import('./plan-demonstration.tsx')) },
  { path: paths.book.pattern, lazy: onDemand(() => import('./book.tsx')) },
  { path: paths.compare.pattern, lazy: onDemand(() => import('./compare.tsx')) },
  { path: paths.registers.pattern, lazy: onDemand(() => import('./registers.tsx')) },
  { path: paths.register.pattern, lazy: onDemand(() => import('./registers.tsx')) },
  { path: paths.landUnits.pattern, lazy: onDemand(() => import('./land-units.tsx')) },
  { path: paths.rules.pattern, lazy: onDemand(() => import('./rules.tsx')) },
  { path: paths.people.pattern, lazy: onDemand(() => import('./people.tsx')) },
  { path: paths.outbox.pattern, lazy: onDemand(() => import('./outbox.tsx')) },
  { path: paths.interface.pattern, lazy: onDemand(() => import('./interface.tsx')) },
  { path: paths.tokens.pattern, lazy: onDemand(() => import('./tokens.tsx')) },
  { path: paths.webhooks.pattern, lazy: onDemand(() => import('./webhooks.tsx')) },
  { path: paths.trail.pattern, lazy: onDemand(() => import('./trail.tsx')) },
  { path: paths.readOut.pattern, lazy: onDemand(() => import('./read-out.tsx')) },
  { path: paths.record.pattern, lazy: onDemand(() => import('./record.tsx')) },
]
