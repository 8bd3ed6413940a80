import { createServer, get, type IncomingMessage, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { projectEvent, type ProjectEvent } from '#shared/schemas/project.ts';
import { inTransaction } from '#server/models/database.ts';
import type { Person } from '#server/models/Person.ts';
import { aPortal } from '#tests/builders/aFrame.ts';
import { aPerson, PASSWORD } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';
import { startApp, type TestApp } from './setup/app.ts';
import { signedIn, visitor, type Client } from './setup/client.ts';
import { aProject } from './setup/project.ts';

let app: TestApp;
let server: Server;
let designer: Client;
let guestPerson: Person;
let projectId: string;

beforeAll(async () => {
  app = await startApp();
  server = createServer(app.express);
  await new Promise<void>((resolve) => {
    server.listen(0, '127.0.0.1', resolve);
  });
  const team = await aTeam();
  guestPerson = await aPerson(team, { role: 'guest' });
  designer = await signedIn(app.express, await aPerson(team));
  projectId = (await aProject(designer)).id;
});

afterAll(async () => {
  server.closeAllConnections();
  server.close();
  await app.stop();
});

interface Stream {
  readonly status: number;
  readonly type: string | undefined;
  readonly events: ProjectEvent[];
  ended: boolean;
  readonly close: () => void;
}

/** Follows the project as a browser's EventSource does. */
async function follow(cookie: string): Promise<Stream> {
  const { port } = server.address() as AddressInfo;
  const url = `http://127.0.0.1:${port}/api/projects/${projectId}/events`;
  const response = await new Promise<IncomingMessage>((resolve, reject) => {
    get(url, { headers: { cookie } }, resolve).on('error', reject);
  });
  const stream: Stream = {
    status: response.statusCode ?? 0,
    type: response.headers['content-type'],
    events: [],
    ended: false,
    close: () => response.destroy(),
  };
  response.setEncoding('utf8');
  response.on('data', (text: string) => {
    for (const line of text.split('\n')) {
      if (line.startsWith('data: ')) {
        stream.events.push(projectEvent.parse(JSON.parse(line.slice('data: '.length))));
      }
    }
  });
  response.on('close', () => {
    stream.ended = true;
  });
  return stream;
}

/** Signs in and gives the session's cookie. */
async function cookieOf(person: Person): Promise<string> {
  const client = await visitor(app.express);
  const response = await client.signIn(person.email, PASSWORD);
  const cookies = response.headers['set-cookie'] as unknown as string[];
  return cookies.map((cookie) => cookie.split(';')[0]).join('; ');
}

const share = () =>
  designer.put(`/api/projects/${projectId}/members/${guestPerson.id}`).expect(200);

describe('the event stream of a project', () => {
  it('needs a sign-in and the right to read', async () => {
    const nobody = await follow('');
    expect(nobody.status).toBe(401);
    const stranger = await follow(await cookieOf(guestPerson));
    expect(stranger.status).toBe(404);
  });

  it('tells of the draft and of solves when they are committed, and of nothing refused', async () => {
    await share();
    const stream = await follow(await cookieOf(guestPerson));
    expect(stream.status).toBe(200);
    expect(stream.type).toMatch(/^text\/event-stream/);
    const draft = (await designer.get(`/api/projects/${projectId}/draft`)).body as {
      version: number;
    };
    const path = `/api/projects/${projectId}/draft`;
    const document = aPortal({ width: 2 });
    await designer.put(path, { version: draft.version + 5, document }).expect(412);
    await designer.put(path, { version: draft.version, document }).expect(200);
    await designer.post('/api/solves', { projectId, methods: ['lumped'] }).expect(202);
    await vi.waitFor(() => expect(stream.events).toHaveLength(2), { timeout: 5_000 });
    expect(stream.events).toEqual([
      { kind: 'draft', version: draft.version + 1 },
      { kind: 'solve', solveId: expect.any(String) as string, status: 'queued', progress: 0 },
    ]);
    stream.close();
  });

  it('ends at once when the project is no longer shared', async () => {
    await share();
    const stream = await follow(await cookieOf(guestPerson));
    await designer.delete(`/api/projects/${projectId}/members/${guestPerson.id}`).expect(200);
    await vi.waitFor(() => expect(stream.ended).toBe(true), { timeout: 5_000 });
  });

  it(
    'ends with the next heart-beat when the sessions were ended',
    { timeout: 40_000 },
    async () => {
      await share();
      const stream = await follow(await cookieOf(guestPerson));
      await inTransaction((transaction) =>
        guestPerson.increment('sessionEpoch', { transaction }).then(() => undefined),
      );
      await vi.waitFor(() => expect(stream.ended).toBe(true), { timeout: 25_000, interval: 200 });
    },
  );
});
