import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { AuditEntry } from '#server/models/AuditEntry.ts';
import { PasswordReset } from '#server/models/PasswordReset.ts';
import type { Team } from '#server/models/Team.ts';
import { startApp, type TestApp } from '#tests/api/setup/app.ts';
import { signedIn, visitor } from '#tests/api/setup/client.ts';
import { mailsTo, tokenTo } from '#tests/api/setup/mail.ts';
import { asOwner } from '#tests/api/setup/owner.ts';
import { aPerson, PASSWORD } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';

const NEW_PASSWORD = 'a lathe hums at forty hertz';

let app: TestApp;
let team: Team;

beforeAll(async () => {
  app = await startApp();
  team = await aTeam();
});
afterAll(() => app.stop());

describe('one’s own account', () => {
  it('keeps name, units and theme', async () => {
    const client = await signedIn(app.express, await aPerson(team));
    const change = { name: 'Ida M. Merrow', units: 'in-lbm-lbf', theme: 'chalk' };
    const response = await client.patch('/api/account', change).expect(200);
    expect(response.body).toMatchObject(change);
    const session = await client.get('/api/session');
    expect(session.body).toMatchObject({ person: change });
  });

  it('changes nothing that is left out, nor anything that it must not', async () => {
    const client = await signedIn(app.express, await aPerson(team));
    await client.patch('/api/account', {}).expect(200);
    const response = await client.patch('/api/account', { role: 'lead', isAdministrator: true });
    expect(response.status).toBe(422);
    const session = await client.get('/api/session');
    expect(session.body).toMatchObject({ person: { role: 'designer', isAdministrator: false } });
  });
});

describe('changing the password', () => {
  it('ends every other session and keeps this one', async () => {
    const person = await aPerson(team);
    const here = await signedIn(app.express, person);
    const there = await signedIn(app.express, person);
    await here
      .put('/api/account/password', { currentPassword: PASSWORD, newPassword: NEW_PASSWORD })
      .expect(204);
    await there.get('/api/team').expect(401);
    await here.get('/api/team').expect(200);
    const again = await visitor(app.express);
    expect((await again.signIn(person.email)).status).toBe(401);
    expect((await again.signIn(person.email, NEW_PASSWORD)).status).toBe(200);
  });

  it('needs the current one', async () => {
    const person = await aPerson(team);
    const client = await signedIn(app.express, person);
    const body = { currentPassword: 'something else', newPassword: NEW_PASSWORD };
    const response = await client.put('/api/account/password', body);
    expect(response.status).toBe(401);
    expect(response.body).toMatchObject({ errors: [{ path: 'currentPassword' }] });
    expect((await client.signIn(person.email)).status).toBe(200);
  });

  it('refuses a short one', async () => {
    const client = await signedIn(app.express, await aPerson(team));
    const body = { currentPassword: PASSWORD, newPassword: 'short' };
    const response = await client.put('/api/account/password', body);
    expect(response.status).toBe(422);
    expect(response.body).toMatchObject({ errors: [{ path: 'newPassword' }] });
  });
});

describe('a forgotten password', () => {
  it('is set anew by the link in the mail, once, and ends every session', async () => {
    const person = await aPerson(team);
    const session = await signedIn(app.express, person);
    const client = await visitor(app.express);
    await client.post('/api/password-resets', { email: person.email }).expect(202);
    const token = await tokenTo(person.email);
    await client.put('/api/password-resets', { token, password: NEW_PASSWORD }).expect(204);
    await session.get('/api/team').expect(401);
    expect((await client.signIn(person.email, NEW_PASSWORD)).status).toBe(200);
    await client.open();
    const again = await client.put('/api/password-resets', { token, password: PASSWORD });
    expect(again.status).toBe(410);
    const entry = await AuditEntry.findOne({
      where: { actorId: person.id, action: 'password-reset' },
    });
    expect(entry).not.toBeNull();
  });

  it('goes with one password when the link is used twice at once', async () => {
    const person = await aPerson(team);
    const client = await visitor(app.express);
    await client.post('/api/password-resets', { email: person.email }).expect(202);
    const token = await tokenTo(person.email);
    const answers = await Promise.all(
      ['first of two passwords', 'second of two passwords'].map((password) =>
        client.put('/api/password-resets', { token, password }),
      ),
    );
    expect(answers.map((answer) => answer.status).sort()).toEqual([204, 410]);
  });

  it('makes every earlier link worthless once one is used', async () => {
    const person = await aPerson(team);
    const client = await visitor(app.express);
    await client.post('/api/password-resets', { email: person.email }).expect(202);
    const first = await tokenTo(person.email);
    await client.post('/api/password-resets', { email: person.email }).expect(202);
    const second = await tokenTo(person.email, 2);
    expect(second).not.toBe(first);
    await client.put('/api/password-resets', { token: second, password: NEW_PASSWORD }).expect(204);
    await client.put('/api/password-resets', { token: first, password: PASSWORD }).expect(410);
  });

  it('has to be set within half an hour', async () => {
    const person = await aPerson(team);
    const client = await visitor(app.express);
    await client.post('/api/password-resets', { email: person.email }).expect(202);
    const token = await tokenTo(person.email);
    const reset = await PasswordReset.findOne({
      where: { personId: person.id },
      rejectOnEmpty: true,
    });
    const minutes = (reset.expiresAt.getTime() - Date.now()) / 60_000;
    expect(minutes).toBeGreaterThan(28);
    expect(minutes).toBeLessThanOrEqual(30);
    await asOwner(
      app.database,
      `UPDATE password_resets SET expires_at = now() - interval '1 second' WHERE id = :id`,
      { id: reset.id },
    );
    await client.put('/api/password-resets', { token, password: NEW_PASSWORD }).expect(410);
  });

  it('is answered alike for an address that nobody has, and then no mail goes out', async () => {
    const person = await aPerson(team);
    const client = await visitor(app.express);
    const unknown = await client.post('/api/password-resets', { email: 'nobody@example.com' });
    const known = await client.post('/api/password-resets', { email: person.email });
    expect(unknown.status).toBe(202);
    expect(unknown.body).toEqual(known.body);
    // Mail is sent in turn: when the second request's has gone out, the first one's would have too.
    const mails = await mailsTo(person.email);
    expect(mails).toHaveLength(1);
    await expect(PasswordReset.count({ where: { personId: person.id } })).resolves.toBe(1);
  });

  it('leaves no token in the database but its hash', async () => {
    const person = await aPerson(team);
    const client = await visitor(app.express);
    await client.post('/api/password-resets', { email: person.email }).expect(202);
    const token = await tokenTo(person.email);
    const [rows] = await app.sequelize.query(
      `SELECT 1 FROM password_resets WHERE token_hash LIKE '%' || :token || '%'
       UNION ALL SELECT 1 FROM pgboss.job WHERE data::text LIKE '%' || :token || '%'`,
      { replacements: { token } },
    );
    expect(rows).toEqual([]);
  });
});
