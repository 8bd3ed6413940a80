import pg from 'pg';
import type { Transaction } from 'sequelize';
import { z } from 'zod';
import { projectEvent, type ProjectEvent } from '#shared/schemas/project.ts';
import type { Config } from '#server/config/config.ts';
import type { Log } from '#server/config/log.ts';
import { database } from '#server/models/database.ts';

/**
 * Nudges between processes by PostgreSQL's LISTEN and NOTIFY. A nudge says that a row has changed; the row
 * is the truth, and whoever misses a nudge finds it there.
 */

const CHANNEL = 'ringstead';
const RECONNECT_MS = 1_000;

const nudge = z.object({ projectId: z.uuid(), event: projectEvent });
export type Nudge = z.infer<typeof nudge>;

type Listener = (nudge: Nudge | 'missed') => void;

const listeners = new Set<Listener>();
let client: pg.Client | undefined;
let retry: ReturnType<typeof setTimeout> | undefined;
let stopped = true;

/** Tells every process about a change; sent when the transaction is committed, and only then. */
export async function notify(
  transaction: Transaction | null,
  projectId: string,
  event: ProjectEvent,
): Promise<void> {
  const message = JSON.stringify({ projectId, event } satisfies Nudge);
  await database().query('SELECT pg_notify($1, $2)', { bind: [CHANNEL, message], transaction });
}

/**
 * Calls the listener for every change that any process tells of, and with `missed` after the connection
 * was lost and found again. Gives the function that ends it.
 */
export function listen(listener: Listener): () => void {
  listeners.add(listener);
  return () => {
    listeners.delete(listener);
  };
}

/** Opens this process's one listening connection, and opens it again whenever it is lost. */
export async function startNotifications(
  config: Pick<Config, 'databaseUrl'>,
  log: Log,
): Promise<void> {
  stopped = false;
  await connect(config, log);
}

export async function stopNotifications(): Promise<void> {
  stopped = true;
  clearTimeout(retry);
  const last = client;
  client = undefined;
  await last?.end();
}

async function connect(config: Pick<Config, 'databaseUrl'>, log: Log): Promise<void> {
  const next = new pg.Client({
    connectionString: config.databaseUrl,
    application_name: 'ringstead-notifications',
    keepAlive: true,
  });
  next.on('notification', ({ payload }) => {
    const parsed = nudge.safeParse(parseJson(payload ?? ''));
    if (parsed.success) tell(parsed.data);
    else log.warn('a notification could not be read');
  });
  next.on('error', (error) => {
    log.warn({ err: error }, 'listening connection lost');
  });
  next.on('end', () => {
    if (!stopped && client === next) reconnectLater(config, log);
  });
  client = next;
  await next.connect();
  await next.query(`LISTEN ${CHANNEL}`);
}

function reconnectLater(config: Pick<Config, 'databaseUrl'>, log: Log): void {
  clearTimeout(retry);
  retry = setTimeout(() => {
    connect(config, log).then(
      () => {
        tell('missed');
      },
      (error: unknown) => {
        log.warn({ err: error }, 'listening connection not back yet');
        if (!stopped) reconnectLater(config, log);
      },
    );
  }, RECONNECT_MS);
}

function tell(message: Nudge | 'missed'): void {
  for (const listener of listeners) listener(message);
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
