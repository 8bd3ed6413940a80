import express, { type Request, type RequestHandler, type Response } from 'express';
import type { z } from 'zod';
import { AppError, type Issue } from '#shared/errors/AppError.ts';
import type { Endpoint } from '#shared/schemas/endpoint.ts';
import { Person } from '#server/models/Person.ts';

const MAX_BODY_BYTES = 64 * 1024;

/** Tests hold every answer against its contract; in production that would only cost time. */
const checksAnswers = process.env['NODE_ENV'] === 'test';

/** An endpoint with the code that serves it; `createApp` mounts them. */
export interface Route {
  readonly contract: Endpoint;
  readonly handlers: readonly RequestHandler[];
}

export interface Input<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType> {
  readonly params: z.output<P>;
  readonly query: z.output<Q>;
  readonly body: z.output<B>;
}

interface Call<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType, Who> {
  /** Who is signed in. */
  readonly person: Who;
  readonly input: Input<P, Q, B>;
  /** For signing in and out, the connection's end, headers; the input is never read from it. */
  readonly request: Request;
  /** For answers that are not JSON, and for further headers. */
  readonly response: Response;
}

/** Nothing where the contract answers nothing. */
type Answer<R extends z.ZodType> = [z.output<R>] extends [undefined] ? void : z.output<R>;

type Handler<
  P extends z.ZodType,
  Q extends z.ZodType,
  B extends z.ZodType,
  R extends z.ZodType,
  Who,
> = (call: Call<P, Q, B, Who>) => Promise<Answer<R>> | Answer<R>;

/**
 * Serves an endpoint that needs a sign-in: reads and checks the input by the contract, calls `work`, sends
 * what it returns with the contract's status. When the contract produces no JSON, `work` answers itself.
 */
export function handle<
  P extends z.ZodType,
  Q extends z.ZodType,
  B extends z.ZodType,
  R extends z.ZodType,
>(contract: Endpoint<P, Q, B, R>, work: Handler<P, Q, B, R, Person>): Route {
  if (contract.access !== 'signed-in') throw new Error(`${contract.path} is public.`);
  return route(contract, (call) => work({ ...call, person: signedIn(call.person) }), requireSignIn);
}

/** Serves an endpoint that needs no sign-in; `person` is null when nobody is signed in. */
export function handlePublic<
  P extends z.ZodType,
  Q extends z.ZodType,
  B extends z.ZodType,
  R extends z.ZodType,
>(contract: Endpoint<P, Q, B, R>, work: Handler<P, Q, B, R, Person | null>): Route {
  if (contract.access !== 'public') throw new Error(`${contract.path} needs a sign-in.`);
  return route(contract, work);
}

/** The person that `authenticate` found for this request. */
export const personOf = (request: Request): Person | null =>
  request.user instanceof Person ? request.user : null;

function signedIn(person: Person | null): Person {
  if (person === null) throw new AppError('not-signed-in', 'Sign in first.');
  return person;
}

/** Before the body is read: a stranger's megabytes are not worth parsing. */
const requireSignIn: RequestHandler = (request, _response, next) => {
  signedIn(personOf(request));
  next();
};

function route<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType, R extends z.ZodType>(
  contract: Endpoint<P, Q, B, R>,
  work: Handler<P, Q, B, R, Person | null>,
  ...guards: RequestHandler[]
): Route {
  const readBody = express.json({
    limit: contract.maxBodyBytes ?? MAX_BODY_BYTES,
    verify: (_request, _response, bytes) => {
      refuseNul(bytes.includes('\\u0000'));
    },
  });
  const serve: RequestHandler = async (request, response) => {
    const input = readInput(contract, request);
    // Passport's strategies read the body themselves: they get the checked one.
    request.body = input.body;
    const answer = await work({ person: personOf(request), input, request, response });
    if ((contract.produces ?? 'json') !== 'json') return;
    if (checksAnswers) contract.response.parse(answer);
    response.status(contract.status).set('Cache-Control', 'no-store');
    if (contract.status === 204) response.end();
    else response.json(answer);
  };
  return { contract, handlers: [...guards, requireJson, readBody, serve] };
}

/** PostgreSQL stores no NUL character in text, and nobody types one. */
function refuseNul(found: boolean): void {
  if (found) {
    throw new AppError('invalid-request', 'Leave out the NUL character (\\u0000).', {
      issues: [{ path: '', message: 'Text may not contain the NUL character.' }],
    });
  }
}

const requireJson: RequestHandler = (request, _response, next) => {
  refuseNul(request.originalUrl.includes('%00'));
  // Browsers announce a body of no length with a POST that has none; `is` takes that for a body.
  const isEmpty = request.get('Content-Length') === '0';
  if (!isEmpty && request.is('json') === false) {
    throw new AppError('unsupported-media-type', 'Send the body as application/json.');
  }
  next();
};

/** @throws {AppError} `invalid-request` with every issue of parameters, query and body */
function readInput<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType>(
  contract: Pick<Endpoint<P, Q, B>, 'params' | 'query' | 'body'>,
  request: Request,
): Input<P, Q, B> {
  const body: unknown = request.body ?? {};
  const params = contract.params.safeParse({ ...request.params });
  const query = contract.query.safeParse({ ...request.query });
  const parsedBody = contract.body.safeParse(body);
  if (params.success && query.success && parsedBody.success) {
    return { params: params.data, query: query.data, body: parsedBody.data };
  }
  const issues = [params, query, parsedBody].flatMap((part) => part.error?.issues ?? []);
  throw new AppError('invalid-request', 'Some of the input is not valid; see each field.', {
    issues: issues.map(toIssue),
  });
}

const toIssue = (issue: z.core.$ZodIssue): Issue => ({
  path: issue.path.map(String).join('.'),
  message: issue.message,
});
