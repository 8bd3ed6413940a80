import { createServer } from 'node:http';
import { createApp } from './app.ts';
import { ConfigError, readConfig } from './config/config.ts';
import { createLog } from './config/log.ts';
import { connectDatabase } from './models/database.ts';
import { startJobs, stopJobs } from './workers/jobs.ts';
import { startMailWorker } from './workers/mailWorker.ts';
import { startNotifications, stopNotifications } from './workers/notifications.ts';
import { startRunner } from './workers/runner.ts';

/** Requests under way get this long to finish before their connections are cut. */
const DRAIN_MS = 10_000;

/** Starts the server; gives what stops it again. */
async function main(): Promise<() => Promise<void>> {
  const config = readConfig(process.env);
  const log = createLog(config);
  const sequelize = connectDatabase(config.databaseUrl, config.databasePool);
  await startNotifications(config, log);
  await startJobs(config, log);
  const closeMailer = await startMailWorker(config);
  // Without waiting for its thread to be warm: /api/ready tells.
  const runner = config.runnerInServer ? startRunner(config, log) : undefined;
  let runnerIsReady = runner === undefined;
  const started = runner?.then((running) => {
    runnerIsReady = true;
    return running;
  });

  const app = createApp(config, log, () => runnerIsReady);
  const server = createServer(app.express);
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(config.port, config.host, resolve);
  });
  log.info({ address: server.address(), mode: config.mode }, 'listening');

  return async () => {
    log.info('stopping: requests under way finish first');
    const closed = new Promise<void>((resolve) => {
      server.close(() => {
        resolve();
      });
    });
    app.closeStreams();
    server.closeIdleConnections();
    const cut = setTimeout(() => {
      server.closeAllConnections();
    }, DRAIN_MS);
    await closed;
    clearTimeout(cut);
    await (await started)?.stop();
    await stopJobs();
    await stopNotifications();
    await Promise.all([closeMailer(), app.close(), sequelize.close()]);
  };
}

/** One plain line for what the person who starts the server can mend; everything else with its stack. */
function explain(error: unknown): string {
  if (error instanceof ConfigError) return error.message;
  if (error instanceof Error && 'code' in error && error.code === 'EADDRINUSE') {
    return 'PORT: this port is taken; choose another one, such as PORT=4700.';
  }
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}

const fail = (error: unknown): never => {
  process.stderr.write(`${explain(error)}\n`);
  process.exit(1);
};

main().then((stop) => {
  let stopping = false;
  for (const signal of ['SIGTERM', 'SIGINT'] as const) {
    process.on(signal, () => {
      // Ctrl-C reaches the whole group and the starter passes SIGTERM on: once is enough.
      if (stopping) return;
      stopping = true;
      stop().then(() => process.exit(0), fail);
    });
  }
}, fail);
