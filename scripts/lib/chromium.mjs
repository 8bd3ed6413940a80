import { existsSync } from 'node:fs';
import { installDebianPackage } from './debian.mjs';

/**
 * The browser of the end-to-end tests; installs Debian's Chromium where it is missing and that is allowed.
 *
 * @returns {Promise<string>} path of the program
 * @throws {import('./steps.mjs').StepError}
 */
export async function provideChromium() {
  const program = process.env['CHROMIUM_PATH'] ?? '/usr/bin/chromium';
  if (!existsSync(program)) await installDebianPackage('chromium');
  return program;
}
