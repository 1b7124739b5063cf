import { createBrowserRouter } from 'react-router-dom'
import { Waiting } from '#src/ui/waiting.tsx'
import { ErrorView, NotFound } from './error-view.tsx'
import { SignedIn } from './layouts/signed-in.tsx'

/** Every address. Screens are fetched when they are first opened. */
export const router = createBrowserRouter([
  {
    ErrorBoundary: ErrorView,
    HydrateFallback: Waiting,
    children: [
      { path: 'sign-in', lazy: () => import('./routes/sign-in.tsx') },
      { path: 'reset', lazy: () => import('./routes/reset.tsx') },
      { path: 'join/:token', lazy: () => import('./routes/join.tsx') },
      { path: 'letters', lazy: () => import('./routes/letters.tsx') },
      {
        Component: SignedIn,
        children: [
          {
            lazy: async () => ({ Component: (await import('./layouts/studio-layout.tsx')).StudioLayout }),
            children: [
              {
                ErrorBoundary: ErrorView,
                children: [
                  { index: true, lazy: () => import('./routes/shoots.tsx') },
                  { path: 'studio/:studioId/kit', lazy: () => import('./routes/kit.tsx') },
                  { path: 'studio/:studioId/people', lazy: () => import('./routes/studio-people.tsx') },
                  { path: 'me', lazy: () => import('./routes/me.tsx') },
                ],
              },
            ],
          },
          {
            path: 'shoots/:shootId',
            lazy: async () => ({ Component: (await import('./layouts/shoot-layout.tsx')).ShootLayout }),
            children: [
              {
                ErrorBoundary: ErrorView,
                children: [
                  { index: true, lazy: () => import('./routes/shoot-index.tsx') },
                  { path: 'brief', lazy: () => import('./routes/brief.tsx') },
                  { path: 'board', lazy: () => import('./routes/board.tsx') },
                  { path: 'looks', lazy: () => import('./routes/looks.tsx') },
                  { path: 'sign-off', lazy: () => import('./routes/sign-off.tsx') },
                  { path: 'lighting', lazy: () => import('./routes/lighting.tsx') },
                  { path: 'lighting/:setupId', lazy: () => import('./routes/setup.tsx') },
                  { path: 'day', lazy: () => import('./routes/day.tsx') },
                  { path: 'people', lazy: () => import('./routes/people.tsx') },
                ],
              },
            ],
          },
        ],
      },
      { path: '*', Component: NotFound },
    ],
  },
])
