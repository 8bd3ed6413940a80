import { spawn, type ChildProcess } from 'node:child_process';
import { pino } from 'pino';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import type { SolveBrief } from '#shared/schemas/solve.ts';
import { Solve } from '#server/models/Solve.ts';
import { SolveResult } from '#server/models/SolveResult.ts';
import { startRunner } from '#server/workers/runner.ts';
import { aPortal, aRack } from '#tests/builders/aFrame.ts';
import { aPerson } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';
import { startApp, type TestApp } from './setup/app.ts';
import { signedIn, type Client } from './setup/client.ts';
import { aProject } from './setup/project.ts';

let app: TestApp;
let designer: Client;
const children: ChildProcess[] = [];

beforeAll(async () => {
  app = await startApp();
  designer = await signedIn(app.express, await aPerson(await aTeam()));
});

afterEach(() => {
  for (const child of children.splice(0)) child.kill('SIGKILL');
});

afterAll(() => app.stop());

/** A runner in a process of its own, as `npm run runner` starts it. */
function aRunnerProcess(): ChildProcess {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/runner.ts'], {
    env: { ...process.env, DATABASE_URL: app.database.runTime, LOG_LEVEL: 'warn' },
    stdio: ['ignore', 'inherit', 'inherit'],
  });
  children.push(child);
  return child;
}

async function ask(document = aPortal(), settings: object = {}): Promise<Solve> {
  const { id } = await aProject(designer, document);
  const response = await designer
    .post('/api/solves', {
      projectId: id,
      methods: ['consistent'],
      settings: { modes: 6, ...settings },
    })
    .expect(202);
  const [brief] = (response.body as { solves: SolveBrief[] }).solves;
  return Solve.findByPk(brief?.id ?? '', { rejectOnEmpty: true });
}

const reaches = (solve: Solve, status: string, timeout: number): Promise<void> =>
  vi.waitFor(
    async () => {
      await solve.reload();
      expect(solve.status).toBe(status);
    },
    { timeout, interval: 100 },
  );

describe('runners', () => {
  it('give a solve back when they stop in good order', { timeout: 60_000 }, async () => {
    const solve = await ask(aRack({ bays: 5, storeys: 6, divisions: 14 }), { modes: 200 });
    const runner = await startRunner(app.config, pino({ level: 'silent' }));
    await reaches(solve, 'running', 20_000);
    await runner.stop();
    await solve.reload();
    expect(solve.status).toBe('queued');
    await designer.post(`/api/solves/${solve.id}/cancel`).expect(200);
  });

  it('end a solve that takes longer than the limit', { timeout: 60_000 }, async () => {
    const solve = await ask(aRack({ bays: 5, storeys: 6, divisions: 14 }), { modes: 199 });
    const limits = { solveTimeLimitMs: 300, solveMemoryLimitMb: 2_048 };
    const runner = await startRunner(limits, pino({ level: 'silent' }));
    try {
      await reaches(solve, 'failed', 30_000);
      expect(solve.error).toMatchObject({ code: 'time-limit' });
    } finally {
      await runner.stop();
    }
  });

  it('end a solve that needs more memory than the limit', { timeout: 60_000 }, async () => {
    const solve = await ask(aRack({ bays: 5, storeys: 6, divisions: 14 }), { modes: 198 });
    const limits = { solveTimeLimitMs: 60_000, solveMemoryLimitMb: 64 };
    const runner = await startRunner(limits, pino({ level: 'silent' }));
    try {
      await reaches(solve, 'failed', 40_000);
      expect(solve.error).toMatchObject({ code: 'memory-limit' });
    } finally {
      await runner.stop();
    }
  });

  it(
    'take the solve of a runner that was killed, and it ends once',
    { timeout: 120_000 },
    async () => {
      const solve = await ask(aRack({ bays: 2, storeys: 3, divisions: 6 }), { modes: 30 });
      const first = aRunnerProcess();
      await reaches(solve, 'running', 40_000);
      const { runnerId } = solve;
      first.kill('SIGKILL');
      aRunnerProcess();
      await reaches(solve, 'done', 70_000);
      expect(solve.runnerId).not.toBe(runnerId);
      expect(solve.attempt).toBe(2);
      expect(await SolveResult.count({ where: { key: solve.resultKey } })).toBe(1);
    },
  );
});
