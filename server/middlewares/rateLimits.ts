import { createHash } from 'node:crypto';
import type { RequestHandler } from 'express';
import type { Pool } from 'pg';
import { RateLimiterMemory, RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import { AppError } from '#shared/errors/AppError.ts';
import { personOf } from './handle.ts';

/** Points per seconds, counted in PostgreSQL and so by all processes together. */
const shared = {
  'sign-in-account': { points: 10, duration: 15 * 60 },
  'sign-in-address': { points: 60, duration: 15 * 60 },
  /** Accepting or reading invitations, setting a password by token: guessing tokens. */
  'token-address': { points: 60, duration: 15 * 60 },
  'reset-account': { points: 4, duration: 60 * 60 },
  'reset-address': { points: 20, duration: 60 * 60 },
  'invitation-team': { points: 60, duration: 60 * 60 },
  /** Re-entering one's own password, to change it or to approve. */
  'password-person': { points: 10, duration: 15 * 60 },
} as const;

/** Any request, per process: a brake on runaway clients, not a defence of secrets. */
const REQUESTS_PER_MINUTE = 1_200;

export type Limit = keyof typeof shared;

export interface RateLimits {
  /** Counts one attempt. @throws {AppError} `too-many-requests` with `retryAfterSeconds` */
  readonly spend: (limit: Limit, key: string) => Promise<void>;
  /** Forgets the attempts after a success. */
  readonly forgive: (limit: Limit, key: string) => Promise<void>;
  /** The limit on all requests of a person, or of an address where nobody is signed in. */
  readonly everyRequest: RequestHandler;
}

/**
 * @param pool of the run-time role; the table is `rate_limits`
 * @param scale multiplies every limit
 */
export function rateLimits(pool: Pool, scale: number): RateLimits {
  const limiters = new Map(
    Object.entries(shared).map(([name, { points, duration }]) => [
      name,
      new RateLimiterPostgres({
        storeClient: pool,
        storeType: 'pool',
        tableName: 'rate_limits',
        tableCreated: true,
        clearExpiredByTimeout: true,
        keyPrefix: name,
        points: points * scale,
        duration,
      }),
    ]),
  );
  const limiter = (name: Limit): RateLimiterPostgres => {
    const found = limiters.get(name);
    if (found === undefined) throw new Error(`There is no limit ${name}.`);
    return found;
  };
  const everyone = new RateLimiterMemory({ points: REQUESTS_PER_MINUTE * scale, duration: 60 });
  return {
    spend: async (name, key) => {
      await limiter(name).consume(digest(key)).catch(refuse);
    },
    forgive: async (name, key) => {
      await limiter(name).delete(digest(key));
    },
    everyRequest: async (request, _response, next) => {
      await everyone.consume(personOf(request)?.id ?? request.ip ?? '').catch(refuse);
      next();
    },
  };
}

/** Addresses of people and machines are not kept in the clear. */
const digest = (key: string): string => createHash('sha256').update(key).digest('hex');

function refuse(reason: unknown): never {
  if (!(reason instanceof RateLimiterRes)) throw reason as Error;
  const retryAfterSeconds = Math.max(1, Math.ceil(reason.msBeforeNext / 1000));
  throw new AppError(
    'too-many-requests',
    `Too many attempts: try again in ${waiting(retryAfterSeconds)}.`,
    { retryAfterSeconds },
  );
}

const waiting = (seconds: number): string =>
  seconds < 90 ? `${seconds} seconds` : `${Math.ceil(seconds / 60)} minutes`;
