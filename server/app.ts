import { setMaxListeners } from 'node:events';
import cookieParser from 'cookie-parser';
import express, { type Express } from 'express';
import pg from 'pg';
import type { Config } from './config/config.ts';
import type { Log } from './config/log.ts';
import { verifyCredentials } from './commands/verifyCredentials.ts';
import { authentication } from './middlewares/authenticate.ts';
import { csrfTokens } from './middlewares/csrf.ts';
import { noSuchEndpoint, sendProblem } from './middlewares/errors.ts';
import type { Route } from './middlewares/handle.ts';
import { rateLimits } from './middlewares/rateLimits.ts';
import { requestLog } from './middlewares/requestLog.ts';
import { securityHeaders } from './middlewares/security.ts';
import { staticClient } from './middlewares/staticClient.ts';
import { endpoints } from './routes/endpoints.ts';

/** Sessions and rate limits need few connections beside the models' own. */
const POOL_SIZE = 4;

export interface App {
  readonly express: Express;
  /** What is mounted, in order. */
  readonly routes: readonly Route[];
  /** Ends the event streams, which would otherwise keep the server from stopping. */
  readonly closeStreams: () => void;
  /** Lets go of the database connections of sessions and rate limits. */
  readonly close: () => Promise<void>;
}

/**
 * The whole HTTP application. The models have to be connected (`connectDatabase`), the job queues started.
 *
 * @param solverIsReady whether the solver thread is warm, for the readiness endpoint
 */
export function createApp(config: Config, log: Log, solverIsReady: () => boolean): App {
  const pool = new pg.Pool({
    connectionString: config.databaseUrl,
    max: POOL_SIZE,
    application_name: 'ringstead-sessions',
  });
  pool.on('error', (error) => {
    log.warn({ err: error }, 'idle database connection');
  });
  const limits = rateLimits(pool, config.rateLimitScale);
  const csrf = csrfTokens(config);
  const sessions = authentication(config, pool, verifyCredentials);
  const closing = new AbortController();
  // One listener per open event stream is no leak.
  setMaxListeners(0, closing.signal);
  const services = { config, log, limits, csrf, solverIsReady, closing: closing.signal };
  const routes = endpoints(services);

  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', config.trustProxy);
  app.set('query parser', 'simple');
  app.use(requestLog(log), securityHeaders(config));
  app.use('/api', cookieParser(), ...sessions.handlers, limits.everyRequest, csrf.protect);
  for (const { contract, handlers } of routes) app[contract.method](contract.path, ...handlers);
  app.use('/api', noSuchEndpoint);
  app.use(staticClient());
  app.use(sendProblem);

  const close = async () => {
    sessions.close();
    await pool.end();
  };
  const closeStreams = () => {
    closing.abort();
  };
  return { express: app, routes, closeStreams, close };
}
