import { createBrowserRouter, Navigate, type RouteObject } from 'react-router-dom';
import { ErrorPage } from './ErrorPage.tsx';
import { GateLayout } from './GateLayout.tsx';
import { NotFoundPage } from './NotFoundPage.tsx';
import { ProjectLayout } from './ProjectLayout.tsx';
import { RequireSession } from './RequireSession.tsx';
import { Root } from './Root.tsx';
import { WorkspaceLayout } from './WorkspaceLayout.tsx';

/** A screen whose code is fetched when somebody goes there. */
const screen =
  (load: () => Promise<{ default: React.ComponentType }>): NonNullable<RouteObject['lazy']> =>
  async () => ({ Component: (await load()).default });

const gate: RouteObject[] = [
  {
    path: 'sign-in',
    lazy: screen(() => import('#src/features/session/components/SignInPage.tsx')),
  },
  {
    path: 'reset-request',
    lazy: screen(() => import('#src/features/session/components/ResetRequestPage.tsx')),
  },
  { path: 'reset', lazy: screen(() => import('#src/features/session/components/ResetPage.tsx')) },
  {
    path: 'invitation',
    lazy: screen(() => import('#src/features/session/components/InvitationPage.tsx')),
  },
];

const workspace: RouteObject[] = [
  {
    path: 'projects',
    lazy: screen(() => import('#src/features/projects/components/ProjectsPage.tsx')),
  },
  {
    path: 'projects/new',
    lazy: screen(() => import('#src/features/projects/components/NewProjectPage.tsx')),
  },
  {
    path: 'activity',
    lazy: screen(() => import('#src/features/activity/components/ActivityPage.tsx')),
  },
  { path: 'team', lazy: screen(() => import('#src/features/team/components/TeamPage.tsx')) },
  {
    path: 'team/mail',
    lazy: screen(() => import('#src/features/team/components/SentMailPage.tsx')),
  },
  {
    path: 'account',
    lazy: screen(() => import('#src/features/account/components/AccountPage.tsx')),
  },
  { path: '*', Component: NotFoundPage },
];

const project: RouteObject[] = [
  { index: true, element: <Navigate to="frame" replace /> },
  { path: 'frame', lazy: screen(() => import('#src/features/frame/components/FramePage.tsx')) },
  { path: 'modes', lazy: screen(() => import('#src/features/modes/components/ModesPage.tsx')) },
  {
    path: 'release',
    lazy: screen(() => import('#src/features/release/components/ReleasePage.tsx')),
  },
  { path: '*', element: <Navigate to="../frame" replace /> },
];

export const routes: RouteObject[] = [
  {
    Component: Root,
    ErrorBoundary: ErrorPage,
    HydrateFallback: () => null,
    children: [
      { index: true, element: <Navigate to="/projects" replace /> },
      { Component: GateLayout, children: gate },
      {
        Component: RequireSession,
        children: [
          { path: 'projects/:projectId', Component: ProjectLayout, children: project },
          { Component: WorkspaceLayout, children: workspace },
        ],
      },
    ],
  },
];

export const makeRouter = () => createBrowserRouter(routes);
