import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { AuditEntry } from '#server/models/AuditEntry.ts';
import { Invitation } from '#server/models/Invitation.ts';
import { Person } from '#server/models/Person.ts';
import type { Team } from '#server/models/Team.ts';
import { startApp, type TestApp } from '#tests/api/setup/app.ts';
import { signedIn, visitor, type Client } from '#tests/api/setup/client.ts';
import { mailsTo, tokenTo } from '#tests/api/setup/mail.ts';
import { asOwner } from '#tests/api/setup/owner.ts';
import { anAdministrator, aPerson, PASSWORD } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';

let app: TestApp;
let team: Team;
let tomas: Person;
let administrator: Client;

beforeAll(async () => {
  app = await startApp();
});
afterAll(() => app.stop());

beforeEach(async () => {
  team = await aTeam();
  tomas = await anAdministrator(team);
  administrator = await signedIn(app.express, tomas);
});

let invited = 0;
const newAddress = (): string => `invited${(invited += 1)}@example.com`;

const invite = (email: string, role = 'reviewer') =>
  administrator.post('/api/team/invitations', { email, role });

describe('the team', () => {
  it('shows names and roles to everybody, addresses and invitations to administrators', async () => {
    const guest = await aPerson(team, { role: 'guest', email: newAddress() });
    await invite(newAddress()).expect(201);
    const seenByGuest = await (await signedIn(app.express, guest)).get('/api/team').expect(200);
    expect(seenByGuest.text).not.toContain('@');
    expect(seenByGuest.body).toMatchObject({
      invitations: [],
      abilities: { administer: false, readSentMail: false },
    });
    const seen = await administrator.get('/api/team').expect(200);
    expect(seen.text).toContain(guest.email);
    expect(seen.body).toMatchObject({
      invitations: [{ role: 'reviewer', invitedBy: 'Tomas Quell' }],
      abilities: { administer: true, readSentMail: true },
    });
  });

  it('takes a new name and new rules, and records both', async () => {
    const response = await administrator
      .patch('/api/team', { name: 'Brackwell & Daughters', settings: { requiredReviews: 2 } })
      .expect(200);
    expect(response.body).toMatchObject({
      name: 'Brackwell & Daughters',
      settings: { requiredReviews: 2, soleReviewerMayApprove: false },
    });
    const entries = await AuditEntry.findAll({ where: { teamId: team.id, actorId: tomas.id } });
    expect(entries.map((entry) => entry.action)).toEqual(
      expect.arrayContaining(['team-renamed', 'team-settings-changed']),
    );
  });

  it('records nothing when nothing changes', async () => {
    const before = await AuditEntry.count({ where: { teamId: team.id } });
    await administrator.patch('/api/team', { name: team.name }).expect(200);
    await expect(AuditEntry.count({ where: { teamId: team.id } })).resolves.toBe(before);
  });
});

describe('changing what a person may do', () => {
  it('ends their sessions', async () => {
    const ida = await aPerson(team);
    const session = await signedIn(app.express, ida);
    const response = await administrator
      .patch(`/api/team/people/${ida.id}`, { role: 'reviewer' })
      .expect(200);
    expect(response.body).toMatchObject({ role: 'reviewer', email: ida.email });
    await session.get('/api/team').expect(401);
    await (await signedIn(app.express, ida)).get('/api/team').expect(200);
  });

  it('leaves the sessions alone when nothing changes', async () => {
    const ida = await aPerson(team);
    const session = await signedIn(app.express, ida);
    await administrator.patch(`/api/team/people/${ida.id}`, { role: 'designer' }).expect(200);
    await session.get('/api/team').expect(200);
  });

  it('locks a deactivated person out, and lets them in again', async () => {
    const ida = await aPerson(team);
    const session = await signedIn(app.express, ida);
    await administrator.patch(`/api/team/people/${ida.id}`, { active: false }).expect(200);
    await session.get('/api/team').expect(401);
    expect((await (await visitor(app.express)).signIn(ida.email)).status).toBe(401);
    await administrator.patch(`/api/team/people/${ida.id}`, { active: true }).expect(200);
    await signedIn(app.express, ida);
  });

  it('keeps the last administrator', async () => {
    for (const change of [{ isAdministrator: false }, { active: false }]) {
      const response = await administrator.patch(`/api/team/people/${tomas.id}`, change);
      expect(response.status).toBe(409);
      expect(response.text).toContain('last active administrator');
    }
    await administrator.get('/api/team').expect(200);
  });

  it('keeps one of two administrators who remove each other at the same moment', async () => {
    const other = await anAdministrator(team, { name: 'Runa Hask' });
    const others = await signedIn(app.express, other);
    const answers = await Promise.all([
      administrator.patch(`/api/team/people/${other.id}`, { isAdministrator: false }),
      others.patch(`/api/team/people/${tomas.id}`, { active: false }),
    ]);
    const statuses = answers.map((answer) => answer.status);
    expect(statuses).toContain(200);
    const left = await Person.count({
      where: { teamId: team.id, isAdministrator: true, active: true },
    });
    expect(left).toBe(1);
  });

  it('is kept so by the database when two sessions of SQL race past the code', async () => {
    const other = await anAdministrator(team, { name: 'Runa Hask' });
    const [first, second] = await Promise.all([
      app.sequelize.transaction(),
      app.sequelize.transaction(),
    ]);
    const change = { isAdministrator: false };
    await Person.update(change, { where: { id: tomas.id }, transaction: first });
    const late = Person.update(change, { where: { id: other.id }, transaction: second });
    const refused = expect(late).rejects.toThrow('last active administrator');
    await first.commit();
    await refused;
    await second.rollback();
  });
});

describe('an invitation', () => {
  it('lets its reader join by the link in the mail, once', async () => {
    const email = newAddress();
    await invite(email, 'technician').expect(201);
    const token = await tokenTo(email);
    const client = await visitor(app.express);
    const read = await client.post('/api/invitations/read', { token }).expect(200);
    expect(read.body).toEqual({ email, teamName: team.name, role: 'technician' });
    const joining = { token, name: 'Brona Vale', password: PASSWORD };
    const joined = await client.post('/api/invitations/accept', joining).expect(200);
    expect(joined.body).toMatchObject({ person: { name: 'Brona Vale', role: 'technician' } });
    await client.get('/api/team').expect(200);
    const again = await visitor(app.express);
    await again.post('/api/invitations/accept', joining).expect(410);
    await again.post('/api/invitations/read', { token }).expect(410);
  });

  it('makes one person when it is accepted twice at once', async () => {
    const email = newAddress();
    await invite(email).expect(201);
    const token = await tokenTo(email);
    const clients = await Promise.all([visitor(app.express), visitor(app.express)]);
    const answers = await Promise.all(
      clients.map((client) =>
        client.post('/api/invitations/accept', { token, name: 'Brona Vale', password: PASSWORD }),
      ),
    );
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 410]);
    await expect(Person.count({ where: { email } })).resolves.toBe(1);
  });

  it('is renewed by inviting again: the earlier link stops working', async () => {
    const email = newAddress();
    const first = await invite(email, 'designer').expect(201);
    const earlier = await tokenTo(email);
    const second = await invite(email, 'guest').expect(201);
    expect((second.body as { id: string }).id).toBe((first.body as { id: string }).id);
    const later = await tokenTo(email, 2);
    const client = await visitor(app.express);
    await client.post('/api/invitations/read', { token: earlier }).expect(410);
    const read = await client.post('/api/invitations/read', { token: later }).expect(200);
    expect(read.body).toMatchObject({ role: 'guest' });
  });

  it('stays one when the same address is invited several times at once', async () => {
    const email = newAddress();
    const answers = await Promise.all([1, 2, 3].map(() => invite(email)));
    expect(answers.map((answer) => answer.status)).toEqual([201, 201, 201]);
    await expect(Invitation.count({ where: { email } })).resolves.toBe(1);
  });

  it('can be taken back, and again', async () => {
    const email = newAddress();
    const body: unknown = (await invite(email).expect(201)).body;
    const token = await tokenTo(email);
    const { id } = body as { id: string };
    await administrator.delete(`/api/team/invitations/${id}`).expect(204);
    await administrator.delete(`/api/team/invitations/${id}`).expect(404);
    await (await visitor(app.express)).post('/api/invitations/read', { token }).expect(410);
  });

  it('works for a week', async () => {
    const email = newAddress();
    const body: unknown = (await invite(email).expect(201)).body;
    const { id, expiresAt } = body as { id: string; expiresAt: string };
    const days = (Date.parse(expiresAt) - Date.now()) / 86_400_000;
    expect(days).toBeCloseTo(7, 2);
    const token = await tokenTo(email);
    await asOwner(
      app.database,
      `UPDATE invitations SET expires_at = now() - interval '1 second' WHERE id = :id`,
      { id },
    );
    await (await visitor(app.express)).post('/api/invitations/read', { token }).expect(410);
  });

  it('goes to nobody who is in the team', async () => {
    const response = await invite(tomas.email);
    expect(response.status).toBe(409);
    expect(response.body).toMatchObject({ errors: [{ path: 'email' }] });
  });

  it('cannot make a second account for one address', async () => {
    const email = newAddress();
    await invite(email).expect(201);
    const token = await tokenTo(email);
    await aPerson(await aTeam('Elsewhere'), { email });
    const client = await visitor(app.express);
    const joining = { token, name: 'Brona Vale', password: PASSWORD };
    await client.post('/api/invitations/accept', joining).expect(409);
  });
});

describe('sent mail', () => {
  it('is read by the team’s own administrators only', async () => {
    const email = newAddress();
    await invite(email).expect(201);
    await mailsTo(email);
    const mine = await administrator.get('/api/team/mail').expect(200);
    expect((mine.body as { mails: { to: string }[] }).mails.map((mail) => mail.to)).toContain(
      email,
    );
    const elsewhere = await aTeam('Elsewhere');
    const foreign = await signedIn(app.express, await anAdministrator(elsewhere));
    const theirs = await foreign.get('/api/team/mail').expect(200);
    expect(theirs.body).toEqual({ mails: [] });
  });
});
