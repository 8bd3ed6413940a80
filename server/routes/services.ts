import type { Config } from '#server/config/config.ts';
import type { Log } from '#server/config/log.ts';
import type { RateLimits } from '#server/middlewares/rateLimits.ts';
import type { CsrfTokens } from '#server/middlewares/csrf.ts';

/** What routes need besides the request. */
export interface Services {
  readonly config: Config;
  readonly log: Log;
  readonly limits: RateLimits;
  readonly csrf: CsrfTokens;
  /** Whether the solver thread is warm; true where no runner works inside the server. */
  readonly solverIsReady: () => boolean;
  /** Aborted when the server stops: event streams end then, since nothing else would end them. */
  readonly closing: AbortSignal;
}
