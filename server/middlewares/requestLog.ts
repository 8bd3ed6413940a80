import { randomUUID } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import { pinoHttp, type HttpLogger } from 'pino-http';
import type { Log } from '#server/config/log.ts';

/** One line per request: no headers, no body, no query (it can hold what people searched for). */
export function requestLog(log: Log): HttpLogger {
  return pinoHttp({
    logger: log,
    genReqId: () => randomUUID(),
    serializers: {
      req: (request: IncomingMessage) => ({
        id: request.id,
        method: request.method,
        path: (request.url ?? '').split('?')[0],
      }),
      res: (response: { statusCode: number }) => ({ status: response.statusCode }),
    },
    customLogLevel: (_request, response, error) => {
      if (error || response.statusCode >= 500) return 'error';
      return response.statusCode >= 400 ? 'info' : 'debug';
    },
  });
}
