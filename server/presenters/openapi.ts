import {
  OpenApiGeneratorV31,
  OpenAPIRegistry,
  type RouteConfig,
} from '@asteasolutions/zod-to-openapi';
import type { z } from 'zod';
import { problem } from '#shared/schemas/common.ts';
import type { Endpoint } from '#shared/schemas/endpoint.ts';

const MEDIA_TYPES = {
  json: 'application/json',
  binary: 'application/octet-stream',
  'event-stream': 'text/event-stream',
} as const;

/** The OpenAPI 3.1 document of the endpoints, made from the very contracts that check requests. */
export function presentOpenApi(contracts: readonly Endpoint[], publicUrl: string): object {
  const registry = new OpenAPIRegistry();
  registry.registerComponent('securitySchemes', 'session', {
    type: 'apiKey',
    in: 'cookie',
    name: publicUrl.startsWith('https:') ? '__Host-ringstead.sid' : 'ringstead.sid',
    description:
      'From POST /api/session. State-changing requests also need the X-CSRF-Token header with the token of GET /api/session.',
  });
  for (const contract of contracts) registry.registerPath(describe(contract));
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: { title: 'Ringstead', version: '1' },
    servers: [{ url: publicUrl }],
  });
}

function describe(contract: Endpoint): RouteConfig {
  const { method, path, summary, status, access, params, query, body, response } = contract;
  const produces = contract.produces ?? 'json';
  const hasBody = method !== 'get' && takesSomething(body);
  return {
    method,
    path: path.replace(/:(\w+)/g, '{$1}'),
    summary,
    ...(access === 'signed-in' ? { security: [{ session: [] }] } : {}),
    request: {
      ...(takesSomething(params) ? { params: params as z.ZodObject } : {}),
      ...(takesSomething(query) ? { query: query as z.ZodObject } : {}),
      ...(hasBody ? { body: { required: true, content: json(body) } } : {}),
    },
    responses: {
      [status]: {
        description: status === 204 ? 'Done.' : 'The answer.',
        ...(status === 204 ? {} : { content: contentOf(produces, response) }),
      },
      default: {
        description: 'What went wrong (RFC 9457).',
        content: { 'application/problem+json': { schema: problem } },
      },
    },
  };
}

const json = (schema: z.ZodType) => ({ [MEDIA_TYPES.json]: { schema } });

const contentOf = (produces: keyof typeof MEDIA_TYPES, response: z.ZodType) =>
  produces === 'json'
    ? json(response)
    : { [MEDIA_TYPES[produces]]: { schema: { type: 'string' as const } } };

/** Whether there is anything to say in this part of the request: `nothing` is an object without fields. */
const takesSomething = (schema: z.ZodType): boolean =>
  !('shape' in schema) || Object.keys(schema.shape as object).length > 0;
