import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { freePort } from '#scripts/lib/ports.mjs';
import { runScript } from '#scripts/lib/processes.mjs';
import {
  createDatabase,
  startThrowAwayCluster,
  stopThrowAwayCluster,
} from '#scripts/lib/throwAway.mjs';
import { rememberProduct, startProduct, stopProduct } from '../product.ts';

/**
 * Playwright's global set-up: a throw-away cluster, migrated, with the demo, and the built server on a
 * free port with the fake mail server.
 */
export default async function setup(): Promise<() => Promise<void>> {
  const throwAway = await startThrowAwayCluster();
  const folder = mkdtempSync(join(tmpdir(), 'ringstead-e2e-'));
  const stop = async () => {
    await stopProduct();
    stopThrowAwayCluster(throwAway);
    rmSync(folder, { recursive: true, force: true });
  };
  try {
    const { owner, runTime } = createDatabase(throwAway, 'ringstead');
    const port = await freePort();
    const url = `http://127.0.0.1:${port}`;
    const env = {
      NODE_ENV: 'production',
      RINGSTEAD_MODE: 'test',
      DATABASE_URL: runTime,
      HOST: '127.0.0.1',
      PORT: String(port),
      PUBLIC_URL: url,
      SESSION_SECRET: 'only-for-the-end-to-end-tests-of-this-checkout',
      RATE_LIMIT_SCALE: '100',
    };
    rememberProduct(join(folder, 'product.json'), { url, env, log: join(folder, 'server.log') });
    const forScripts = { ...process.env, ...env, MIGRATION_DATABASE_URL: owner };
    for (const script of ['scripts/migrate.ts', 'scripts/seed.ts']) {
      const { status } = await runScript(script, [], forScripts);
      if (status !== 0) throw new Error(`${script} failed: see its messages above.`);
    }
    await startProduct();
  } catch (error) {
    await stop();
    throw error;
  }
  return stop;
}
