import { pino, type Logger } from 'pino';
import type { Config } from './config.ts';

export type Log = Logger;

/** Nothing that could let a reader of the log in is ever written to it. */
const SECRETS = [
  'password',
  'currentPassword',
  'newPassword',
  'token',
  'authorization',
  'cookie',
  'csrfToken',
];

export function createLog(config: Pick<Config, 'logLevel'>): Log {
  return pino({
    level: config.logLevel,
    redact: {
      paths: SECRETS.flatMap((name) => [name, `*.${name}`, `*.*.${name}`]),
      censor: '(secret)',
    },
  });
}
