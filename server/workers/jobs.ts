import PgBoss from 'pg-boss';
import type { Transaction } from 'sequelize';
import type { Config } from '#server/config/config.ts';
import type { Log } from '#server/config/log.ts';
import type { JobData, QueueName } from '#server/config/queues.ts';
import { database } from '#server/models/database.ts';

/** How often jobs of runners that died are looked for. */
const MAINTENANCE_SECONDS = 10;
/** How often a worker looks for a job that no nudge of its own process announced. */
const POLLING_SECONDS = 1;
const STOP_PATIENCE_MS = 20_000;

let boss: PgBoss | undefined;
const workers = new Map<QueueName, string>();

/**
 * Connects this process to the job queues, which migrating has made.
 *
 * @throws when the queues' tables are missing or of another version
 */
export async function startJobs(config: Pick<Config, 'databaseUrl'>, log: Log): Promise<PgBoss> {
  const started = new PgBoss({
    connectionString: config.databaseUrl,
    application_name: 'ringstead-jobs',
    max: 4,
    migrate: false,
    schedule: false,
    supervise: true,
    maintenanceIntervalSeconds: MAINTENANCE_SECONDS,
  });
  started.on('error', (error) => log.error({ err: error }, 'job queue'));
  await started.start();
  boss = started;
  return started;
}

/** Waits for jobs under way, then lets go of the queues. */
export async function stopJobs(): Promise<void> {
  await boss?.stop({ graceful: true, wait: true, timeout: STOP_PATIENCE_MS });
  boss = undefined;
  workers.clear();
}

/**
 * Serves a queue in this process, one job at a time. A job whose work throws is tried again later.
 *
 * @returns what ends it: no further job is taken
 */
export async function workOn<Q extends QueueName>(
  queue: Q,
  work: (data: JobData[Q]) => Promise<void>,
): Promise<() => Promise<void>> {
  const id = await running().work<JobData[Q]>(
    queue,
    { batchSize: 1, pollingIntervalSeconds: POLLING_SECONDS },
    async (jobs) => {
      for (const job of jobs) await work(job.data);
      // What waits behind it does not wait for the next look too.
      nudge(queue);
    },
  );
  workers.set(queue, id);
  return async () => {
    if (workers.get(queue) === id) workers.delete(queue);
    await boss?.offWork({ id });
  };
}

/**
 * Queues a job in a transaction: it exists exactly when the change that asked for it does.
 *
 * @param options pg-boss's own, such as `singletonKey` or `id`
 */
export async function enqueue<Q extends QueueName>(
  transaction: Transaction,
  queue: Q,
  data: JobData[Q],
  options: PgBoss.SendOptions = {},
): Promise<void> {
  await running().send(queue, data, { ...options, db: inside(transaction) });
  transaction.afterCommit(() => {
    nudge(queue);
  });
}

/** Lets this process's worker on the queue look for a job now. */
export function nudge(queue: QueueName): void {
  const worker = workers.get(queue);
  if (worker !== undefined) boss?.notifyWorker(worker);
}

/** The transaction's connection as pg-boss wants it. */
const inside = (transaction: Transaction): PgBoss.Db => ({
  executeSql: async (text, values: readonly unknown[]) => {
    const bind = values.map((value) => value ?? null);
    const [rows] = await database().query(text, { bind, transaction });
    return { rows };
  },
});

function running(): PgBoss {
  if (boss === undefined) throw new Error('The job queues are not started.');
  return boss;
}
