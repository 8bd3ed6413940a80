import { randomBytes } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { initCluster, startCluster, stopCluster, usableFolder } from './cluster.mjs';
import { postgresAccount, providePostgres } from './postgres.mjs';
import { databaseAddress, makeDatabase, makeRoles, OWNER, RUN_TIME } from './roles.mjs';

/**
 * A cluster for tests: in a temporary folder, gone when stopped. Plain data, so that it can be handed to
 * another process.
 * @typedef {object} ThrowAwayCluster
 * @property {import('./cluster.mjs').Cluster} cluster
 * @property {{ owner: string, runTime: string }} passwords of the two roles
 */

/**
 * @returns {Promise<ThrowAwayCluster>}
 * @throws {import('./steps.mjs').StepError}
 */
export async function startThrowAwayCluster() {
  const { bin } = await providePostgres();
  const temporary = mkdtempSync(join(tmpdir(), 'ringstead-test-'));
  const elsewhere = join('/var/lib', `ringstead-test-${randomBytes(4).toString('hex')}`);
  const base = usableFolder([temporary, elsewhere], postgresAccount());
  const secret = () => randomBytes(16).toString('hex');
  const superuserPassword = secret();
  const passwords = { owner: secret(), runTime: secret() };
  initCluster(bin, base, superuserPassword);
  const cluster = await startCluster({ bin, base, superuserPassword, throwAway: true });
  try {
    makeRoles(cluster, passwords);
  } catch (error) {
    stopThrowAwayCluster({ cluster, passwords });
    throw error;
  }
  return { cluster, passwords };
}

/**
 * Makes a database in the cluster.
 *
 * @param {ThrowAwayCluster} throwAway
 * @param {string} name lower-case letters, digits and underscores
 * @param {string} [template] a database to copy; nobody may be connected to it
 * @returns {{ owner: string, runTime: string }} connection addresses of the two roles
 */
export function createDatabase({ cluster, passwords }, name, template) {
  makeDatabase(cluster, name, template);
  return {
    owner: databaseAddress(cluster, OWNER, passwords.owner, name),
    runTime: databaseAddress(cluster, RUN_TIME, passwords.runTime, name),
  };
}

/**
 * Stops the cluster and removes its files.
 *
 * @param {ThrowAwayCluster} throwAway
 */
export function stopThrowAwayCluster({ cluster }) {
  stopCluster(cluster);
  rmSync(cluster.base, { recursive: true, force: true });
}
