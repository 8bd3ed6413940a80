import { spawnSync } from 'node:child_process';
import {
  chownSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmdirSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { freePort, probePort } from './ports.mjs';
import { postgresAccount, runPostgres } from './postgres.mjs';
import { commandLine } from './processes.mjs';
import { StepError } from './steps.mjs';

/**
 * A PostgreSQL cluster of our own, on loopback alone.
 * @typedef {object} Cluster
 * @property {string} bin PostgreSQL's programs
 * @property {import('./postgres.mjs').Account} account
 * @property {string} base the cluster's folder: `data` and `log` in it
 * @property {number} port
 * @property {string} superuserPassword of the role `postgres`, which the product never uses
 */

/** Written to disk once per commit is what a real cluster is for; a throw-away one has nothing to lose. */
const THROW_AWAY = '-c fsync=off -c synchronous_commit=off -c full_page_writes=off';

/** A start right after a crash can fail on a stale lock file until the old backends are gone. */
const START_PATIENCE_MS = 10_000;

/**
 * The first of the candidate folders that PostgreSQL's system user can work in; made when missing.
 *
 * @param {string[]} candidates absolute paths
 * @param {import('./postgres.mjs').Account} account
 * @returns {string}
 * @throws {StepError} when it can work in none of them
 */
export function usableFolder(candidates, account) {
  for (const folder of candidates) {
    try {
      mkdirSync(folder, { recursive: true, mode: 0o700 });
      if (account) chownSync(folder, account.uid, account.gid);
    } catch {
      continue;
    }
    const probe = spawnSync('/bin/sh', ['-c', 'cd "$0" && test -w .', folder], {
      ...account,
      cwd: '/',
      stdio: 'ignore',
    });
    if (probe.status === 0) return folder;
    removeIfEmpty(folder);
  }
  throw new StepError(`PostgreSQL can write to none of: ${candidates.join(', ')}.`);
}

/**
 * Makes the cluster's files where they are missing. An interrupted attempt leaves nothing that counts.
 *
 * @param {string} bin
 * @param {string} base from `usableFolder`
 * @param {string} superuserPassword
 * @returns {boolean} whether they had to be made
 */
export function initCluster(bin, base, superuserPassword) {
  const account = postgresAccount();
  const data = join(base, 'data');
  if (existsSync(data)) return false;
  const unfinished = join(base, 'data.new');
  const passwordFile = join(base, 'password');
  rmSync(unfinished, { recursive: true, force: true });
  writeFileSync(passwordFile, superuserPassword, { mode: 0o600 });
  if (account) chownSync(passwordFile, account.uid, account.gid);
  const made = runPostgres(bin, account, 'initdb', [
    ...['-D', unfinished, '-U', 'postgres', '-A', 'scram-sha-256', '--pwfile', passwordFile],
    ...['-E', 'UTF8', '--locale=C.UTF-8'],
  ]);
  rmSync(passwordFile);
  if (made.status !== 0) {
    throw new StepError(`PostgreSQL cannot make its files in ${base}: ${mainLine(made.output)}`);
  }
  renameSync(unfinished, data);
  return true;
}

/**
 * Starts the cluster, or finds it running.
 *
 * @param {{ bin: string, base: string, superuserPassword: string, port?: number, throwAway?: boolean }}
 *   options port: preferred, another one is taken when it is not free
 * @returns {Promise<Cluster & { wasRunning: boolean }>}
 * @throws {StepError}
 */
export async function startCluster({ bin, base, superuserPassword, port, throwAway = false }) {
  const account = postgresAccount();
  const data = join(base, 'data');
  const running = runningPort(data);
  if (running !== undefined && answers(bin, account, running)) {
    return { bin, account, base, port: running, superuserPassword, wasRunning: true };
  }
  const deadline = performance.now() + START_PATIENCE_MS;
  for (;;) {
    const chosen = (port === undefined ? undefined : await probePort(port)) ?? (await freePort());
    const options = [
      `-h 127.0.0.1 -p ${chosen}`,
      `-c unix_socket_directories='' -c max_connections=200`,
      ...(throwAway ? [THROW_AWAY] : []),
    ].join(' ');
    const started = runPostgres(
      bin,
      account,
      'pg_ctl',
      ['-D', data, '-l', join(base, 'log'), '-w', '-o', options, 'start'],
      { silent: true },
    );
    if (started.status === 0) {
      return { bin, account, base, port: chosen, superuserPassword, wasRunning: false };
    }
    if (performance.now() > deadline) {
      throw new StepError(`PostgreSQL does not start: read the end of ${join(base, 'log')}.`);
    }
    await wait(250);
  }
}

/**
 * Stops the cluster; transactions under way are rolled back.
 *
 * @param {Pick<Cluster, 'bin' | 'account' | 'base'>} cluster
 */
export function stopCluster({ bin, account, base }) {
  runPostgres(bin, account, 'pg_ctl', ['-D', join(base, 'data'), '-m', 'fast', '-w', 'stop'], {
    silent: true,
  });
}

/**
 * Runs SQL as the superuser. Passwords travel on standard input and in the environment, where other
 * users of the machine cannot read them.
 *
 * @param {Cluster} cluster
 * @param {string} database
 * @param {string} sql
 * @returns {string} what psql printed
 * @throws {StepError}
 */
export function runSql(cluster, database, sql) {
  const done = runPostgres(
    cluster.bin,
    cluster.account,
    'psql',
    [
      ...['-h', '127.0.0.1', '-p', String(cluster.port), '-U', 'postgres', '-d', database],
      ...['-v', 'ON_ERROR_STOP=1', '-qAtX', '-f', '-'],
    ],
    { input: sql, env: { PGPASSWORD: cluster.superuserPassword } },
  );
  if (done.status !== 0) throw new StepError(`PostgreSQL refused: ${mainLine(done.output)}`);
  return done.output;
}

/**
 * The port on which a cluster with these files runs. A lock file whose process number now belongs to
 * something else is removed, since PostgreSQL would refuse to start beside it.
 *
 * @param {string} data
 * @returns {number | undefined}
 */
function runningPort(data) {
  const lockFile = join(data, 'postmaster.pid');
  if (!existsSync(lockFile)) return undefined;
  const [pid, , , port] = readFileSync(lockFile, 'utf8').split('\n');
  const command = commandLine(Number(pid));
  if (command.includes(data)) return Number(port);
  if (command !== '') rmSync(lockFile);
  return undefined;
}

/**
 * @param {string} bin
 * @param {import('./postgres.mjs').Account} account
 * @param {number} port
 * @returns {boolean} whether PostgreSQL takes connections on the port
 */
function answers(bin, account, port) {
  const args = ['-h', '127.0.0.1', '-p', String(port), '-t', '5'];
  return runPostgres(bin, account, 'pg_isready', args).status === 0;
}

/** @param {string} folder one that holds anything stays */
function removeIfEmpty(folder) {
  if (readdirSync(folder).length === 0) rmdirSync(folder);
}

/**
 * @param {string} output
 * @returns {string} the line that says what went wrong, else the last one
 */
function mainLine(output) {
  const lines = output.split('\n');
  return lines.find((line) => /\b(error|FATAL|ERROR):/.test(line)) ?? lines.at(-1) ?? '';
}
