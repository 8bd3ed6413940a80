import { join } from 'node:path';
import { loadEnvironment } from './lib/environment.mjs';
import { makeStateFolder, stateFolder } from './lib/folders.mjs';
import { forgetInstance, recordInstance, recoverInstance } from './lib/instance.mjs';
import { provideSecrets } from './lib/secrets.mjs';
import { serverProgram, spawnServer, stopServer, waitUntilReady } from './lib/server.mjs';
import {
  checkPort,
  setUpBuilds,
  setUpDatabase,
  setUpDemo,
  setUpPackages,
  setUpTables,
} from './lib/setup.mjs';
import { isShuttingDown, onShutdown, shutDown, shutDownOnSignals } from './lib/shutdown.mjs';
import { reportFailure, step, StepError } from './lib/steps.mjs';

/** `npm start`: sets everything up and runs the product until Ctrl-C. `--demo` seeds a named database. */
async function main() {
  loadEnvironment();
  const port = Number(process.env['PORT'] || 4600);
  const address = `http://127.0.0.1:${port}`;
  makeStateFolder();
  await step('What the last start left', async (note) => {
    const stopped = await recoverInstance();
    note(stopped === 0 ? 'nothing' : 'stopped');
  });
  await checkPort(port);
  recordInstance(address, []);
  onShutdown(forgetInstance);
  await setUpPackages();
  const { addresses, isPrivate } = await setUpDatabase();
  // The server never learns the owner's address.
  delete process.env['MIGRATION_DATABASE_URL'];
  await setUpTables(addresses, isPrivate);
  const env = {
    ...process.env,
    NODE_ENV: 'production',
    RINGSTEAD_MODE: 'development',
    HOST: '127.0.0.1',
    PORT: String(port),
    PUBLIC_URL: process.env['PUBLIC_URL'] || address,
    SESSION_SECRET: process.env['SESSION_SECRET'] || provideSecrets().sessionSecret,
    DATABASE_URL: addresses.runTime,
  };
  const wantsDemo = isPrivate || process.argv.includes('--demo');
  const signIns = wantsDemo ? await setUpDemo(addresses, env, isPrivate) : [];
  await setUpBuilds();
  const log = join(stateFolder, 'server.log');
  const server = await step('Server', async (note) => {
    const server = spawnServer(['--enable-source-maps', serverProgram], env, log);
    onShutdown(() => stopServer(server), 'the server');
    recordInstance(address, [server.pid]);
    await waitUntilReady(server, address, log);
    note(`ready, its log is ${log}`);
    return server;
  });
  announce(env.PUBLIC_URL, signIns);
  await server.ended;
  if (!isShuttingDown()) throw new StepError(`The server stopped by itself: read ${log}.`);
}

/**
 * @param {string} address
 * @param {import('./lib/setup.mjs').SignIn[]} signIns
 */
function announce(address, signIns) {
  console.log(`\n  Ringstead runs at ${address} (Ctrl-C stops it)\n`);
  const width = Math.max(...signIns.map(({ role }) => role.length));
  for (const { role, email, password } of signIns) {
    console.log(`  ${role.padEnd(width)}  ${email}  ${password}`);
  }
}

shutDownOnSignals();
main().catch(async (error) => {
  // What a signal interrupts fails too; that is no failure to report.
  if (isShuttingDown()) return;
  process.exitCode = reportFailure(error);
  await shutDown();
  process.exit();
});
