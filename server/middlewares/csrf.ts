import { doubleCsrf } from 'csrf-csrf';
import type { Request, RequestHandler, Response } from 'express';
import { AppError } from '#shared/errors/AppError.ts';
import type { Config } from '#server/config/config.ts';
import { personOf } from './handle.ts';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

export interface CsrfTokens {
  /** A token for the session as it is now; sets the cookie that goes with it. */
  readonly issue: (request: Request, response: Response) => string;
  /** Refuses state-changing requests that another site may have made. */
  readonly protect: RequestHandler;
}

/**
 * Two independent defences. First the browser's own word on where the request comes from (Origin,
 * Sec-Fetch-Site). Then a signed double-submit token: HMAC(secret, session id, random) in a cookie and again in
 * the X-CSRF-Token header. A token of one session, or of nobody, is worthless in another session: it changes
 * at sign-in and sign-out, so the sign-in form is protected too.
 */
export function csrfTokens(config: Config): CsrfTokens {
  const secure = config.publicUrl.startsWith('https:');
  const { generateCsrfToken, validateRequest } = doubleCsrf({
    getSecret: () => config.sessionSecret,
    getSessionIdentifier: (request) => (personOf(request) ? request.sessionID : 'nobody'),
    cookieName: secure ? '__Host-ringstead.csrf' : 'ringstead.csrf',
    cookieOptions: { httpOnly: true, sameSite: 'strict', secure, path: '/' },
    getCsrfTokenFromRequest: (request) => request.get('X-CSRF-Token'),
  });
  return {
    issue: (request, response) =>
      generateCsrfToken(request, response, { overwrite: false, validateOnReuse: false }),
    protect: (request, _response, next) => {
      if (!SAFE.has(request.method)) {
        refuseOtherSites(config, request);
        if (!validateRequest(request)) {
          throw new AppError(
            'forbidden',
            'The X-CSRF-Token header is missing or of another session: read /api/session for a new one.',
            // By this the client knows to fetch the present token and to try once more.
            { reason: 'csrf' },
          );
        }
      }
      next();
    },
  };
}

function refuseOtherSites(config: Config, request: Request): void {
  const origin = request.get('Origin');
  const site = request.get('Sec-Fetch-Site');
  const ownSite = site === undefined || site === 'same-origin' || site === 'none';
  if (!ownSite || (origin !== undefined && !isOwnOrigin(config, request, origin))) {
    throw new AppError('forbidden', 'This request comes from another site.');
  }
}

/** Outside production the address in the browser may be localhost, or that of the development server. */
function isOwnOrigin(config: Config, request: Request, origin: string): boolean {
  if (origin === new URL(config.publicUrl).origin) return true;
  return config.mode !== 'production' && origin === `http://${request.get('Host')}`;
}
