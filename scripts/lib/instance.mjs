import { startTime, stopProcess } from './processes.mjs';
import { readState, removeState, writeState } from './stateFile.mjs';
import { StepError } from './steps.mjs';

const STATE = 'running.json';

/** What is left over gets this long for the requests under way. */
const STOP_PATIENCE_MS = 25_000;

/**
 * A process, told from a later one with the same number by when it started.
 * @typedef {{ pid: number, started: string | undefined }} Running
 */

/**
 * What this checkout has running. `npm` is the npm that started the script, if one did.
 * @typedef {{ script: Running, npm?: Running, address: string, servers: Running[] }} Instance
 */

/**
 * @param {number} pid
 * @returns {Running}
 */
function identify(pid) {
  return { pid, started: startTime(pid) };
}

/** @param {Running} process */
function isAlive({ pid, started }) {
  return started !== undefined && startTime(pid) === started;
}

/**
 * Makes sure that nothing else runs from this checkout; stops what a killed start left behind: servers
 * without their script, or a script without its npm.
 *
 * @returns {Promise<number>} how many left-over processes were stopped
 * @throws {StepError} when another start is alive
 */
export async function recoverInstance() {
  const last = /** @type {Instance | undefined} */ (readState(STATE));
  if (last === undefined) return 0;
  if (isAlive(last.script) && (!last.npm || isAlive(last.npm))) {
    throw new StepError(
      `Ringstead already runs from this folder at ${last.address} (process ${last.script.pid}): stop that one first.`,
    );
  }
  // A script stops its servers itself, and PostgreSQL after them: it goes first.
  const left = [last.script, ...last.servers].filter(isAlive);
  for (const { pid } of left) await stopProcess(pid, STOP_PATIENCE_MS);
  removeState(STATE);
  return left.length;
}

/**
 * Records what runs, for a later start to find after this script was killed.
 *
 * @param {string} address
 * @param {number[]} pids of the servers
 */
export function recordInstance(address, pids) {
  /** @type {Instance} */
  const instance = {
    script: identify(process.pid),
    ...(process.env['npm_lifecycle_event'] ? { npm: identify(process.ppid) } : {}),
    address,
    servers: pids.map(identify),
  };
  writeState(STATE, instance);
}

/** Forgets what ran, once it has stopped. */
export function forgetInstance() {
  removeState(STATE);
}
