import type { z } from 'zod';
import { problem, type Problem } from '#shared/schemas/common.ts';
import type { Endpoint } from '#shared/schemas/endpoint.ts';
import { readSession } from '#shared/schemas/session.ts';

/** An answer other than success. `problem` is the server's own account of it. */
export class ApiError extends Error {
  readonly status: number;
  readonly problem: Problem;
  /** Seconds to wait before another try, where the server says so (429, 503). */
  readonly retryAfter: number | null;

  constructor(status: number, account: Problem, retryAfter: number | null = null) {
    super(account.detail);
    this.name = 'ApiError';
    this.status = status;
    this.problem = account;
    this.retryAfter = retryAfter;
  }
}

type AnyEndpoint = Endpoint;

/** One part of a request: left out where the endpoint takes nothing, optional where all of it is. */
type Part<Key extends string, Value> = string extends keyof Value
  ? { [K in Key]?: undefined }
  : Partial<Value> extends Value
    ? { [K in Key]?: Value }
    : { [K in Key]: Value };

export type CallInput<
  Params extends z.ZodType,
  Query extends z.ZodType,
  Body extends z.ZodType,
> = Part<'params', z.input<Params>> &
  Part<'query', z.input<Query>> &
  Part<'body', z.input<Body>> & { signal?: AbortSignal };

interface LooseInput {
  params?: unknown;
  query?: unknown;
  body?: unknown;
  signal?: AbortSignal;
}

let csrfToken: string | null = null;

/** Called with every session answer: the token goes back with each state-changing request. */
export function rememberCsrfToken(token: string): void {
  csrfToken = token;
}

/**
 * Calls an endpoint and gives its parsed answer.
 * @throws ApiError for every answer that is not a success, and when the server can't be reached (status 0).
 */
export async function call<
  Params extends z.ZodType,
  Query extends z.ZodType,
  Body extends z.ZodType,
  Answer extends z.ZodType,
>(
  endpoint: Endpoint<Params, Query, Body, Answer>,
  input: CallInput<Params, Query, Body>,
): Promise<z.output<Answer>> {
  const response = await send(endpoint, input);
  const body: unknown = response.status === 204 ? undefined : await response.json();
  return endpoint.response.parse(body);
}

/** Calls an endpoint that answers with bytes. @throws ApiError as `call` does. */
export async function callBinary<
  Params extends z.ZodType,
  Query extends z.ZodType,
  Body extends z.ZodType,
>(
  endpoint: Endpoint<Params, Query, Body>,
  input: CallInput<Params, Query, Body>,
): Promise<ArrayBuffer> {
  return (await send(endpoint, input)).arrayBuffer();
}

/** The address of an endpoint with its parameters and query filled in. */
export function addressOf(
  endpoint: AnyEndpoint,
  input: { params?: unknown; query?: unknown },
): string {
  const params = (input.params ?? {}) as Record<string, string>;
  const path = endpoint.path.replace(/:(\w+)/g, (_match, name: string) =>
    encodeURIComponent(params[name] ?? ''),
  );
  const query = new URLSearchParams();
  const values = (input.query ?? {}) as Record<string, string | number | boolean | undefined>;
  for (const [name, value] of Object.entries(values)) {
    if (value !== undefined) query.set(name, String(value));
  }
  return query.size > 0 ? `${path}?${query.toString()}` : path;
}

async function send(endpoint: AnyEndpoint, input: LooseInput): Promise<Response> {
  const first = await request(endpoint, input);
  if (first.ok) return first;
  const failure = await failureOf(first);
  // A token outlives neither a restart nor a sign-in in another tab: fetch the present one, once.
  if (endpoint.method !== 'get' && failure.problem.details?.['reason'] === 'csrf') {
    rememberCsrfToken((await call(readSession, {})).csrfToken);
    const second = await request(endpoint, input);
    if (second.ok) return second;
    throw await failureOf(second);
  }
  throw failure;
}

async function request(endpoint: AnyEndpoint, input: LooseInput): Promise<Response> {
  const headers: Record<string, string> = {
    accept: endpoint.produces === 'binary' ? 'application/octet-stream' : 'application/json',
  };
  if (input.body !== undefined) headers['content-type'] = 'application/json';
  if (endpoint.method !== 'get' && csrfToken !== null) headers['x-csrf-token'] = csrfToken;
  try {
    return await fetch(addressOf(endpoint, input), {
      method: endpoint.method.toUpperCase(),
      headers,
      credentials: 'same-origin',
      ...(input.body === undefined ? {} : { body: JSON.stringify(input.body) }),
      ...(input.signal ? { signal: input.signal } : {}),
    });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw new ApiError(0, {
      type: 'about:blank',
      title: 'No connection',
      status: 0,
      detail: 'The server can’t be reached. Check the connection and try again.',
      code: 'unavailable',
    });
  }
}

async function failureOf(response: Response): Promise<ApiError> {
  const body: unknown = await response.json().catch(() => null);
  const parsed = problem.safeParse(body);
  const wait = Number(response.headers.get('retry-after'));
  return new ApiError(
    response.status,
    parsed.success
      ? parsed.data
      : {
          type: 'about:blank',
          title: 'Unexpected answer',
          status: response.status,
          detail: `The server answered ${response.status} without saying why. Try again in a moment.`,
          code: 'internal',
        },
    Number.isFinite(wait) && wait > 0 ? wait : null,
  );
}
