import { spawn } from 'node:child_process';
import { closeSync, openSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { root } from './folders.mjs';
import { stopProcess } from './processes.mjs';
import { StepError } from './steps.mjs';

/** Migrated, connected and with a warm solver thread: a slow machine needs a few seconds. */
const START_PATIENCE_MS = 60_000;

/** The built server. */
export const serverProgram = join(root, 'dist/server/main.js');

/** The built runner. */
export const runnerProgram = join(root, 'dist/server/runner.js');

/** What a request under way may take to finish when the server is told to stop. */
const STOP_PATIENCE_MS = 20_000;

/**
 * A started server.
 * @typedef {{ pid: number, ended: Promise<number> }} Server
 */

/**
 * Starts a Node program of the product in a process group of its own, so that Ctrl-C reaches this script
 * alone, which then stops it in good order.
 *
 * @param {string[]} args for Node
 * @param {NodeJS.ProcessEnv} env
 * @param {string} [logFile] takes what it prints, written anew; without one, this terminal does
 * @returns {Server}
 * @throws {StepError}
 */
export function spawnServer(args, env, logFile) {
  const log = logFile === undefined ? 'inherit' : openSync(logFile, 'w', 0o600);
  const child = spawn(process.execPath, args, {
    cwd: root,
    env,
    stdio: ['ignore', log, log],
    detached: true,
  });
  if (typeof log === 'number') closeSync(log);
  if (child.pid === undefined) throw new StepError('The system starts no further process.');
  return {
    pid: child.pid,
    ended: new Promise((resolve) => child.on('exit', (code) => resolve(code ?? 1))),
  };
}

/**
 * Waits until the server answers that it is ready.
 *
 * @param {Server} server
 * @param {string} address
 * @param {string} logFile
 * @throws {StepError} when it ends or stays silent
 */
export async function waitUntilReady(server, address, logFile) {
  let over = false;
  void server.ended.then(() => (over = true));
  const deadline = performance.now() + START_PATIENCE_MS;
  while (!(await isReady(address))) {
    if (over) throw new StepError(`The server stopped while starting: ${lastMessage(logFile)}`);
    if (performance.now() > deadline) {
      throw new StepError(`The server does not get ready: read ${logFile}.`);
    }
    await wait(50);
  }
}

/**
 * @param {Server} server
 * @returns {Promise<void>}
 */
export async function stopServer({ pid }) {
  await stopProcess(pid, STOP_PATIENCE_MS);
}

/** @param {string} address */
async function isReady(address) {
  try {
    const response = await fetch(`${address}/api/ready`, { signal: AbortSignal.timeout(5_000) });
    return response.ok;
  } catch {
    return false;
  }
}

/**
 * The last line of a log that says something: the message of a JSON line, or an error's own line.
 *
 * @param {string} logFile
 * @returns {string}
 */
function lastMessage(logFile) {
  const lines = readFileSync(logFile, 'utf8').split('\n').filter(Boolean);
  const error = lines.findLast((line) => /^\w*Error\b/.test(line)) ?? lines.at(-1) ?? 'no message';
  try {
    const { msg } = JSON.parse(error);
    return `${msg} (all of it in ${logFile})`;
  } catch {
    return `${error} (all of it in ${logFile})`;
  }
}
