import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { chmodSync, mkdtempSync, readFileSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from '@playwright/test';
import { root } from '#scripts/lib/folders.mjs';
import { freePort, probePort } from '#scripts/lib/ports.mjs';
import { startTime } from '#scripts/lib/processes.mjs';

/** `npm start` with a private cluster of its own, beside whatever runs in this checkout. */
test.describe.configure({ mode: 'serial' });

let state: string;
let port: number;
let npm: ChildProcess;

test.beforeAll(async () => {
  state = mkdtempSync(join(tmpdir(), 'ringstead-start-'));
  // PostgreSQL runs as another user, who has to pass through.
  chmodSync(state, 0o711);
  port = await freePort();
});

test.afterAll(async () => {
  if (npm.exitCode === null) {
    npm.kill('SIGTERM');
    await once(npm, 'exit');
  }
  rmSync(state, { recursive: true, force: true });
});

/** Starts the product; gives what it printed until it ran. */
async function start(): Promise<string> {
  npm = spawn('npm', ['start'], {
    cwd: root,
    // An empty DATABASE_URL asks for the private cluster.
    env: { ...process.env, RINGSTEAD_STATE: state, PORT: String(port), DATABASE_URL: '' },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let printed = '';
  await new Promise<void>((resolve, reject) => {
    const read = (text: string) => {
      printed += text;
      if (/^ {2}lead .*$/m.test(printed)) resolve();
    };
    npm.stdout?.setEncoding('utf8').on('data', read);
    npm.stderr?.setEncoding('utf8').on('data', read);
    npm.on('exit', () => reject(new Error(`It stopped:\n${printed}`)));
  });
  return printed;
}

interface Instance {
  readonly script: { readonly pid: number };
  readonly servers: readonly { readonly pid: number }[];
}

function instance(): Instance {
  return JSON.parse(readFileSync(join(state, 'running.json'), 'utf8')) as Instance;
}

function postmaster(): number {
  const { base } = JSON.parse(readFileSync(join(state, 'cluster.json'), 'utf8')) as {
    base: string;
  };
  return Number(readFileSync(join(base, 'data/postmaster.pid'), 'utf8').split('\n')[0]);
}

async function signIn(printed: string): Promise<Response> {
  const [, email = '', password = ''] = /^ {2}lead +(\S+) {2}(.+)$/m.exec(printed) ?? [];
  const address = `http://127.0.0.1:${port}`;
  const nobody = await fetch(`${address}/api/session`);
  const { csrfToken } = (await nobody.json()) as { csrfToken: string };
  return fetch(`${address}/api/session`, {
    method: 'POST',
    headers: {
      'content-type': 'application/json',
      'x-csrf-token': csrfToken,
      cookie: nobody.headers
        .getSetCookie()
        .map((one) => one.split(';')[0])
        .join('; '),
    },
    body: JSON.stringify({ email, password }),
  });
}

test('sets everything up, then prints the address and a sign-in for each role', async () => {
  const printed = await start();
  expect(printed).toContain(`http://127.0.0.1:${port}`);
  for (const role of ['designer', 'reviewer', 'lead']) {
    expect(printed).toMatch(new RegExp(`^ {2}${role} +\\S+@\\S+ {2}\\S.*$`, 'm'));
  }
  expect((await signIn(printed)).status).toBe(200);
  expect(statSync(join(state, 'secrets.json')).mode & 0o777).toBe(0o600);
});

test('refuses a second start beside the first', async () => {
  const running = npm;
  await expect(start()).rejects.toThrow(/already runs from this folder at/);
  npm = running;
});

test('recovers after everything was killed', async () => {
  const { script, servers } = instance();
  const pids = [script.pid, ...servers.map(({ pid }) => pid), postmaster()];
  const ended = once(npm, 'exit');
  for (const pid of pids) process.kill(pid, 'SIGKILL');
  await ended;
  const printed = await start();
  expect((await signIn(printed)).status).toBe(200);
});

test('recovers after the script alone was killed, its server and PostgreSQL still running', async () => {
  const { script, servers } = instance();
  const ended = once(npm, 'exit');
  process.kill(script.pid, 'SIGKILL');
  await ended;
  const printed = await start();
  expect(servers.map(({ pid }) => startTime(pid))).toEqual(servers.map(() => undefined));
  expect((await signIn(printed)).status).toBe(200);
});

test('stops all that it started when told to', async () => {
  const { script, servers } = instance();
  const pids = [script.pid, ...servers.map(({ pid }) => pid), postmaster()];
  npm.kill('SIGTERM');
  await once(npm, 'exit');
  expect(pids.map(startTime)).toEqual(pids.map(() => undefined));
  expect(await probePort(port)).toBe(port);
});
