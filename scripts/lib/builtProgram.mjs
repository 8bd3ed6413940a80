import { existsSync } from 'node:fs';
import { pathToFileURL } from 'node:url';
import { StepError } from './steps.mjs';

/**
 * Runs a built program of the product in this very process, so that signals reach it directly. Nothing is
 * installed, built, migrated or seeded.
 *
 * @param {string} program
 * @throws {StepError} when it is not built
 */
export async function runBuiltProgram(program) {
  if (!existsSync(program)) {
    throw new StepError('Nothing is built yet: run `npm ci && npm run build` first.');
  }
  process.env['NODE_ENV'] = 'production';
  process.setSourceMapsEnabled(true);
  await import(pathToFileURL(program).href);
}
