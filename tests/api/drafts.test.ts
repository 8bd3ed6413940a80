import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { fingerprint } from '#shared/frame/fingerprint.ts';
import type { DraftResponse, StaleDraftDetails } from '#shared/schemas/project.ts';
import { aPortal } from '#tests/builders/aFrame.ts';
import { aPerson } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';
import { startApp, type TestApp } from './setup/app.ts';
import { signedIn, visitor, type Client } from './setup/client.ts';
import { aProject } from './setup/project.ts';

let app: TestApp;
let designer: Client;
let second: Client;
let reviewer: Client;
let stranger: Client;
let path: string;

beforeAll(async () => {
  app = await startApp();
  const team = await aTeam();
  const other = await aPerson(team, { name: 'Sable Wynn' });
  designer = await signedIn(app.express, await aPerson(team, { name: 'Perrin Oake' }));
  second = await signedIn(app.express, other);
  reviewer = await signedIn(app.express, await aPerson(team, { role: 'reviewer' }));
  stranger = await signedIn(app.express, await aPerson(team));
  const { id } = await aProject(designer);
  await designer.put(`/api/projects/${id}/members/${other.id}`).expect(200);
  path = `/api/projects/${id}/draft`;
});

afterAll(() => app.stop());

const read = async (): Promise<DraftResponse> =>
  (await designer.get(path).expect(200)).body as DraftResponse;

describe('reading the draft', () => {
  it('gives the document with its defaults; the fingerprint is that of its canonical JSON', async () => {
    const draft = await read();
    expect(draft.document.members[0]).toMatchObject({ id: 'leg 1', massPerLength: 0, roll: 0 });
    expect(draft.fingerprint).toBe(fingerprint(draft.document));
  });

  it('is hidden from strangers', async () => {
    await (await visitor(app.express)).get(path).expect(401);
    await stranger.get(path).expect(404);
    await reviewer.get(path).expect(200);
  });
});

describe('writing the draft', () => {
  it('makes a version of a changed document and none of the same one', async () => {
    const { version, document } = await read();
    const changed = { ...document, name: 'Portal with a name' };
    const first = await designer.put(path, { version, document: changed }).expect(200);
    expect(first.body).toMatchObject({ version: version + 1, fingerprint: fingerprint(changed) });
    const again = await designer.put(path, { version, document: changed }).expect(200);
    expect(again.body).toEqual(first.body);
  });

  it('answers 412 to a stale version with who changed what since, and stores nothing', async () => {
    const { version, document } = await read();
    const nodes = document.nodes.map((node) =>
      node.id === 'right foot' ? { ...node, x: 1.5 } : node,
    );
    await second.put(path, { version, document: { ...document, nodes } }).expect(200);
    const mine = { ...document, name: 'Mine' };
    const refused = await designer.put(path, { version, document: mine }).expect(412);
    const { code, detail, details } = refused.body as {
      code: string;
      detail: string;
      details: StaleDraftDetails;
    };
    expect(code).toBe('stale-version');
    expect(detail).toContain('Sable Wynn');
    expect(details).toMatchObject({ currentVersion: version + 1 });
    expect(details.updatedBy.name).toBe('Sable Wynn');
    expect(details.changes).toEqual([
      { list: 'nodes', id: 'right foot', kind: 'changed', fields: ['x'] },
    ]);
    expect((await read()).document.name).not.toBe('Mine');
  });

  it('lets one of two writers at once win and tells the other', async () => {
    const { version, document } = await read();
    const write = (client: Client, name: string) =>
      client.put(path, { version, document: { ...document, name } }).then(({ status }) => status);
    const statuses = await Promise.all([write(designer, 'One'), write(second, 'Two')]);
    expect(statuses.sort()).toEqual([200, 412]);
    expect((await read()).version).toBe(version + 1);
  });

  it('takes an unfinished frame and refuses a malformed one', async () => {
    const { version, document } = await read();
    const loose = { ...document, members: [{ ...document.members[0], start: 'nowhere' }] };
    const taken = await designer.put(path, { version, document: loose }).expect(200);
    const next = (taken.body as { version: number }).version;
    const malformed = { ...aPortal(), members: 'none' };
    const refused = await designer.put(path, { version: next, document: malformed }).expect(422);
    expect(refused.body).toMatchObject({ code: 'invalid-document' });
    await designer.put(path, { version: 0, document }).expect(422);
    await designer.put(path, { version: next }).expect(422);
    expect((await read()).version).toBe(next);
  });

  it('is for designers of the project', async () => {
    const { version, document } = await read();
    await reviewer.put(path, { version, document }).expect(403);
    await stranger.put(path, { version, document }).expect(404);
  });
});
