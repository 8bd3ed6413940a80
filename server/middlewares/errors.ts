import { STATUS_CODES } from 'node:http';
import type { ErrorRequestHandler, Request, RequestHandler } from 'express';
import { ConnectionError } from 'sequelize';
import { AppError, type ErrorCode } from '#shared/errors/AppError.ts';
import type { Problem } from '#shared/schemas/common.ts';

/** The one HTTP status of every error code. */
export const statuses: Readonly<Record<ErrorCode, number>> = {
  'malformed-request': 400,
  'not-signed-in': 401,
  'wrong-credentials': 401,
  forbidden: 403,
  'not-found': 404,
  conflict: 409,
  cancelled: 409,
  'token-expired': 410,
  'stale-version': 412,
  'too-large': 413,
  'unsupported-media-type': 415,
  'invalid-request': 422,
  'invalid-document': 422,
  mechanism: 422,
  unsolvable: 422,
  'time-limit': 422,
  'memory-limit': 422,
  'too-many-requests': 429,
  internal: 500,
  unavailable: 503,
};

/** Answers every address below /api that no endpoint has. */
export const noSuchEndpoint: RequestHandler = () => {
  throw new AppError('not-found', 'There is no such address in this API.');
};

/** The only place where an error becomes an answer; mounted last. */
export const sendProblem: ErrorRequestHandler = (error: unknown, req, res, next) => {
  // The answer has begun: cutting the connection is the only honest end left.
  if (res.headersSent) {
    next(error);
    return;
  }
  const known = toAppError(error);
  const status = statuses[known.code];
  // An AppError is an answer we chose; anything else of ours needs its stack in the log.
  if (status >= 500 && !(error instanceof AppError)) req.log.error({ err: error }, known.message);
  const { retryAfterSeconds } = known.details;
  if (typeof retryAfterSeconds === 'number') res.set('Retry-After', String(retryAfterSeconds));
  res
    .status(status)
    .type('application/problem+json')
    .set('Cache-Control', 'no-store')
    .send(JSON.stringify(problemOf(known, status, req)));
};

function problemOf(error: AppError, status: number, req: Request): Problem {
  const { issues, ...details } = error.details;
  return {
    type: 'about:blank',
    title: STATUS_CODES[status] ?? 'Error',
    status,
    detail: error.message,
    code: error.code,
    instance: `urn:uuid:${req.id as string}`,
    ...(issues ? { errors: [...issues] } : {}),
    ...(Object.keys(details).length > 0 ? { details } : {}),
  };
}

/** What Express, its body parser and the database throw, in our own words; never their messages. */
function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  if (error instanceof ConnectionError) {
    return new AppError('unavailable', 'The database is out of reach: try again in a moment.');
  }
  switch (clientStatus(error)) {
    case undefined:
      return new AppError(
        'internal',
        'Something went wrong on our side; nothing was changed. Try again, and tell your administrator the request number if it stays so.',
      );
    case 413:
      return new AppError('too-large', 'The request is larger than this endpoint takes.');
    case 415:
      return new AppError(
        'unsupported-media-type',
        'Send JSON as UTF-8 text, uncompressed or gzip.',
      );
    default:
      return new AppError(
        'malformed-request',
        'The request cannot be read: the body has to be one well-formed JSON object and the address well formed.',
      );
  }
}

/** The status in an error of Express's own packages that blames the client; undefined for any other. */
function clientStatus(error: unknown): number | undefined {
  if (!(error instanceof Error) || !('status' in error)) return undefined;
  const { status } = error;
  return typeof status === 'number' && status >= 400 && status < 500 ? status : undefined;
}
