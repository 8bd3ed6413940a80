import { createHash, randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ProjectResponse, ProjectSummary } from '#shared/schemas/project.ts';
import { DEFAULT_SOLVE_SETTINGS } from '#shared/schemas/solveResult.ts';
import type { Person } from '#server/models/Person.ts';
import { SolveResult } from '#server/models/SolveResult.ts';
import { aPortal } from '#tests/builders/aFrame.ts';
import { aPerson } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';
import { startApp, type TestApp } from './setup/app.ts';
import { signedIn, visitor, type Client } from './setup/client.ts';
import { aProject } from './setup/project.ts';

const sha256 = (text: string): string => createHash('sha256').update(text).digest('hex');
const NO_TIME = {
  ...{ read: 0, assemble: 0, order: 0, symbolic: 0, factor: 0 },
  ...{ iterate: 0, finish: 0, certify: 0, total: 0 },
};

let app: TestApp;
let designer: Client;
let guest: Client;
let lead: Client;
let foreigner: Client;
let guestPerson: Person;
let foreignPerson: Person;

beforeAll(async () => {
  app = await startApp();
  const team = await aTeam();
  const other = await aTeam('Elsewhere');
  guestPerson = await aPerson(team, { role: 'guest' });
  foreignPerson = await aPerson(other);
  designer = await signedIn(app.express, await aPerson(team));
  guest = await signedIn(app.express, guestPerson);
  lead = await signedIn(app.express, await aPerson(team, { role: 'lead' }));
  foreigner = await signedIn(app.express, foreignPerson);
});

afterAll(() => app.stop());

const list = async (client: Client, search = ''): Promise<ProjectSummary[]> => {
  const response = await client.get(`/api/projects?search=${encodeURIComponent(search)}`);
  return (response.body as { projects: ProjectSummary[] }).projects;
};

describe('making a project', () => {
  it('stores the document with its defaults as draft version 1, shared with its maker', async () => {
    const project = await aProject(designer);
    expect(project).toMatchObject({
      ...{ name: 'Stand 4', machine: 'Press 12', draftVersion: 1, waitsFor: 'designer' },
      ...{ waitsForMe: true, latestRevision: null, approvedRevision: null, firstFrequencyHz: null },
      firstFrequencyComplete: null,
    });
    expect(project.abilities).toEqual({
      ...{ edit: true, rename: true, manageMembers: true, solve: true, submit: true },
    });
    expect(project.members).toHaveLength(1);
  });

  it('makes one project of a repeated request, and refuses an id of somebody else', async () => {
    const request = { id: randomUUID(), name: 'Twice', document: aPortal() };
    await designer.post('/api/projects', request).expect(201);
    await designer.post('/api/projects', request).expect(201);
    expect(await list(designer, 'Twice')).toHaveLength(1);
    await foreigner.post('/api/projects', request).expect(409);
  });

  it('makes one project when the same request arrives twice at once', async () => {
    const request = { id: randomUUID(), name: 'At once', document: aPortal() };
    const send = () => designer.post('/api/projects', request).then(({ status }) => status);
    const statuses = await Promise.all([send(), send()]);
    expect(statuses).toContain(201);
    expect(statuses.every((status) => status === 201 || status === 409)).toBe(true);
    expect(await list(designer, 'At once')).toHaveLength(1);
  });

  it('takes a blank sheet, and refuses a malformed document with every path, storing nothing', async () => {
    const blank = { id: randomUUID(), name: 'Blank', document: { name: 'Blank' } };
    await designer.post('/api/projects', blank).expect(201);
    const broken = { name: 'Broken', nodes: [{ id: 'a', x: 'left', z: 0 }], colour: 'red' };
    const response = await designer
      .post('/api/projects', { id: randomUUID(), name: 'Broken', document: broken })
      .expect(422);
    expect(response.body).toMatchObject({ code: 'invalid-document' });
    const { errors } = response.body as { errors: { path: string }[] };
    expect(errors.map(({ path }) => path).sort()).toEqual(['colour', 'nodes.0.x']);
    expect(await list(designer, 'Broken')).toEqual([]);
  });

  it('is for designers', async () => {
    const request = { id: randomUUID(), name: 'No', document: aPortal() };
    await (await visitor(app.express)).post('/api/projects', request).expect(401);
    await guest.post('/api/projects', request).expect(403);
    await lead.post('/api/projects', request).expect(403);
    await designer.post('/api/projects', { ...request, name: ' ' }).expect(422);
  });
});

describe('the list', () => {
  it('finds in name and machine, whatever the case, and takes % and _ as they are', async () => {
    const id = randomUUID();
    await designer
      .post('/api/projects', { id, name: 'Mill 100%', machine: 'Saw_9', document: aPortal() })
      .expect(201);
    for (const search of ['mill', '100%', 'saw_9']) {
      expect((await list(designer, search)).map((project) => project.id)).toEqual([id]);
    }
    expect(await list(designer, 'saw%9')).toEqual([]);
  });

  it('shows leads everything, guests what is shared with them, strangers nothing', async () => {
    const { id } = await aProject(designer);
    const has = async (client: Client) => (await list(client)).some((row) => row.id === id);
    expect(await has(lead)).toBe(true);
    expect(await has(guest)).toBe(false);
    expect(await has(foreigner)).toBe(false);
    await guest.get(`/api/projects/${id}`).expect(404);
    await designer.put(`/api/projects/${id}/members/${guestPerson.id}`).expect(200);
    expect(await has(guest)).toBe(true);
    await guest.get(`/api/projects/${id}/draft`).expect(200);
    await guest.patch(`/api/projects/${id}`, { name: 'Mine' }).expect(403);
    await designer.delete(`/api/projects/${id}/members/${guestPerson.id}`).expect(200);
    await guest.get(`/api/projects/${id}`).expect(404);
  });

  it('shares with people of the team only, and sharing twice is sharing once', async () => {
    const { id } = await aProject(designer);
    await designer.put(`/api/projects/${id}/members/${foreignPerson.id}`).expect(404);
    await designer.put(`/api/projects/${id}/members/${guestPerson.id}`).expect(200);
    const twice = await designer.put(`/api/projects/${id}/members/${guestPerson.id}`).expect(200);
    expect((twice.body as ProjectResponse).members).toHaveLength(2);
    await foreigner.put(`/api/projects/${id}/members/${foreignPerson.id}`).expect(404);
  });
});

describe('first natural frequency of the draft', () => {
  it('is marked incomplete until the solve of every state is complete', async () => {
    const project = await aProject(designer);
    const { teamId } = guestPerson;
    /** What a solver would have stored; the summary is not looked at here. */
    const store = (stateId: string, digit: string, complete: boolean, firstFrequencyHz: number) =>
      SolveResult.create({
        ...{ teamId, key: digit.repeat(64), stateId, complete, firstFrequencyHz },
        ...{ documentFingerprint: project.draftFingerprint, method: 'consistent' },
        ...{ settings: DEFAULT_SOLVE_SETTINGS, solverVersion: 'of the test', timing: NO_TIME },
        ...{ summary: '{}', summaryFingerprint: sha256('{}') },
        ...{ shapes: Buffer.alloc(0), shapesFingerprint: sha256('') },
      });
    const first = async () => (await list(designer)).find(({ id }) => id === project.id);
    await store('full', 'a', true, 42);
    expect(await first()).toMatchObject({ firstFrequencyHz: 42, firstFrequencyComplete: true });
    await store('empty', 'b', false, 50);
    expect(await first()).toMatchObject({ firstFrequencyHz: 42, firstFrequencyComplete: false });
    await store('empty', 'c', true, 41);
    expect(await first()).toMatchObject({ firstFrequencyHz: 41, firstFrequencyComplete: true });
  });
});

describe('renaming', () => {
  it('changes name and machine and says so in the activity', async () => {
    const { id } = await aProject(designer);
    const renamed = await designer
      .patch(`/api/projects/${id}`, { name: 'Stand 5', machine: '' })
      .expect(200);
    expect(renamed.body).toMatchObject({ name: 'Stand 5', machine: '' });
    const activity = await designer.get(`/api/activity?projectId=${id}`).expect(200);
    const { entries } = activity.body as { entries: { action: string }[] };
    expect(entries.map(({ action }) => action)).toEqual(['project-changed', 'project-created']);
  });
});
