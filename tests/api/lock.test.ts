import { pino } from 'pino';
import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { fingerprint } from '#shared/frame/fingerprint.ts';
import type { RevisionResponse } from '#shared/schemas/revision.ts';
import type { SolveResponse } from '#shared/schemas/solve.ts';
import { AuditEntry } from '#server/models/AuditEntry.ts';
import { startRunner } from '#server/workers/runner.ts';
import { aPerson, PASSWORD } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';
import { startApp, type TestApp } from './setup/app.ts';
import { signedIn, type Client } from './setup/client.ts';
import { asOwner } from './setup/owner.ts';
import { aProject, submit } from './setup/project.ts';

let app: TestApp;
let lead: Client;
let locked: RevisionResponse;

beforeAll(async () => {
  app = await startApp();
  const runner = await startRunner(app.config, pino({ level: 'silent' }));
  const team = await aTeam();
  const designer = await signedIn(app.express, await aPerson(team));
  const reviewer = await signedIn(app.express, await aPerson(team, { role: 'reviewer' }));
  lead = await signedIn(app.express, await aPerson(team, { role: 'lead' }));
  const { id } = await aProject(designer);
  const revision = await submit(designer, id);
  await runner.stop();
  await reviewer.post(`/api/revisions/${revision.id}/accept`).expect(200);
  const approved = await lead.post(`/api/revisions/${revision.id}/approve`, { password: PASSWORD });
  expect(approved.status).toBe(200);
  locked = approved.body as RevisionResponse;
});

afterAll(() => app.stop());

describe('a lock record', () => {
  it('carries fingerprints that anybody can take again from what the API gives', async () => {
    const { lock } = locked;
    expect(lock?.fingerprint).toBe(fingerprint(lock?.content));
    expect(lock?.content.documentFingerprint).toBe(fingerprint(locked.document));
    for (const { solveId, method } of locked.solves) {
      const frozen = lock?.content.results.find((result) => result.method === method);
      const { summary } = (await lead.get(`/api/solves/${solveId}`)).body as SolveResponse;
      const { timing, ...certain } = summary!;
      expect(timing.total).toBeGreaterThan(0);
      expect(frozen?.summaryFingerprint).toBe(fingerprint(certain));
      const shapes = await lead.get(`/api/solves/${solveId}/shapes`).responseType('blob');
      const hash = createHash('sha256')
        .update(shapes.body as Buffer)
        .digest('hex');
      expect(frozen?.shapesFingerprint).toBe(hash);
    }
  });

  it('holds the head of the team’s audit chain, and the chain holds its fingerprint', async () => {
    const content = locked.lock!.content;
    const head = await AuditEntry.findOne({ where: { sequence: content.auditSequence } });
    expect(head).toMatchObject({ hash: content.auditHead, action: 'revision-approved' });
    const after = await AuditEntry.findOne({ where: { sequence: content.auditSequence + 1 } });
    expect(after?.action).toBe('revision-locked');
    expect(after?.canonical).toContain(locked.lock!.fingerprint);
  });
});

describe('no SQL of the run-time role', () => {
  const hex = 'f'.repeat(64);
  it.each([
    `UPDATE frame_documents SET document = '{}'`,
    `DELETE FROM frame_documents`,
    `UPDATE solve_results SET summary = '{}', summary_fingerprint = '${hex}'`,
    `UPDATE solve_results SET shapes = ''`,
    `DELETE FROM solve_results`,
    `UPDATE solves SET status = 'queued'`,
    `UPDATE solves SET method = 'lumped'`,
    `DELETE FROM solves`,
    `UPDATE revisions SET document_fingerprint = '${hex}'`,
    `UPDATE revisions SET settings = '{}'`,
    `UPDATE revisions SET change_note = 'x'`,
    `UPDATE revisions SET number = 7`,
    `UPDATE revisions SET required_reviews = 1, sole_reviewer_may_approve = true`,
    `UPDATE revisions SET approved_by_id = submitted_by_id`,
    `UPDATE revisions SET approved_at = now()`,
    `UPDATE revisions SET state = 'submitted'`,
    `UPDATE revisions SET state = 'accepted'`,
    `UPDATE revisions SET state = 'returned'`,
    `UPDATE revisions SET state = 'superseded'`,
    `DELETE FROM revisions`,
    `UPDATE revision_authors SET person_id = gen_random_uuid()`,
    `DELETE FROM revision_authors`,
    `INSERT INTO revision_authors SELECT r.id, p.id FROM revisions r, people p WHERE p.role = 'lead'`,
    `UPDATE revision_solves SET result_key = '${hex}'`,
    `DELETE FROM revision_solves`,
    `INSERT INTO revision_solves SELECT revision_id, team_id, solve_id, result_key FROM revision_solves`,
    `UPDATE reviews SET comment = 'x'`,
    `DELETE FROM reviews`,
    `INSERT INTO reviews SELECT gen_random_uuid(), revision_id, p.id, 'accept', '', now() FROM reviews, people p WHERE p.role = 'lead'`,
    `UPDATE revision_comments SET body = 'x'`,
    `DELETE FROM revision_comments`,
    `UPDATE lock_records SET content = '{}', fingerprint = encode(sha256('{}'), 'hex')`,
    `DELETE FROM lock_records`,
    `UPDATE draft_versions SET written_by_id = gen_random_uuid()`,
    `DELETE FROM draft_versions`,
    `UPDATE drafts SET version = version + 1`,
    `DELETE FROM drafts`,
    `DELETE FROM projects`,
    `UPDATE audit_entries SET action = 'x'`,
    `DELETE FROM audit_entries`,
    `TRUNCATE revisions CASCADE`,
    `TRUNCATE lock_records`,
    `TRUNCATE solve_results CASCADE`,
    `TRUNCATE frame_documents CASCADE`,
    `ALTER TABLE revisions DISABLE TRIGGER ALL`,
    `DROP TRIGGER revisions_step ON revisions`,
    `ALTER TABLE lock_records DROP COLUMN content`,
    `DROP TABLE lock_records`,
    `SET session_replication_role = replica`,
  ])('changes a locked revision: %s', async (sql) => {
    // Refused by a grant, by a trigger, or by a check when it would be committed; never for a slip in the SQL.
    await expect(app.sequelize.query(sql)).rejects.toMatchObject({
      original: { code: expect.stringMatching(/^(42501|23001|23514)$/) as string },
    });
    const after = await lead.get(`/api/revisions/${locked.id}`).expect(200);
    expect(after.body).toEqual(locked);
  });

  it('is refused by triggers to the owner of the tables too', async () => {
    for (const table of [
      'frame_documents',
      'solve_results',
      'revisions',
      'reviews',
      'lock_records',
    ]) {
      await expect(asOwner(app.database, `DELETE FROM ${table}`)).rejects.toThrow(/forbidden/);
    }
    await expect(
      asOwner(app.database, `UPDATE revisions SET change_note = 'x', state = 'withdrawn'`),
    ).rejects.toThrow(/never changed/);
  });
});
