import { ConfigError, readConfig } from './config/config.ts';
import { createLog } from './config/log.ts';
import { connectDatabase } from './models/database.ts';
import { startJobs, stopJobs } from './workers/jobs.ts';
import { startNotifications, stopNotifications } from './workers/notifications.ts';
import { startRunner } from './workers/runner.ts';

/** A process that only solves: any number may run, on any machine that reaches the database. */
async function main(): Promise<() => Promise<void>> {
  const config = readConfig(process.env);
  const log = createLog(config);
  const sequelize = connectDatabase(config.databaseUrl, config.databasePool);
  await startNotifications(config, log);
  await startJobs(config, log);
  const runner = await startRunner(config, log);
  log.info('runner ready');
  return async () => {
    log.info('runner stopping');
    await runner.stop();
    await stopJobs();
    await stopNotifications();
    await sequelize.close();
  };
}

const fail = (error: unknown): never => {
  const known = error instanceof ConfigError;
  const text = error instanceof Error ? (known ? error.message : error.stack) : String(error);
  process.stderr.write(`${text ?? 'The runner failed.'}\n`);
  process.exit(1);
};

main().then((stop) => {
  let stopping = false;
  for (const signal of ['SIGTERM', 'SIGINT'] as const) {
    process.on(signal, () => {
      if (stopping) return;
      stopping = true;
      stop().then(() => process.exit(0), fail);
    });
  }
}, fail);
