import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { expect, test } from 'vitest';
import { run, startTime, stopProcess } from '#scripts/lib/processes.mjs';

/** Starts a Node program that prints a line when it is set up; waits for that. */
async function startProgram(source: string) {
  const child = spawn(process.execPath, ['-e', source], { stdio: ['ignore', 'pipe', 'inherit'] });
  await once(child.stdout, 'data');
  if (child.pid === undefined) throw new Error('The program did not start.');
  return { child, pid: child.pid };
}

test('a process that heeds SIGTERM stops by itself', async () => {
  const { child, pid } = await startProgram(
    `process.on('SIGTERM', () => process.exit(7)); setInterval(() => {}, 1e6); console.log('up')`,
  );
  const ended = once(child, 'exit');
  expect(await stopProcess(pid, 10_000)).toBe(true);
  expect(await ended).toEqual([7, null]);
});

test('a process that ignores SIGTERM is ended by force', async () => {
  const { child, pid } = await startProgram(
    `process.on('SIGTERM', () => {}); setInterval(() => {}, 1e6); console.log('up')`,
  );
  const ended = once(child, 'exit');
  expect(await stopProcess(pid, 100)).toBe(false);
  expect(await ended).toEqual([null, 'SIGKILL']);
});

test('a process that is gone has no start time and needs no stopping', async () => {
  const { child, pid } = await startProgram(`console.log('up')`);
  if (child.exitCode === null) await once(child, 'exit');
  expect(startTime(pid)).toBeUndefined();
  expect(await stopProcess(pid, 10)).toBe(true);
});

test('two processes started one after the other are told apart by number and start time', async () => {
  expect(startTime(process.pid)).toMatch(/^\d+$/);
  const { child, pid } = await startProgram(`console.log('up'); setInterval(() => {}, 1e6)`);
  expect(startTime(pid)).not.toBe(startTime(process.pid));
  const ended = once(child, 'exit');
  await stopProcess(pid, 10_000);
  await ended;
});

test('a quiet program gives its status and what it printed', async () => {
  const done = await run(process.execPath, ['-e', `console.log('hello')`], { quiet: true });
  expect(done).toEqual({ status: 0, output: 'hello\n' });
});
