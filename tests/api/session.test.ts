import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import type * as Argon2 from '@node-rs/argon2';
import { verify } from '@node-rs/argon2';
import type { Person } from '#server/models/Person.ts';
import type { Team } from '#server/models/Team.ts';
import { startApp, type TestApp } from '#tests/api/setup/app.ts';
import { Client, signedIn, visitor } from '#tests/api/setup/client.ts';
import { aPerson, PASSWORD } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';

vi.mock('@node-rs/argon2', async (original) => {
  const argon2 = await original<typeof Argon2>();
  return { ...argon2, verify: vi.fn(argon2.verify) };
});

let app: TestApp;
let team: Team;
let ida: Person;

beforeAll(async () => {
  app = await startApp();
  team = await aTeam();
  ida = await aPerson(team, { email: 'ida@example.com' });
});
afterAll(() => app.stop());

const sessionCookie = (headers: Record<string, unknown>): string | undefined =>
  ((headers['set-cookie'] ?? []) as string[]).find((cookie) => cookie.startsWith('ringstead.sid'));

describe('signing in', () => {
  it('says who it is, what they may do, and sets a cookie that scripts and other sites cannot use', async () => {
    const client = await visitor(app.express);
    const response = await client.signIn(' IDA@example.com ');
    expect(response.status).toBe(200);
    expect(response.body).toMatchObject({
      person: { name: 'Ida Merrow', role: 'designer', team: { name: 'Brackwell Machines' } },
      mailIsLocal: true,
    });
    const cookie = sessionCookie(response.headers);
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Lax/);
    await client.get('/api/team').expect(200);
  });

  it('never sends a password hash', async () => {
    const client = await signedIn(app.express, ida);
    expect((await client.get('/api/session')).text).not.toContain('argon2');
    expect((await client.get('/api/team')).text).not.toContain('argon2');
  });

  it('answers an unknown address and a wrong password alike, after the same work', async () => {
    const client = await visitor(app.express);
    vi.mocked(verify).mockClear();
    const wrong = await client.signIn('ida@example.com', 'not the password');
    expect(verify).toHaveBeenCalledTimes(1);
    const unknown = await client.signIn('nobody@example.com', 'not the password');
    expect(verify).toHaveBeenCalledTimes(2);
    expect(wrong.status).toBe(401);
    const withoutNumber = (body: unknown) => ({ ...(body as object), instance: null });
    const wrongBody = withoutNumber(wrong.body);
    const unknownBody = withoutNumber(unknown.body);
    expect(unknownBody).toEqual(wrongBody);
    expect(wrongBody).toMatchObject({ code: 'wrong-credentials', status: 401 });
  });

  it('takes no session id from before: it is new at sign-in, and the old one is worth nothing', async () => {
    const client = await signedIn(app.express, ida);
    const before = await client.get('/api/session');
    const oldCookie = sessionCookie(before.headers)?.split(';')[0] ?? '';
    const again = await client.signIn('ida@example.com');
    const newCookie = sessionCookie(again.headers)?.split(';')[0] ?? '';
    expect(newCookie).not.toBe(oldCookie);
    const thief = new Client(app.express);
    const stolen = await thief.agent.get('/api/team').set('Cookie', oldCookie);
    expect(stolen.status).toBe(401);
  });

  it('lets no deactivated person in', async () => {
    const gone = await aPerson(team, { email: 'gone@example.com' });
    await gone.update({ active: false });
    const response = await (await visitor(app.express)).signIn('gone@example.com');
    expect(response.status).toBe(401);
  });
});

describe('the end of a session', () => {
  it('signs out here only', async () => {
    const here = await signedIn(app.express, ida);
    const there = await signedIn(app.express, ida);
    await here.delete('/api/session').expect(204);
    await here.get('/api/team').expect(401);
    await there.get('/api/team').expect(200);
  });

  it('signs out everywhere, and leaves no row behind', async () => {
    const here = await signedIn(app.express, ida);
    const there = await signedIn(app.express, ida);
    await here.delete('/api/sessions').expect(204);
    await here.get('/api/team').expect(401);
    await there.get('/api/team').expect(401);
    const [rows] = await app.sequelize.query(
      `SELECT sid FROM sessions WHERE sess #>> '{passport,user,personId}' = '${ida.id}'`,
    );
    expect(rows).toEqual([]);
  });

  it('comes with a raised epoch, whatever is left in the table', async () => {
    const client = await signedIn(app.express, ida);
    await ida.increment('sessionEpoch');
    await client.get('/api/team').expect(401);
    await ida.reload();
  });

  it('comes after a week, however busy', async () => {
    const client = await signedIn(app.express, ida);
    const eightDaysAgo = Date.now() - 8 * 86_400_000;
    await app.sequelize.query(
      `UPDATE sessions SET sess = jsonb_set(sess::jsonb, '{passport,user,since}', '${eightDaysAgo}')::json
       WHERE sess #>> '{passport,user,personId}' = '${ida.id}'`,
    );
    await client.get('/api/team').expect(401);
  });

  it('comes after eight idle hours', async () => {
    const client = await signedIn(app.express, ida);
    await client.get('/api/team').expect(200);
    const [rows] = await app.sequelize.query(
      `SELECT max(expire) - localtimestamp < interval '8 hours 5 seconds' AS short,
              max(expire) - localtimestamp > interval '7 hours' AS fresh FROM sessions`,
    );
    expect(rows).toEqual([{ short: true, fresh: true }]);
    await app.sequelize.query(`UPDATE sessions SET expire = localtimestamp - interval '1 second'`);
    await client.get('/api/team').expect(401);
  });
});

describe('requests that another site may have made', () => {
  it('need the token of this very session', async () => {
    const client = await signedIn(app.express, ida);
    const other = await visitor(app.express);
    const without = await client.agent.patch('/api/account').send({ theme: 'chalk' });
    expect(without.status).toBe(403);
    const foreign = await client.agent
      .patch('/api/account')
      .set('X-CSRF-Token', other.csrfToken)
      .send({ theme: 'chalk' });
    expect(foreign.status).toBe(403);
    await ida.reload();
    expect(ida.theme).toBe('system');
  });

  it('need it for signing in as well', async () => {
    const client = await visitor(app.express);
    const response = await client.agent
      .post('/api/session')
      .send({ email: 'ida@example.com', password: PASSWORD });
    expect(response.status).toBe(403);
  });

  it.each([
    ['Origin', 'https://elsewhere.example'],
    ['Origin', 'null'],
    ['Sec-Fetch-Site', 'cross-site'],
    ['Sec-Fetch-Site', 'same-site'],
  ])('are refused by %s: %s even with the token', async (header, value) => {
    const client = await signedIn(app.express, ida);
    const response = await client.patch('/api/account', { theme: 'chalk' }).set(header, value);
    expect(response.status).toBe(403);
  });

  it('pass with the origin of the product', async () => {
    const client = await signedIn(app.express, ida);
    const { origin } = new URL(app.config.publicUrl);
    await client.patch('/api/account', { theme: 'system' }).set('Origin', origin).expect(200);
  });

  it('get no other token after sign-in than that of the new session', async () => {
    const client = await visitor(app.express);
    const before = client.csrfToken;
    await client.signIn('ida@example.com');
    expect(client.csrfToken).not.toBe(before);
  });
});

describe('headers', () => {
  it('let the page run its own code only', async () => {
    const response = await (await visitor(app.express)).get('/api/health');
    const policy = response.headers['content-security-policy'] ?? '';
    expect(policy).toContain("script-src 'self' 'wasm-unsafe-eval'");
    expect(policy).toContain("default-src 'none'");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toMatch(/[^-]unsafe-eval/);
    expect(policy).not.toMatch(/(script-src|style-src) [^;]*unsafe-inline/);
    expect(response.headers['x-powered-by']).toBeUndefined();
    expect(response.headers['x-content-type-options']).toBe('nosniff');
  });
});
