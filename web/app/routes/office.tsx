import type { RouteObject } from 'react-router-dom'
import { paths } from '../../lib/paths.ts'

/** Demonstrations, registers, people, trial book, outbox and trail. */
export const officeRoutes: RouteObject[] = [
  { path: paths.demonstrations.pattern, lazy: () => import('./demonstrations.tsx') },
  { path: paths.planDemonstration.pattern, lazy: () => import('./plan-demonstration.tsx') },
  { path: paths.demonstration.pattern, lazy: () => import('./demonstration.tsx') },
  { path: paths.editDemonstration.pattern, lazy: () => import('./plan-demonstration.tsx') },
  { path: paths.book.pattern, lazy: () => import('./book.tsx') },
  { path: paths.registers.pattern, lazy: () => import('./registers.tsx') },
  { path: paths.register.pattern, lazy: () => import('./registers.tsx') },
  { path: paths.people.pattern, lazy: () => import('./people.tsx') },
  { path: paths.outbox.pattern, lazy: () => import('./outbox.tsx') },
  { path: paths.trail.pattern, lazy: () => import('./trail.tsx') },
  { path: paths.record.pattern, lazy: () => import('./record.tsx') },
]
