import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { installPostgresPackage } from './debian.mjs';
import { StepError } from './steps.mjs';

/**
 * The system user that PostgreSQL runs as; undefined: the present one.
 * @typedef {{ uid: number, gid: number } | undefined} Account
 */

/** @returns {Account} PostgreSQL refuses to run as root, so root hands over to `postgres` or `nobody` */
export function postgresAccount() {
  if (process.getuid?.() !== 0) return undefined;
  const users = readFileSync('/etc/passwd', 'utf8').split('\n');
  for (const name of ['postgres', 'nobody']) {
    const fields = users.map((line) => line.split(':')).find((field) => field[0] === name);
    if (fields) return { uid: Number(fields[2]), gid: Number(fields[3]) };
  }
  throw new StepError('PostgreSQL cannot run as root and there is no user `postgres` or `nobody`.');
}

/** @returns {string | undefined} the folder with initdb, pg_ctl and psql */
export function findPostgres() {
  const versions = '/usr/lib/postgresql';
  const debian = existsSync(versions)
    ? readdirSync(versions)
        .sort((a, b) => Number(b) - Number(a))
        .map((version) => join(versions, version, 'bin'))
    : [];
  const asked = spawnSync('pg_config', ['--bindir'], { encoding: 'utf8' });
  const candidates = [
    process.env['PG_BIN'],
    ...debian,
    asked.status === 0 ? asked.stdout.trim() : undefined,
    ...(process.env['PATH'] ?? '').split(':'),
  ];
  return candidates.find(
    (folder) =>
      folder && ['initdb', 'pg_ctl', 'psql'].every((name) => existsSync(join(folder, name))),
  );
}

/**
 * The folder with PostgreSQL's programs; installs them where they are missing and that is allowed.
 *
 * @returns {Promise<{ bin: string, installed: boolean }>}
 * @throws {StepError}
 */
export async function providePostgres() {
  const found = findPostgres();
  if (found !== undefined) return { bin: found, installed: false };
  await installPostgresPackage();
  const bin = findPostgres();
  if (bin === undefined) {
    throw new StepError(
      'PostgreSQL is installed but not found: set PG_BIN to the folder of initdb.',
    );
  }
  return { bin, installed: true };
}

/**
 * Runs one of PostgreSQL's programs as its system user.
 *
 * @param {string} bin
 * @param {Account} account
 * @param {string} program
 * @param {string[]} args
 * @param {{ input?: string, env?: NodeJS.ProcessEnv, silent?: boolean }} [options] silent: pg_ctl start,
 *   whose server would keep an output pipe open for ever
 * @returns {{ status: number, output: string }}
 */
export function runPostgres(bin, account, program, args, { input, env, silent = false } = {}) {
  const done = spawnSync(join(bin, program), args, {
    ...account,
    cwd: '/',
    encoding: 'utf8',
    env: { PATH: process.env['PATH'], LC_ALL: 'C.UTF-8', TZ: 'UTC', ...env },
    ...(input === undefined ? {} : { input }),
    ...(silent ? { stdio: 'ignore' } : {}),
  });
  if (done.error) throw done.error;
  return { status: done.status ?? 1, output: `${done.stdout ?? ''}${done.stderr ?? ''}`.trim() };
}
