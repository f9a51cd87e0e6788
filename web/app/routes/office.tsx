import type { RouteObject } from 'react-router-dom'
import { paths } from '../../lib/paths.ts'

/** Demonstrations, registers, people, trial book, outbox and trail. */
export const officeRoutes: RouteObject[] = [
  { path: paths.book.pattern, lazy: () => import('./book.tsx') },
  { path: paths.record.pattern, lazy: () => import('./record.tsx') },
]
