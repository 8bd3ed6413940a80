import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './folders.mjs';
import { rememberedAddresses } from './privateCluster.mjs';
import { StepError } from './steps.mjs';

/** Reads `.env` in the checkout, if there is one; what the environment already says wins. */
export function loadEnvironment() {
  const file = join(root, '.env');
  if (existsSync(file)) process.loadEnvFile(file);
}

/**
 * The database that the environment names.
 *
 * @returns {import('./privateCluster.mjs').DatabaseAddresses | undefined} undefined when it names none
 * @throws {StepError} when it names only half of it
 */
export function namedDatabase() {
  const runTime = process.env['DATABASE_URL'];
  const owner = process.env['MIGRATION_DATABASE_URL'];
  if (!runTime && !owner) return undefined;
  if (!runTime)
    throw new StepError('MIGRATION_DATABASE_URL is set, DATABASE_URL is not: set both.');
  if (!owner) {
    throw new StepError(
      'DATABASE_URL is set (run-time role): set MIGRATION_DATABASE_URL too, to the role that owns the tables; .env.example shows how to make both.',
    );
  }
  return { owner, runTime };
}

/**
 * The address of the role that owns the tables: from the environment, else of this checkout's cluster.
 *
 * @returns {string}
 * @throws {StepError}
 */
export function ownerAddress() {
  const address = process.env['MIGRATION_DATABASE_URL'] || rememberedAddresses()?.owner;
  return address ?? missing('MIGRATION_DATABASE_URL');
}

/**
 * The address of the run-time role: from the environment, else of this checkout's cluster.
 *
 * @returns {string}
 * @throws {StepError}
 */
export function runTimeAddress() {
  return process.env['DATABASE_URL'] || (rememberedAddresses()?.runTime ?? missing('DATABASE_URL'));
}

/**
 * @param {string} variable
 * @returns {never}
 */
function missing(variable) {
  throw new StepError(`There is no database yet: set ${variable}, or run \`npm start\` first.`);
}
