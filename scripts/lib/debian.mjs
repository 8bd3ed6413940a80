import { existsSync, mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { run } from './processes.mjs';
import { StepError } from './steps.mjs';

/** Whether Debian packages may be installed here: apt-get exists and we are root. */
export function mayInstall() {
  return process.getuid?.() === 0 && existsSync('/usr/bin/apt-get');
}

/**
 * Installs a Debian package.
 *
 * @param {string} name
 * @throws {StepError} when it may not or cannot be installed
 */
export async function installDebianPackage(name) {
  if (!mayInstall()) {
    throw new StepError(
      `The Debian package ${name} is missing: install it with \`sudo apt-get install ${name}\`.`,
    );
  }
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const install = ['install', '-y', '--no-install-recommends', name];
  if ((await run('apt-get', ['update'], { env, quiet: true })).status !== 0) {
    throw new StepError('`apt-get update` failed: check the package sources of this machine.');
  }
  if ((await run('apt-get', install, { env, quiet: true })).status !== 0) {
    throw new StepError(`\`apt-get install ${name}\` failed: see its messages above.`);
  }
}

/**
 * Installs PostgreSQL's programs without letting Debian make and start a cluster of its own.
 *
 * @throws {StepError}
 */
export async function installPostgresPackage() {
  const folder = '/etc/postgresql-common/createcluster.d';
  const file = join(folder, 'ringstead.conf');
  const mine = mayInstall() && !existsSync(file);
  if (mine) {
    mkdirSync(folder, { recursive: true });
    writeFileSync(file, 'create_main_cluster = false\n');
  }
  try {
    await installDebianPackage('postgresql');
  } finally {
    // A person who later installs another version here decides that anew.
    if (mine) rmSync(file);
  }
}
