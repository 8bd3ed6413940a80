import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { Sequelize } from 'sequelize';
import { recordAudit } from '#server/commands/recordAudit.ts';
import { verifyAuditChain } from '#server/commands/verifyAuditChain.ts';
import { AuditEntry } from '#server/models/AuditEntry.ts';
import { inTransaction } from '#server/models/database.ts';
import type { Person } from '#server/models/Person.ts';
import type { Team } from '#server/models/Team.ts';
import { startApp, type TestApp } from '#tests/api/setup/app.ts';
import { signedIn } from '#tests/api/setup/client.ts';
import { anAdministrator, aPerson } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';

interface Page {
  entries: { sequence: number; sentence: string; hash: string; actor: { name: string } | null }[];
  nextBefore: number | null;
}

let app: TestApp;
let team: Team;
let tomas: Person;

beforeAll(async () => {
  app = await startApp();
});
afterAll(() => app.stop());

beforeEach(async () => {
  team = await aTeam();
  tomas = await anAdministrator(team);
});

const record = (teamId = team.id) =>
  inTransaction((transaction) =>
    recordAudit(transaction, {
      teamId,
      actorId: tomas.id,
      projectId: null,
      action: 'role-changed',
      details: { personId: tomas.id, from: 'designer', to: 'lead' },
    }),
  );

describe('activity', () => {
  it('tells in plain sentences who did what, newest first', async () => {
    await record();
    const client = await signedIn(app.express, tomas);
    const body: unknown = (await client.get('/api/activity').expect(200)).body;
    const { entries } = body as Page;
    expect(entries.map(({ sentence }) => sentence)).toEqual([
      'changed the role of Tomas Quell from designer to lead',
      'joined the team as lead and administrator',
      'the team Brackwell Machines was made',
    ]);
    expect(entries[0]?.actor?.name).toBe('Tomas Quell');
  });

  it('shows a person’s present name, since the record holds none', async () => {
    await record();
    await tomas.update({ name: 'Tomas Quell-Hask' });
    const client = await signedIn(app.express, tomas);
    const body: unknown = (await client.get('/api/activity')).body;
    expect((body as Page).entries[0]?.sentence).toContain('Tomas Quell-Hask');
    const stored = await AuditEntry.findAll({ where: { teamId: team.id } });
    expect(stored.map((entry) => entry.canonical).join()).not.toContain('Tomas');
  });

  it('goes on where the page before ended', async () => {
    for (let i = 0; i < 5; i += 1) await record();
    const client = await signedIn(app.express, tomas);
    const sequences: number[] = [];
    let path: string | null = '/api/activity?limit=3';
    while (path !== null) {
      const page: Page = (await client.get(path).expect(200)).body as Page;
      sequences.push(...page.entries.map((entry) => entry.sequence));
      path = page.nextBefore === null ? null : `/api/activity?limit=3&before=${page.nextBefore}`;
    }
    expect(sequences).toEqual([7, 6, 5, 4, 3, 2, 1]);
  });

  it('shows nothing of another team, and nothing of the team to guests', async () => {
    const other = await aTeam('Elsewhere');
    const stranger = await signedIn(app.express, await anAdministrator(other));
    const body: unknown = (await stranger.get('/api/activity').expect(200)).body;
    expect((body as Page).entries).toHaveLength(2);
    const guest = await signedIn(app.express, await aPerson(team, { role: 'guest' }));
    const seen = await guest.get('/api/activity').expect(200);
    expect(seen.body).toEqual({ entries: [], nextBefore: null });
  });

  it('hides a project that does not exist', async () => {
    const client = await signedIn(app.express, tomas);
    await client.get(`/api/activity?projectId=${randomUUID()}`).expect(404);
  });

  it('refuses a limit that is no number', async () => {
    const client = await signedIn(app.express, tomas);
    const response = await client.get('/api/activity?limit=many');
    expect(response.status).toBe(422);
    expect(response.body).toMatchObject({ errors: [{ path: 'limit' }] });
  });
});

describe('the audit chain', () => {
  it('stays one chain when many write at once', async () => {
    await Promise.all(Array.from({ length: 12 }, () => record()));
    const check = await verifyAuditChain(team.id);
    expect(check).toMatchObject({ intact: true, head: { sequence: 14 } });
  });

  it('gets no link from work that was rolled back', async () => {
    const before = await verifyAuditChain(team.id);
    const undone = inTransaction(async (transaction) => {
      await recordAudit(transaction, {
        teamId: team.id,
        actorId: null,
        projectId: null,
        action: 'team-created',
        details: { name: 'never' },
      });
      throw new Error('undo');
    });
    await expect(undone).rejects.toThrow('undo');
    await expect(verifyAuditChain(team.id)).resolves.toEqual(before);
  });

  const attempts: [string, string][] = [
    ['change an entry', `UPDATE audit_entries SET action = 'team-renamed'`],
    ['change its text', `UPDATE audit_entries SET canonical = '{}'`],
    ['delete an entry', `DELETE FROM audit_entries`],
    ['empty the table', `TRUNCATE audit_entries`],
    ['move the head back', `UPDATE audit_heads SET sequence = 0, hash = repeat('0', 64)`],
    ['delete the head', `DELETE FROM audit_heads`],
    ['make a head', `INSERT INTO audit_heads (team_id) SELECT id FROM teams LIMIT 1`],
    ['switch the triggers off', `ALTER TABLE audit_entries DISABLE TRIGGER ALL`],
    ['switch them off for the session', `SET session_replication_role = replica`],
    ['drop the table', `DROP TABLE audit_entries`],
    ['drop the check', `DROP FUNCTION check_audit_entry() CASCADE`],
    [
      'replace the check',
      `CREATE OR REPLACE FUNCTION forbid_change() RETURNS trigger LANGUAGE sql AS 'SELECT NULL'`,
    ],
    ['stand in front of it', `CREATE TABLE public.shadow (id integer)`],
    ['become the owner', `SET ROLE ringstead_owner`],
    [
      'append what is no next link',
      `INSERT INTO audit_entries SELECT gen_random_uuid(), team_id, sequence + 5, at, actor_id,
         project_id, action, canonical, previous_hash, hash FROM audit_entries LIMIT 1`,
    ],
    [
      'write an entry again in place of itself',
      `INSERT INTO audit_entries SELECT * FROM audit_entries LIMIT 1
         ON CONFLICT (id) DO UPDATE SET action = 'team-renamed'`,
    ],
  ];

  it.each(attempts)('does not let the run-time role %s', async (_what, sql) => {
    await record();
    const before = await verifyAuditChain(team.id);
    await expect(app.sequelize.query(sql)).rejects.toThrow();
    await expect(verifyAuditChain(team.id)).resolves.toEqual(before);
  });

  it('does not let the run-time role write a true link with columns that say something else', async () => {
    const sql = `
      INSERT INTO audit_entries
      SELECT said.id, team_id, sequence + 1, now(), NULL, NULL, 'team-renamed', said.text, hash,
             encode(sha256(convert_to(hash || said.text, 'UTF8')), 'hex')
      FROM audit_heads, (SELECT gen_random_uuid() AS id, '{"action":"team-created"}' AS text) said
      WHERE team_id = :teamId`;
    await expect(app.sequelize.query(sql, { replacements: { teamId: team.id } })).rejects.toThrow(
      'differ from its text',
    );
  });

  it('does not let the owner of the tables change or remove entries by the way either', async () => {
    const owner = new Sequelize(app.database.owner, { logging: false });
    for (const sql of [
      `UPDATE audit_entries SET action = 'team-renamed'`,
      `DELETE FROM audit_entries`,
      `TRUNCATE audit_entries`,
      `DELETE FROM audit_heads`,
      `UPDATE audit_heads SET sequence = 0`,
    ]) {
      await expect(owner.query(sql)).rejects.toThrow();
    }
    await owner.close();
  });

  it('shows where an owner who switched the triggers off has tampered', async () => {
    await record();
    const owner = new Sequelize(app.database.owner, { logging: false });
    await owner.query(`
      ALTER TABLE audit_entries DISABLE TRIGGER keep_audit_entries;
      UPDATE audit_entries SET canonical = replace(canonical, 'lead', 'guest')
        WHERE team_id = '${team.id}' AND sequence = 2;
      ALTER TABLE audit_entries ENABLE TRIGGER keep_audit_entries;
    `);
    await owner.close();
    await expect(verifyAuditChain(team.id)).resolves.toEqual({ intact: false, brokenAt: 2 });
  });
});
