import { z } from 'zod';
import { nothing } from './common.ts';
import { endpoint } from './endpoint.ts';

const base = {
  method: 'get',
  status: 200,
  access: 'public',
  params: nothing,
  query: nothing,
  body: nothing,
} as const;

export const readHealth = endpoint({
  ...base,
  path: '/api/health',
  summary: 'The process is up.',
  response: z.object({ status: z.literal('up') }),
});

export const readReadiness = endpoint({
  ...base,
  path: '/api/ready',
  summary:
    'Database reachable, migrations current, solver thread warm (503 otherwise, saying which is not).',
  response: z.object({ database: z.boolean(), migrations: z.boolean(), solver: z.boolean() }),
});

export const readOpenApi = endpoint({
  ...base,
  path: '/api/openapi.json',
  summary: 'This API as an OpenAPI document.',
  response: z.record(z.string(), z.unknown()),
});
