import { pino } from 'pino';
import type { Sequelize } from 'sequelize';
import { createApp, type App } from '#server/app.ts';
import { readConfig, type Config } from '#server/config/config.ts';
import { connectDatabase } from '#server/models/database.ts';
import { startJobs, stopJobs } from '#server/workers/jobs.ts';
import { startMailWorker } from '#server/workers/mailWorker.ts';
import { startNotifications, stopNotifications } from '#server/workers/notifications.ts';
import { freshDatabase, type TestDatabase } from './database.ts';

export interface TestApp extends App {
  readonly config: Config;
  readonly database: TestDatabase;
  /** Connected as the run-time role. */
  readonly sequelize: Sequelize;
  readonly stop: () => Promise<void>;
}

/** Everything the server process has except the solver, on a database of the test file's own. */
export async function startApp(env: Readonly<Record<string, string>> = {}): Promise<TestApp> {
  const database = freshDatabase();
  const config = readConfig({
    RINGSTEAD_MODE: 'test',
    DATABASE_URL: database.runTime,
    LOG_LEVEL: 'silent',
    RATE_LIMIT_SCALE: '1000',
    ...env,
  });
  const log = pino({ level: config.logLevel });
  const sequelize = connectDatabase(config.databaseUrl, config.databasePool);
  await startNotifications(config, log);
  await startJobs(config, log);
  const closeMailer = await startMailWorker(config);
  const app = createApp(config, log, () => true);
  const stop = async () => {
    app.closeStreams();
    await stopJobs();
    await stopNotifications();
    await Promise.all([closeMailer(), app.close(), sequelize.close()]);
  };
  return { ...app, config, database, sequelize, stop };
}
