import { spawn, spawnSync } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync } from 'node:fs';
import { setTimeout as wait } from 'node:timers/promises';
import { root } from './folders.mjs';

/**
 * Programs that `run` has under way.
 * @type {Set<import('node:child_process').ChildProcess>}
 */
const children = new Set();

/** Asks the programs that `run` has under way to stop, and waits until they have. */
export async function stopChildren() {
  await Promise.all(
    [...children].map((child) => {
      const closed = once(child, 'close');
      child.kill('SIGTERM');
      return closed;
    }),
  );
}

/**
 * Runs a program to its end.
 *
 * @param {string} program
 * @param {string[]} args
 * @param {{ env?: NodeJS.ProcessEnv, quiet?: boolean }} [options] quiet: what it prints is shown only when
 *   it fails
 * @returns {Promise<{ status: number, output: string }>} exit status, 1 when a signal ended it; what a
 *   quiet one wrote to standard output
 */
export function run(program, args, { env = process.env, quiet = false } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, {
      cwd: root,
      env,
      stdio: quiet ? ['ignore', 'pipe', 'pipe'] : ['ignore', 'inherit', 'inherit'],
    });
    children.add(child);
    let output = '';
    let errors = '';
    child.stdout?.setEncoding('utf8').on('data', (text) => (output += text));
    child.stderr?.setEncoding('utf8').on('data', (text) => (errors += text));
    child.on('error', reject);
    child.on('close', (code) => {
      children.delete(child);
      if (code !== 0) process.stderr.write(output + errors);
      resolve({ status: code ?? 1, output });
    });
  });
}

/**
 * Runs one of the project's TypeScript scripts under tsx.
 *
 * @param {string} script path from the root
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<{ status: number, output: string }>}
 */
export function runScript(script, args, env) {
  return run(process.execPath, ['--import', 'tsx', script, ...args], { env, quiet: true });
}

/**
 * @param {string} program
 * @returns {boolean} whether the program is on the PATH
 */
export function hasProgram(program) {
  return spawnSync('/bin/sh', ['-c', `command -v "$0"`, program], { stdio: 'ignore' }).status === 0;
}

/**
 * What tells a process from a later one with the same number: its start time, in clock ticks since boot.
 *
 * @param {number} pid
 * @returns {string | undefined} undefined when no such process runs
 */
export function startTime(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    // The name, in brackets, may hold spaces: count from its closing bracket (proc(5), field 22).
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    return fields[0] === 'Z' ? undefined : fields[19];
  } catch {
    return undefined;
  }
}

/**
 * @param {number} pid
 * @returns {string} the command line, empty when no such process runs
 */
export function commandLine(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').replaceAll('\0', ' ');
  } catch {
    return '';
  }
}

/**
 * Asks a process to stop and waits for it; ends it by force when it has not stopped in time.
 *
 * @param {number} pid
 * @param {number} patienceMs
 * @returns {Promise<boolean>} whether it stopped by itself
 */
export async function stopProcess(pid, patienceMs) {
  const started = startTime(pid);
  if (started === undefined) return true;
  process.kill(pid, 'SIGTERM');
  const deadline = performance.now() + patienceMs;
  while (startTime(pid) === started) {
    if (performance.now() > deadline) {
      process.kill(pid, 'SIGKILL');
      return false;
    }
    await wait(20);
  }
  return true;
}
