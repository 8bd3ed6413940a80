import { createHash } from 'node:crypto';
import { join } from 'node:path';
import { initCluster, startCluster, usableFolder } from './cluster.mjs';
import { stateFolder } from './folders.mjs';
import { postgresAccount } from './postgres.mjs';
import { databaseAddress, makeDatabase, makeRoles, OWNER, RUN_TIME } from './roles.mjs';
import { provideSecrets } from './secrets.mjs';
import { readState, writeState } from './stateFile.mjs';

const STATE = 'cluster.json';
const DATABASE = 'ringstead';

/**
 * The two connection addresses of a database: of the role that migrates, of the role that serves.
 * @typedef {{ owner: string, runTime: string }} DatabaseAddresses
 */

/** @returns {{ base: string, port: number } | undefined} where this checkout's cluster was last */
function rememberedCluster() {
  return /** @type {{ base: string, port: number } | undefined} */ (readState(STATE));
}

/**
 * Starts this checkout's own cluster, made when missing, with its roles and its database.
 *
 * @param {string} bin PostgreSQL's programs
 * @returns {Promise<{ cluster: import('./cluster.mjs').Cluster, addresses: DatabaseAddresses, isNew: boolean, wasRunning: boolean }>}
 * @throws {import('./steps.mjs').StepError}
 */
export async function startPrivateCluster(bin) {
  const secrets = provideSecrets();
  const remembered = rememberedCluster();
  const name = `ringstead-${createHash('sha256').update(stateFolder).digest('hex').slice(0, 8)}`;
  const base = usableFolder(
    remembered ? [remembered.base] : [join(stateFolder, 'postgres'), join('/var/lib', name)],
    postgresAccount(),
  );
  const { superuserPassword } = secrets;
  const isNew = initCluster(bin, base, superuserPassword);
  const { wasRunning, ...cluster } = await startCluster({
    bin,
    base,
    superuserPassword,
    ...(remembered ? { port: remembered.port } : {}),
  });
  writeState(STATE, { base, port: cluster.port });
  makeRoles(cluster, { owner: secrets.ownerPassword, runTime: secrets.runTimePassword });
  makeDatabase(cluster, DATABASE);
  return { cluster, isNew, wasRunning, addresses: privateAddresses(cluster.port) };
}

/**
 * @param {number} port
 * @returns {DatabaseAddresses}
 */
function privateAddresses(port) {
  const { ownerPassword, runTimePassword } = provideSecrets();
  return {
    owner: databaseAddress({ port }, OWNER, ownerPassword, DATABASE),
    runTime: databaseAddress({ port }, RUN_TIME, runTimePassword, DATABASE),
  };
}

/** @returns {DatabaseAddresses | undefined} of the cluster that `npm start` made here, if it ever did */
export function rememberedAddresses() {
  const remembered = rememberedCluster();
  return remembered && privateAddresses(remembered.port);
}
