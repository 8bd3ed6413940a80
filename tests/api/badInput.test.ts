import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { problem } from '#shared/schemas/common.ts';
import { startApp, type TestApp } from '#tests/api/setup/app.ts';
import { signedIn, visitor, type Client } from '#tests/api/setup/client.ts';
import { anAdministrator } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';

let app: TestApp;
let client: Client;

beforeAll(async () => {
  app = await startApp();
  client = await signedIn(app.express, await anAdministrator(await aTeam()));
});
afterAll(() => app.stop());

/** Every row of every table that bad input could have touched. */
async function stored(): Promise<unknown> {
  const [rows] = await app.sequelize.query(`
    SELECT (SELECT json_agg(t) FROM teams t) AS teams, (SELECT count(*) FROM people) AS people,
      (SELECT json_agg(i) FROM invitations i) AS invitations,
      (SELECT count(*) FROM audit_entries) AS entries,
      (SELECT count(*) FROM pgboss.job) AS jobs`);
  return rows;
}

describe('bad input', () => {
  const broken: [string, string, number][] = [
    ['JSON that stops in the middle', '{"email": "a@b.example"', 400],
    ['no JSON at all', 'email=a@b.example', 400],
    ['a list', '[1, 2]', 422],
    ['nothing', '{}', 422],
    ['a number for an address', '{"email": 7, "role": "guest"}', 422],
    ['no address', '{"email": "nowhere", "role": "guest"}', 422],
    ['an unknown role', '{"email": "a@example.com", "role": "owner"}', 422],
    [
      'a word for a switch',
      '{"email": "a@example.com", "role": "guest", "isAdministrator": "yes"}',
      422,
    ],
    ['an unknown field', '{"email": "a@example.com", "role": "guest", "teamId": "x"}', 422],
    ['a list for a role', '{"email": "a@example.com", "role": ["guest"]}', 422],
    ['an endless address', `{"email": "${'a'.repeat(5_000)}@example.com", "role": "guest"}`, 422],
    ['a polluted prototype', '{"__proto__": {"role": "guest"}, "email": "a@example.com"}', 422],
  ];

  it.each(broken)(
    '%s answers a problem document and stores nothing',
    async (_what, body, status) => {
      const before = await stored();
      const response = await client.post('/api/team/invitations', body);
      expect(response.status).toBe(status);
      expect(response.type).toBe('application/problem+json');
      expect(problem.parse(response.body).status).toBe(status);
      expect(await stored()).toEqual(before);
    },
  );

  it('is listed whole, each issue with its path and a sentence', async () => {
    const body = { email: 'nowhere', role: 'owner', isAdministrator: 3, extra: true };
    const response = await client.post('/api/team/invitations', body);
    const paths = problem.parse(response.body).errors?.map((issue) => issue.path) ?? [];
    expect(paths).toEqual(expect.arrayContaining(['email', 'role', 'isAdministrator']));
    expect(response.text).toContain('Enter an e-mail address such as name@example.com.');
  });

  it('names a nested field by its path', async () => {
    const response = await client.patch('/api/team', { settings: { requiredReviews: 0 } });
    expect(problem.parse(response.body).errors).toMatchObject([
      { path: 'settings.requiredReviews' },
    ]);
  });

  it('of another media type is refused as such', async () => {
    const response = await client
      .post('/api/team/invitations')
      .type('application/x-www-form-urlencoded')
      .send('email=a@example.com&role=guest');
    expect(response.status).toBe(415);
  });

  it('is no body at all where a browser sends a POST of no length', async () => {
    const response = await client.post('/api/solves/00000000-0000-4000-8000-000000000000/cancel');
    expect(response.status).toBe(404);
  });

  it.each(['/api/team/people/not-an-id', "/api/team/people/1'%20OR%201=1--"])(
    'in an id is named: %s',
    async (path) => {
      const response = await client.patch(path, { role: 'guest' });
      expect(response.status).toBe(422);
      expect(problem.parse(response.body).errors).toMatchObject([{ path: 'personId' }]);
    },
  );

  it('in an address that cannot be decoded is refused', async () => {
    expect((await client.patch('/api/team/people/%E0%A4%A', {})).status).toBe(400);
  });

  it('that names nobody answers 404', async () => {
    const person = await client.patch(`/api/team/people/${randomUUID()}`, { role: 'guest' });
    expect(person.status).toBe(404);
    expect((await client.delete(`/api/team/invitations/${randomUUID()}`)).status).toBe(404);
  });

  it('with text that PostgreSQL cannot store is refused, not an error of ours', async () => {
    const response = await client.patch('/api/account', { name: 'I\u0000da' });
    expect(response.status).toBe(422);
  });

  it('of 50 MB is refused and not kept in memory', async () => {
    const body = JSON.stringify({ email: 'a'.repeat(50_000_000) });
    const before = process.memoryUsage().arrayBuffers;
    const response = await client.post('/api/session', body);
    expect(response.status).toBe(413);
    expect(problem.parse(response.body).code).toBe('too-large');
    // The sender's own copy is a string, outside of this count; a server that kept the body would show here.
    expect(process.memoryUsage().arrayBuffers - before).toBeLessThan(60_000_000);
  });

  it('of any size is not even read for somebody who is not signed in', async () => {
    const stranger = await visitor(app.express);
    const response = await stranger.post('/api/team/invitations', '{"broken');
    expect(response.status).toBe(401);
  });
});

describe('an error of ours', () => {
  it('says nothing of what happened inside', async () => {
    await app.sequelize.query('SELECT 1');
    const { Team } = await import('#server/models/Team.ts');
    const { vi } = await import('vitest');
    const spy = vi
      .spyOn(Team, 'findByPk')
      .mockRejectedValueOnce(new Error('relation "teams" at 10.0.0.7 is gone'));
    const response = await client.get('/api/team');
    spy.mockRestore();
    expect(response.status).toBe(500);
    expect(response.text).not.toMatch(/relation|10\.0\.0\.7|at .*\.ts/);
    expect(problem.parse(response.body).code).toBe('internal');
  });
});
