import { spawn, spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { setTimeout as wait } from 'node:timers/promises';
import { root } from './folders.mjs';

/**
 * Runs a program to its end, its output shown.
 *
 * @param {string} program
 * @param {string[]} args
 * @param {{ env?: NodeJS.ProcessEnv, quiet?: boolean }} [options] quiet: output is shown only on failure
 * @returns {Promise<number>} exit status; 1 when a signal ended it
 */
export function run(program, args, { env = process.env, quiet = false } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, {
      cwd: root,
      env,
      stdio: quiet ? ['ignore', 'pipe', 'pipe'] : ['ignore', 'inherit', 'inherit'],
    });
    /** @type {Buffer[]} */
    const held = [];
    child.stdout?.on('data', (chunk) => held.push(chunk));
    child.stderr?.on('data', (chunk) => held.push(chunk));
    child.on('error', reject);
    child.on('close', (code) => {
      if (code !== 0) process.stderr.write(Buffer.concat(held));
      resolve(code ?? 1);
    });
  });
}

/**
 * Runs one of the project's TypeScript scripts under tsx.
 *
 * @param {string} script path from the root
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<number>} exit status
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
