import type { Route } from '#server/middlewares/handle.ts';
import { healthRoutes } from './health.ts';
import type { Services } from './services.ts';

/** Every endpoint of the product: mounted, listed in the OpenAPI document, held against the access table. */
export const endpoints = (services: Services): readonly Route[] => [...healthRoutes(services)];
