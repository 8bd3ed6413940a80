import {
  clientBuild,
  isStale,
  kernelsBuild,
  makeBuild,
  serverBuild,
  sourceStamp,
} from './builds.mjs';
import { stopCluster } from './cluster.mjs';
import { namedDatabase } from './environment.mjs';
import { root } from './folders.mjs';
import { installPackages, packagesAreStale } from './packages.mjs';
import { providePostgres } from './postgres.mjs';
import { probePort } from './ports.mjs';
import { startPrivateCluster } from './privateCluster.mjs';
import { runScript } from './processes.mjs';
import { onShutdown } from './shutdown.mjs';
import { readState, removeState, writeState } from './stateFile.mjs';
import { step, StepError } from './steps.mjs';

/** Where the demo's sign-ins are remembered. */
const DEMO = 'demo.json';

/** Where it is remembered up to which migrations the private cluster is. */
const TABLES = 'tables.json';

/** What the tables depend on: the job queue's are made by its package. */
const TABLE_SOURCES = [
  'migrations',
  'server/config/queues.ts',
  'scripts/lib/migrations.ts',
  'package-lock.json',
];

/**
 * One person of the demo, for each role.
 * @typedef {{ role: string, email: string, password: string }} SignIn
 */

/**
 * @param {number} port
 * @throws {StepError} when something else listens there
 */
export async function checkPort(port) {
  if ((await probePort(port)) === undefined) {
    const other = port === 4600 ? 4700 : 4600;
    throw new StepError(
      `Port ${port} is taken: choose another one, such as \`PORT=${other} npm start\`.`,
    );
  }
}

/** Installs the packages when the lock file asks for others than are installed. */
export async function setUpPackages() {
  await step('Packages', async (note) => {
    if (!packagesAreStale()) return note('up to date');
    await installPackages();
    note('installed');
  });
  // Installing makes them; a change of their source since then does not.
  if (isStale(kernelsBuild)) await makeBuild(kernelsBuild);
}

/**
 * Finds or starts the database.
 *
 * @returns {Promise<{ addresses: import('./privateCluster.mjs').DatabaseAddresses, isPrivate: boolean }>}
 */
export async function setUpDatabase() {
  const named = namedDatabase();
  if (named) {
    await step('Database', (note) => note('the one that DATABASE_URL names'));
    return { addresses: named, isPrivate: false };
  }
  const bin = await step('PostgreSQL', async (note) => {
    const { bin, installed } = await providePostgres();
    note(installed ? `installed in ${bin}` : `found in ${bin}`);
    return bin;
  });
  const addresses = await step('Private cluster', async (note) => {
    const { cluster, isNew, wasRunning, addresses } = await startPrivateCluster(bin);
    onShutdown(() => stopCluster(cluster), 'PostgreSQL');
    if (isNew) [DEMO, TABLES].forEach(removeState);
    const what = isNew ? 'made and started' : wasRunning ? 'already runs' : 'started';
    note(`${what} on 127.0.0.1:${cluster.port}`);
    return addresses;
  });
  return { addresses, isPrivate: true };
}

/**
 * Brings the tables up to date. For which sources the private cluster is up to date is remembered, so
 * that a later start need not ask.
 *
 * @param {import('./privateCluster.mjs').DatabaseAddresses} addresses
 * @param {boolean} isPrivate
 */
export async function setUpTables({ owner, runTime }, isPrivate) {
  await step('Migrations', async (note) => {
    const stamp = sourceStamp(root, TABLE_SOURCES);
    if (isPrivate && readState(TABLES) === stamp) return note('up to date');
    const env = { ...process.env, MIGRATION_DATABASE_URL: owner, DATABASE_URL: runTime };
    const { status, output } = await runScript('scripts/migrate.ts', [], env);
    if (status !== 0) {
      throw new StepError('The tables could not be brought up to date: see the messages above.');
    }
    if (isPrivate) writeState(TABLES, stamp);
    note(output.startsWith('Nothing') ? 'up to date' : `${output.trim().split('\n').length} run`);
  });
}

/**
 * Fills in the demo. That the private cluster has it is remembered, so that a later start need not ask.
 *
 * @param {import('./privateCluster.mjs').DatabaseAddresses} addresses
 * @param {NodeJS.ProcessEnv} env the server's
 * @param {boolean} isPrivate
 * @returns {Promise<SignIn[]>} one for each role
 */
export async function setUpDemo({ owner }, env, isPrivate) {
  return step('Demo', async (note) => {
    const known = /** @type {SignIn[] | undefined} */ (isPrivate ? readState(DEMO) : undefined);
    if (known) {
      note('already there');
      return known;
    }
    const { status, output } = await runScript('scripts/seed.ts', [], {
      ...env,
      MIGRATION_DATABASE_URL: owner,
    });
    if (status !== 0)
      throw new StepError('The demo could not be filled in: see the messages above.');
    /** @type {SignIn[]} */
    const signIns = JSON.parse(output);
    if (isPrivate) writeState(DEMO, signIns);
    note('filled in');
    return signIns;
  });
}

/** Builds the client and the server where their sources changed. */
export async function setUpBuilds() {
  for (const build of [clientBuild, serverBuild]) {
    await step(`Build of the ${build.name}`, async (note) => {
      if (!isStale(build)) return note('up to date');
      await makeBuild(build);
      note('made');
    });
  }
}
