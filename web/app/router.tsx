import { createBrowserRouter, type RouteObject } from 'react-router-dom'
import { paths } from '../lib/paths.ts'
import { Loading } from '../ui/says.tsx'
import { onDemand } from './on-demand.tsx'
import { Home } from './routes/home.tsx'
import { officeRoutes } from './routes/office.tsx'
import { NotFound, RouteError } from './routes/route-error.tsx'
import { Shell } from './routes/shell.tsx'

/** A page fails alone: the folio stays, and the other sections work. */
const guarded = (routes: RouteObject[]): RouteObject[] =>
  routes.map((route) => ({ errorElement: <RouteError />, ...route }) as RouteObject)

/** Pages come in their own files when they are opened: a phone that sends photos does not carry the desk. */
export const routes: RouteObject[] = [
  {
    errorElement: <RouteError />,
    HydrateFallback: () => <Loading what="Opening the book" />,
    children: [
      { path: paths.signIn.pattern, lazy: onDemand(() => import('./routes/sign-in.tsx')) },
      { path: paths.forgotten.pattern, lazy: onDemand(() => import('./routes/request-link.tsx')) },
      { path: paths.link.pattern, lazy: onDemand(() => import('./routes/one-time-link.tsx')) },
      {
        element: <Shell />,
        children: guarded([
          { path: paths.home.pattern, element: <Home /> },
          { path: paths.send.pattern, lazy: onDemand(() => import('./routes/send.tsx')) },
          { path: paths.mySheets.pattern, lazy: onDemand(() => import('./routes/my-sheets.tsx')) },
          { path: paths.mySheet.pattern, lazy: onDemand(() => import('./routes/my-sheet.tsx')) },
          { path: paths.sheetReadOut.pattern, lazy: onDemand(() => import('./routes/read-out.tsx')) },
          { path: paths.desk.pattern, lazy: onDemand(() => import('./routes/desk-list.tsx')) },
          { path: paths.deskSheet.pattern, lazy: onDemand(() => import('./routes/desk-sheet.tsx')) },
          ...officeRoutes,
          { path: '*', element: <NotFound /> },
        ]),
      },
    ],
  },
]

export const createRouter = () => createBrowserRouter(routes)
