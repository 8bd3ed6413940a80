import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './folders.mjs';
import { run } from './processes.mjs';
import { StepError } from './steps.mjs';

/**
 * The part of a lock file that tells what is installed where.
 * @typedef {{ packages: Record<string, { version?: string, optional?: boolean }> }} Lock
 */

/**
 * Whether what is installed differs from what the lock file asks for. Optional packages, which belong to
 * other systems, may be missing.
 *
 * @param {Lock} wanted package-lock.json
 * @param {Lock} installed npm's own record, written when an installation is complete
 * @returns {boolean}
 */
export function differs(wanted, installed) {
  const present = installed.packages;
  return Object.entries(wanted.packages).some(([path, { version, optional }]) => {
    if (path === '') return false;
    const found = present[path];
    return found === undefined ? !optional : found.version !== version;
  });
}

/** @returns {boolean} whether packages have to be installed */
export function packagesAreStale() {
  const read = (/** @type {string} */ path) => JSON.parse(readFileSync(join(root, path), 'utf8'));
  /** @type {Lock} */
  let installed;
  try {
    installed = read('node_modules/.package-lock.json');
  } catch {
    return true;
  }
  return differs(read('package-lock.json'), installed);
}

/**
 * Installs exactly what package-lock.json names.
 *
 * @throws {StepError}
 */
export async function installPackages() {
  const args = ['ci', '--include=dev', '--no-audit', '--no-fund'];
  const npm = process.env['npm_execpath'];
  const { status } = npm
    ? await run(process.execPath, [npm, ...args], { quiet: true })
    : await run('npm', args, { quiet: true });
  if (status !== 0) {
    throw new StepError('`npm ci` failed: see its messages above, check the network, start again.');
  }
}
