import type { Route } from '#server/middlewares/handle.ts';
import { accountRoutes } from './account.ts';
import { activityRoutes } from './activity.ts';
import { draftRoutes } from './drafts.ts';
import { eventRoutes } from './events.ts';
import { healthRoutes } from './health.ts';
import { openApiRoute } from './openapi.ts';
import { projectRoutes } from './projects.ts';
import { revisionRoutes } from './revisions.ts';
import type { Services } from './services.ts';
import { sessionRoutes } from './session.ts';
import { solveRoutes } from './solves.ts';
import { teamRoutes } from './team.ts';

/** Every endpoint of the product: mounted, listed in the OpenAPI document, held against the access table. */
export function endpoints(services: Services): readonly Route[] {
  const routes = [
    ...healthRoutes(services),
    ...sessionRoutes(services),
    ...accountRoutes(services),
    ...teamRoutes(services),
    ...activityRoutes(),
    ...projectRoutes(),
    ...draftRoutes(),
    ...solveRoutes(),
    ...revisionRoutes(services),
    ...eventRoutes(services),
  ];
  return [...routes, openApiRoute(services, routes)];
}
