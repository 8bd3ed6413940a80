import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createApp } from '#server/app.ts';
import { createLog } from '#server/config/log.ts';
import type { Team } from '#server/models/Team.ts';
import { startApp, type TestApp } from '#tests/api/setup/app.ts';
import { signedIn, visitor } from '#tests/api/setup/client.ts';
import { asOwner } from '#tests/api/setup/owner.ts';
import { anAdministrator, aPerson, PASSWORD } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';

let app: TestApp;
let team: Team;

beforeAll(async () => {
  app = await startApp({ RATE_LIMIT_SCALE: '1', TRUST_PROXY: '1' });
  team = await aTeam();
});
afterAll(() => app.stop());

/** Each test comes from another address. */
let last = 0;
const fromNewAddress = (): string => `198.51.100.${(last += 1)}`;

describe('signing in', () => {
  it('stops after ten wrong passwords of an account, from wherever, whichever process is asked', async () => {
    const ida = await aPerson(team);
    const second = createApp(app.config, createLog(app.config), () => true);
    const clients = [await visitor(app.express), await visitor(second.express)];
    const attempt = (i: number, password: string) =>
      clients[i % 2]!.post('/api/session', { email: ida.email, password }).set(
        'X-Forwarded-For',
        fromNewAddress(),
      );
    for (let i = 0; i < 10; i += 1) expect((await attempt(i, 'wrong')).status).toBe(401);
    for (let i = 0; i < 2; i += 1) {
      const refused = await attempt(i, PASSWORD);
      expect(refused.status).toBe(429);
      const seconds = Number(refused.headers['retry-after']);
      expect(seconds).toBeGreaterThan(800);
      expect(seconds).toBeLessThanOrEqual(900);
    }
    await second.close();
    await asOwner(app.database, 'DELETE FROM rate_limits');
    expect((await attempt(0, PASSWORD)).status).toBe(200);
  });

  it('counts an unknown address like a known one', async () => {
    const client = await visitor(app.express);
    const attempt = () =>
      client
        .post('/api/session', { email: 'nobody@example.com', password: 'wrong' })
        .set('X-Forwarded-For', fromNewAddress());
    for (let i = 0; i < 10; i += 1) expect((await attempt()).status).toBe(401);
    expect((await attempt()).status).toBe(429);
  });

  it('forgets the wrong ones after a right one', async () => {
    const ida = await aPerson(team);
    const client = await visitor(app.express);
    const address = fromNewAddress();
    const attempt = (password: string) =>
      client.post('/api/session', { email: ida.email, password }).set('X-Forwarded-For', address);
    for (let i = 0; i < 9; i += 1) await attempt('wrong');
    await client.open();
    expect((await attempt(PASSWORD)).status).toBe(200);
    await client.open();
    expect((await attempt('wrong')).status).toBe(401);
  });

  it('stops one address that tries many accounts', async () => {
    const client = await visitor(app.express);
    const address = fromNewAddress();
    const statuses: number[] = [];
    for (let i = 0; i < 61; i += 1) {
      const email = `guess${i}@example.com`;
      const response = await client
        .post('/api/session', { email, password: 'wrong' })
        .set('X-Forwarded-For', address);
      statuses.push(response.status);
    }
    expect(statuses.slice(0, 60)).toEqual(Array(60).fill(401));
    expect(statuses[60]).toBe(429);
  });

  it('keeps no address in the clear', async () => {
    const [rows] = await app.sequelize.query(
      `SELECT key FROM rate_limits WHERE key LIKE '%@%' OR key LIKE '%198.51%'`,
    );
    expect(rows).toEqual([]);
  });
});

describe('other limits', () => {
  it('stop asking for reset links', async () => {
    const client = await visitor(app.express);
    const ask = () =>
      client
        .post('/api/password-resets', { email: 'somebody@example.com' })
        .set('X-Forwarded-For', fromNewAddress());
    for (let i = 0; i < 4; i += 1) expect((await ask()).status).toBe(202);
    expect((await ask()).status).toBe(429);
  });

  it('stop guessing tokens', async () => {
    const client = await visitor(app.express);
    const address = fromNewAddress();
    const guess = (i: number) =>
      client
        .post('/api/invitations/read', { token: `guess-number-${i}-of-a-token` })
        .set('X-Forwarded-For', address);
    for (let i = 0; i < 60; i += 1) expect((await guess(i)).status).toBe(410);
    expect((await guess(60)).status).toBe(429);
  });

  it('stop a team that invites without end', async () => {
    const client = await signedIn(app.express, await anAdministrator(await aTeam('Busy')));
    const invite = (i: number) =>
      client.post('/api/team/invitations', { email: `one${i}@example.com`, role: 'guest' });
    for (let i = 0; i < 60; i += 1) expect((await invite(i)).status).toBe(201);
    expect((await invite(60)).status).toBe(429);
  });

  it('stop guessing one’s password at an open screen', async () => {
    const client = await signedIn(app.express, await aPerson(team));
    const guess = () =>
      client.put('/api/account/password', {
        currentPassword: 'wrong',
        newPassword: 'long enough to be new',
      });
    for (let i = 0; i < 10; i += 1) expect((await guess()).status).toBe(401);
    expect((await guess()).status).toBe(429);
  });
});
