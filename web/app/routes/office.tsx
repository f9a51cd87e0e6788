import type { RouteObject } from 'react-router-dom'

/** Demonstrations, registers, people, trial book, outbox and trail: `{ path: paths.book.pattern, lazy: () => import('./book.tsx') }`. */
export const officeRoutes: RouteObject[] = []
