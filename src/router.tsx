import { createBrowserRouter, type LazyRouteFunction, Navigate, type RouteObject } from 'react-router-dom';
import { RouteProblem } from './pages/RouteProblem';
import { SignedIn } from './pages/SignedIn';

type Lazy = LazyRouteFunction<RouteObject>;

/** Pages that need no account. */
const open: [path: string, lazy: Lazy][] = [
  ['/setup', async () => ({ Component: (await import('./pages/setup/SetUpPage')).SetUpPage })],
  ['/sign-in', async () => ({ Component: (await import('./pages/signIn/SignInPage')).SignInPage })],
  ['/forgot', async () => ({ Component: (await import('./pages/signIn/ForgotPage')).ForgotPage })],
  ['/reset', async () => ({ Component: (await import('./pages/signIn/ResetPage')).ResetPage })],
  ['/invite', async () => ({ Component: (await import('./pages/signIn/InvitePage')).InvitePage })],
  ['/mail', async () => ({ Component: (await import('./pages/mail/MailPage')).MailPage })],
];

/** Pages of the crew. */
const crew: [path: string, lazy: Lazy][] = [
  ['/shows', async () => ({ Component: (await import('./pages/shows/ShowsPage')).ShowsPage })],
  ['/shows/:showId', async () => ({ Component: (await import('./pages/plan/PlanPage')).PlanPage })],
  [
    '/shows/:showId/scenes',
    async () => ({ Component: (await import('./pages/scenes/ScenesPage')).ScenesPage }),
  ],
  [
    '/shows/:showId/scenes/:sceneId',
    async () => ({ Component: (await import('./pages/scenes/ScenePage')).ScenePage }),
  ],
  [
    '/shows/:showId/outputs',
    async () => ({ Component: (await import('./pages/outputs/OutputsPage')).OutputsPage }),
  ],
  [
    '/shows/:showId/lookout',
    async () => ({ Component: (await import('./pages/lookout/LookoutPage')).LookoutPage }),
  ],
  [
    '/shows/:showId/rehearsal',
    async () => ({ Component: (await import('./pages/rehearsal/RehearsalPage')).RehearsalPage }),
  ],
  ['/shows/:showId/live', async () => ({ Component: (await import('./pages/live/LivePage')).LivePage })],
  [
    '/shows/:showId/handset',
    async () => ({ Component: (await import('./pages/handset/HandsetPage')).HandsetPage }),
  ],
  ['/library', async () => ({ Component: (await import('./pages/library/LibraryPage')).LibraryPage })],
  ['/crew', async () => ({ Component: (await import('./pages/crew/CrewPage')).CrewPage })],
];

const route = ([path, lazy]: [string, Lazy]): RouteObject => ({ path, lazy });

/** Every page of the program. /display is an entry of its own. */
export const routes: RouteObject[] = [
  {
    errorElement: <RouteProblem />,
    HydrateFallback: () => null,
    children: [
      { path: '/', element: <Navigate to="/shows" replace /> },
      ...open.map(route),
      { element: <SignedIn />, children: crew.map(route) },
      { path: '*', element: <RouteProblem /> },
    ],
  },
];

export const router = createBrowserRouter(routes);
