import { existsSync } from 'node:fs';
import { pathToFileURL } from 'node:url';
import { StepError } from './steps.mjs';

/**
 * Runs a built program of the product in this very process, for production: nothing is installed, built,
 * migrated or seeded, and signals reach the program directly.
 *
 * @param {string} program
 * @throws {StepError} when it is not built
 */
export async function runInProduction(program) {
  if (!existsSync(program)) {
    throw new StepError('Nothing is built yet: run `npm ci && npm run build` first.');
  }
  process.env['NODE_ENV'] = 'production';
  process.env['RINGSTEAD_MODE'] = 'production';
  process.setSourceMapsEnabled(true);
  await import(pathToFileURL(program).href);
}
