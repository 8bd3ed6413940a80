import type { Endpoint } from '#shared/schemas/endpoint.ts';
import { readOpenApi } from '#shared/schemas/health.ts';
import { handlePublic, type Route } from '#server/middlewares/handle.ts';
import { presentOpenApi } from '#server/presenters/openapi.ts';
import type { Services } from './services.ts';

/** @param others every other endpoint; the document lists itself too */
export function openApiRoute({ config }: Services, others: readonly Route[]): Route {
  const contracts: Endpoint[] = [...others.map((route) => route.contract), readOpenApi];
  const document = { ...presentOpenApi(contracts, config.publicUrl) };
  return handlePublic(readOpenApi, () => document);
}
