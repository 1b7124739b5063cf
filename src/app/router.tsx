import { type ComponentType, type ReactElement, type ReactNode, Suspense, lazy } from 'react'
import { Outlet, type RouteObject, matchRoutes, useRoutes } from 'react-router-dom'
import { Waiting } from '#src/ui/waiting.tsx'
import { Boundary } from './boundary.tsx'
import { NotFound } from './error-view.tsx'
import { SignedIn } from './layouts/signed-in.tsx'

type Load = () => Promise<{ Component: ComponentType }>

/** How to fetch what an element of a route stands for. */
const loads = new Map<ReactNode, Load>()

/** A screen that is fetched when it is first opened. */
function screen(load: Load): { element: ReactElement } {
  const Fetched = lazy(async () => ({ default: (await load()).Component }))
  const element = <Fetched />
  loads.set(element, load)
  return { element }
}

/** A frame around screens: what fails in one of them leaves the frame standing. */
function Screens(): ReactNode {
  return (
    <Boundary inFrame>
      <Outlet />
    </Boundary>
  )
}

/** Every address. */
const routes: RouteObject[] = [
  { path: 'sign-in', ...screen(() => import('./routes/sign-in.tsx')) },
  { path: 'reset', ...screen(() => import('./routes/reset.tsx')) },
  { path: 'join/:token', ...screen(() => import('./routes/join.tsx')) },
  { path: 'letters', ...screen(() => import('./routes/letters.tsx')) },
  {
    element: <SignedIn />,
    children: [
      {
        ...screen(async () => ({ Component: (await import('./layouts/studio-layout.tsx')).StudioLayout })),
        children: [
          {
            element: <Screens />,
            children: [
              { index: true, ...screen(() => import('./routes/shoots.tsx')) },
              { path: 'studio/:studioId/kit', ...screen(() => import('./routes/kit.tsx')) },
              { path: 'studio/:studioId/recipes', ...screen(() => import('./routes/recipes.tsx')) },
              { path: 'studio/:studioId/people', ...screen(() => import('./routes/studio-people.tsx')) },
              { path: 'me', ...screen(() => import('./routes/me.tsx')) },
            ],
          },
        ],
      },
      {
        path: 'shoots/:shootId',
        ...screen(async () => ({ Component: (await import('./layouts/shoot-layout.tsx')).ShootLayout })),
        children: [
          {
            element: <Screens />,
            children: [
              { index: true, ...screen(() => import('./routes/shoot-index.tsx')) },
              { path: 'brief', ...screen(() => import('./routes/brief.tsx')) },
              { path: 'board', ...screen(() => import('./routes/board.tsx')) },
              { path: 'board/versions/:versionId', ...screen(() => import('./routes/board-version.tsx')) },
              { path: 'looks', ...screen(() => import('./routes/looks.tsx')) },
              { path: 'sign-off', ...screen(() => import('./routes/sign-off.tsx')) },
              { path: 'lighting', ...screen(() => import('./routes/lighting.tsx')) },
              { path: 'lighting/:setupId', ...screen(() => import('./routes/setup.tsx')) },
              { path: 'order', ...screen(() => import('./routes/order.tsx')) },
              { path: 'day', ...screen(() => import('./routes/day.tsx')) },
              { path: 'people', ...screen(() => import('./routes/people.tsx')) },
            ],
          },
        ],
      },
    ],
  },
  { path: '*', element: <NotFound /> },
]

/**
 * Begins to fetch what an address needs, frame and screen at once, before the first is drawn. What cannot be fetched is
 * told where it is drawn.
 */
export function fetchAhead(pathname: string): void {
  for (const { route } of matchRoutes(routes, pathname) ?? []) {
    loads
      .get(route.element)?.()
      .catch(() => undefined)
  }
}

export function Screen() {
  return (
    <Boundary>
      <Suspense fallback={<Waiting />}>{useRoutes(routes)}</Suspense>
    </Boundary>
  )
}
