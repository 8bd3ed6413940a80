import { join } from 'node:path';
import { loadEnvironment } from './lib/environment.mjs';
import { makeStateFolder, root } from './lib/folders.mjs';
import { forgetInstance, recordInstance, recoverInstance } from './lib/instance.mjs';
import { freePort } from './lib/ports.mjs';
import { provideSecrets } from './lib/secrets.mjs';
import { spawnServer, stopServer } from './lib/server.mjs';
import { checkPort, setUpDatabase, setUpDemo, setUpPackages, setUpTables } from './lib/setup.mjs';
import { isShuttingDown, onShutdown, shutDown, shutDownOnSignals } from './lib/shutdown.mjs';
import { reportFailure, StepError } from './lib/steps.mjs';

/** `npm run dev`: Vite with hot reload on PORT, and behind it the server, restarted when it changes. */
async function main() {
  loadEnvironment();
  const port = Number(process.env['PORT'] || 4600);
  const address = `http://127.0.0.1:${port}`;
  makeStateFolder();
  await recoverInstance();
  await checkPort(port);
  recordInstance(address, []);
  onShutdown(forgetInstance);
  await setUpPackages();
  const { addresses, isPrivate } = await setUpDatabase();
  // The server never learns the owner's address.
  delete process.env['MIGRATION_DATABASE_URL'];
  await setUpTables(addresses, isPrivate);
  const apiPort = await freePort();
  const env = {
    ...process.env,
    NODE_ENV: 'development',
    RINGSTEAD_MODE: 'development',
    HOST: '127.0.0.1',
    PORT: String(apiPort),
    PUBLIC_URL: address,
    SESSION_SECRET: process.env['SESSION_SECRET'] || provideSecrets().sessionSecret,
    DATABASE_URL: addresses.runTime,
  };
  if (isPrivate || process.argv.includes('--demo')) await setUpDemo(addresses, env, isPrivate);
  const api = spawnServer([inModules('tsx/dist/cli.mjs'), 'watch', 'server/main.ts'], env);
  onShutdown(() => stopServer(api), 'the server');
  const viteArgs = [inModules('vite/bin/vite.js'), '--port', String(port)];
  const viteEnv = { ...process.env, RINGSTEAD_API: `http://127.0.0.1:${apiPort}` };
  const vite = spawnServer(viteArgs, viteEnv);
  onShutdown(() => stopServer(vite), 'Vite');
  recordInstance(address, [api.pid, vite.pid]);
  await Promise.race([api.ended, vite.ended]);
  if (!isShuttingDown()) throw new StepError('One of the two stopped: see its messages above.');
}

/** @param {string} path */
function inModules(path) {
  return join(root, 'node_modules', path);
}

shutDownOnSignals();
main().catch(async (error) => {
  if (isShuttingDown()) return;
  process.exitCode = reportFailure(error);
  await shutDown();
  process.exit();
});
