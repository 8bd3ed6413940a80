import { pino } from 'pino';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { decodeShapes } from '#shared/analysis/shapesFile.ts';
import type { SolveBrief, SolveResponse } from '#shared/schemas/solve.ts';
import { SolveResult } from '#server/models/SolveResult.ts';
import { startRunner, type Runner } from '#server/workers/runner.ts';
import { aCantilever, aPortal, aRack } from '#tests/builders/aFrame.ts';
import { aPerson } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';
import { startApp, type TestApp } from './setup/app.ts';
import { signedIn, visitor, type Client } from './setup/client.ts';
import { aProject, readSolves, solveAll } from './setup/project.ts';

let app: TestApp;
let runner: Runner;
let designer: Client;
let colleague: Client;
let reviewer: Client;
let foreigner: Client;

beforeAll(async () => {
  app = await startApp();
  runner = await startRunner(app.config, pino({ level: 'silent' }));
  const team = await aTeam();
  designer = await signedIn(app.express, await aPerson(team));
  colleague = await signedIn(app.express, await aPerson(team));
  reviewer = await signedIn(app.express, await aPerson(team, { role: 'reviewer' }));
  foreigner = await signedIn(app.express, await aPerson(await aTeam('Elsewhere')));
});

afterAll(async () => {
  await runner.stop();
  await app.stop();
});

const read = async (client: Client, id: string): Promise<SolveResponse> =>
  (await client.get(`/api/solves/${id}`).expect(200)).body as SolveResponse;

const ask = async (client: Client, body: object): Promise<SolveBrief[]> =>
  ((await client.post('/api/solves', body).expect(202)).body as { solves: SolveBrief[] }).solves;

describe('solving', () => {
  it('queues consistent and lumped and gives the first bending frequency of a cantilever', async () => {
    const { id } = await aProject(
      designer,
      aCantilever({
        length: 2,
        theory: 'bernoulli',
        divisions: 8,
        shape: { kind: 'solid-rectangle', width: 0.05, height: 0.05 },
      }),
    );
    const asked = await ask(designer, { projectId: id });
    expect(asked.map(({ method }) => method)).toEqual(['consistent', 'lumped']);
    const solves = await solveAll(designer, id);
    expect(solves.map(({ status }) => status)).toEqual(['done', 'done']);
    const consistent = solves.find(({ method }) => method === 'consistent');
    // Euler-Bernoulli cantilever: f = (1.87510² / 2π) √(EI / ρA L⁴) (Blevins 1979, table 8-1). The mesh of 8 is
    // within 1e-4 of the continuous beam for the first mode.
    const { E, rho, h, L } = { E: 210e9, rho: 7850, h: 0.05, L: 2 };
    const exact =
      (1.8751040687 ** 2 / (2 * Math.PI)) * Math.sqrt((E * h * h) / (12 * rho * L ** 4));
    expect(Math.abs((consistent?.firstFrequencyHz ?? 0) / exact - 1)).toBeLessThan(1e-4);
    expect(consistent).toMatchObject({ complete: true, progress: 1, error: null });
    const whole = await read(reviewer, consistent?.id ?? '');
    expect(whole.summary?.modes[0]?.frequencyHz).toBe(consistent?.firstFrequencyHz);
    expect(whole.summary?.timing.total).toBeGreaterThan(0);
    const list = await designer.get('/api/projects').expect(200);
    const { projects } = list.body as { projects: { id: string; firstFrequencyHz: number }[] };
    expect(projects.find((project) => project.id === id)?.firstFrequencyHz).toBe(
      consistent?.firstFrequencyHz,
    );
  });

  it('gives the shapes as the binary file', async () => {
    const { id } = await aProject(designer);
    const [solve] = await solveAll(designer, id);
    const response = await designer
      .get(`/api/solves/${solve?.id}/shapes`)
      .buffer(true)
      .parse((stream, done) => {
        const parts: Buffer[] = [];
        stream.on('data', (part: Buffer) => parts.push(part));
        stream.on('end', () => done(null, Buffer.concat(parts)));
      })
      .expect(200);
    const shapes = decodeShapes(response.body as Uint8Array);
    const { summary } = await read(designer, solve?.id ?? '');
    expect(shapes.modes).toBe(summary?.modes.length);
    await foreigner.get(`/api/solves/${solve?.id}/shapes`).expect(404);
  });

  it('gives a stored result at once to another project of the team, and to no other team', async () => {
    const document = aPortal({ width: 1.37 });
    const first = await aProject(designer, document);
    await solveAll(designer, first.id);
    const stored = await SolveResult.count();
    const second = await aProject(colleague, document);
    const solves = await ask(colleague, { projectId: second.id });
    expect(solves.map(({ status }) => status)).toEqual(['done', 'done']);
    expect(await SolveResult.count()).toBe(stored);
    const elsewhere = await aProject(foreigner, document);
    await solveAll(foreigner, elsewhere.id);
    // Two results of their own: nothing was taken from the other team's.
    expect(await SolveResult.count()).toBe(stored + 2);
  });

  it('gives the same solve to whoever asks again, done or under way', async () => {
    const { id } = await aProject(designer, aPortal({ width: 1.41 }));
    const [one, two] = await Promise.all([
      ask(designer, { projectId: id }),
      ask(reviewer, { projectId: id }),
    ]);
    const ids = one.map((solve) => solve.id);
    expect(two.map((solve) => solve.id)).toEqual(ids);
    await solveAll(designer, id);
    expect((await ask(designer, { projectId: id })).map((solve) => solve.id)).toEqual(ids);
    expect(await readSolves(designer, id)).toHaveLength(2);
  });

  it('says why a mechanism fails, naming what moves', async () => {
    const spinning = aPortal();
    const rail = spinning.members.find((member) => member.id === 'rail')!;
    rail.joints = { start: { rx: 0 }, end: { rx: 0 } };
    const { id } = await aProject(designer, spinning);
    const [solve] = await solveAll(designer, id);
    expect(solve).toMatchObject({ status: 'failed', complete: null, error: { code: 'mechanism' } });
    expect(solve?.error?.message).toContain('rail');
  });

  it('refuses what cannot be solved before queueing it, with every reason', async () => {
    const broken = aPortal();
    broken.members[0]!.section = 'none';
    broken.members[1]!.material = 'none';
    const { id } = await aProject(designer, broken);
    const refused = await designer.post('/api/solves', { projectId: id }).expect(422);
    const { errors } = refused.body as { errors: { path: string }[] };
    expect(errors.map(({ path }) => path).sort()).toEqual([
      'members.0.section',
      'members.1.material',
    ]);
    const sound = await aProject(designer);
    await designer.post('/api/solves', { projectId: sound.id, stateId: 'no such' }).expect(422);
    await designer.post('/api/solves', { projectId: sound.id, methods: ['guessing'] }).expect(422);
    expect(await readSolves(designer, id)).toEqual([]);
  });

  it('is hidden from strangers', async () => {
    const { id } = await aProject(designer);
    await (await visitor(app.express)).post('/api/solves', { projectId: id }).expect(401);
    await colleague.post('/api/solves', { projectId: id }).expect(404);
    await foreigner.get(`/api/solves?projectId=${id}`).expect(404);
  });
});

describe('cancelling', () => {
  it('ends a running solve in under a second, and the runner goes on with the next', async () => {
    const { id } = await aProject(designer, aRack({ bays: 5, storeys: 6, divisions: 14 }));
    const [solve] = await ask(designer, {
      projectId: id,
      methods: ['consistent'],
      settings: { modes: 200 },
    });
    await vi.waitFor(
      async () => {
        expect((await read(designer, solve?.id ?? '')).status).toBe('running');
      },
      { timeout: 10_000, interval: 50 },
    );
    await colleague.post(`/api/solves/${solve?.id}/cancel`).expect(404);
    const began = performance.now();
    const cancelled = await designer.post(`/api/solves/${solve?.id}/cancel`).expect(200);
    expect(performance.now() - began).toBeLessThan(1_000);
    expect(cancelled.body).toMatchObject({ status: 'cancelled', abilities: { cancel: false } });
    const again = await designer.post(`/api/solves/${solve?.id}/cancel`).expect(200);
    expect(again.body).toEqual(cancelled.body);
    const next = await aProject(designer, aPortal({ width: 1.53 }));
    const solves = await solveAll(designer, next.id);
    expect(solves.map(({ status }) => status)).toEqual(['done', 'done']);
    expect((await read(designer, solve?.id ?? '')).status).toBe('cancelled');
  });
});
