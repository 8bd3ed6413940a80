import type { z } from 'zod';

/**
 * One API endpoint: everything both sides agree on. The server parses `params`, `query` and `body`
 * (and, in tests, `response`); the client parses `response`; the OpenAPI document lists it.
 */
export interface Endpoint<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Response extends z.ZodType = z.ZodType,
> {
  readonly method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  /** Express path below the origin, such as `/api/solves/:solveId`. */
  readonly path: string;
  readonly summary: string;
  /** The success status. */
  readonly status: 200 | 201 | 202 | 204;
  /** `public` needs no sign-in; everything else does, and then the policy layer decides. */
  readonly access: 'public' | 'signed-in';
  readonly params: Params;
  readonly query: Query;
  readonly body: Body;
  /** JSON answer; `binary` endpoints and event streams describe themselves in `summary`. */
  readonly response: Response;
  readonly produces?: 'json' | 'binary' | 'event-stream';
  /** Largest JSON body in bytes; 64 KiB unless said otherwise. */
  readonly maxBodyBytes?: number;
}

export const endpoint = <
  Params extends z.ZodType,
  Query extends z.ZodType,
  Body extends z.ZodType,
  Response extends z.ZodType,
>(
  definition: Endpoint<Params, Query, Body, Response>,
): Endpoint<Params, Query, Body, Response> => definition;
