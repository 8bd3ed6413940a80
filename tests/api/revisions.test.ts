import { randomUUID } from 'node:crypto';
import { pino } from 'pino';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import type { DraftResponse, ProjectResponse, ProjectSummary } from '#shared/schemas/project.ts';
import type { RevisionBrief, RevisionResponse } from '#shared/schemas/revision.ts';
import { updateTeam } from '#server/commands/updateTeam.ts';
import type { Person } from '#server/models/Person.ts';
import type { Team } from '#server/models/Team.ts';
import { startRunner, type Runner } from '#server/workers/runner.ts';
import { aPortal, type FrameInput } from '#tests/builders/aFrame.ts';
import { anAdministrator, aPerson, PASSWORD } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';
import { startApp, type TestApp } from './setup/app.ts';
import { signedIn, visitor, type Client } from './setup/client.ts';
import { mailsTo } from './setup/mail.ts';
import { aProject, solveAll, submit } from './setup/project.ts';

let app: TestApp;
let runner: Runner;
let team: Team;
let people: Record<'designer' | 'colleague' | 'reviewer' | 'lead' | 'guest', Person>;
let designer: Client;
let colleague: Client;
let reviewer: Client;
let lead: Client;

beforeAll(async () => {
  app = await startApp();
  runner = await startRunner(app.config, pino({ level: 'silent' }));
  team = await aTeam();
  people = {
    designer: await aPerson(team, { name: 'Perrin Oake' }),
    colleague: await aPerson(team, { name: 'Sable Wynn' }),
    reviewer: await aPerson(team, { name: 'Juno Hale', role: 'reviewer' }),
    lead: await aPerson(team, { name: 'Otis Crane', role: 'lead' }),
    guest: await aPerson(team, { name: 'Vera Lund', role: 'guest' }),
  };
  designer = await signedIn(app.express, people.designer);
  colleague = await signedIn(app.express, people.colleague);
  reviewer = await signedIn(app.express, people.reviewer);
  lead = await signedIn(app.express, people.lead);
});

afterAll(async () => {
  await runner.stop();
  await app.stop();
});

const read = async (client: Client, id: string): Promise<RevisionResponse> =>
  (await client.get(`/api/revisions/${id}`).expect(200)).body as RevisionResponse;

const accept = (client: Client, id: string) => client.post(`/api/revisions/${id}/accept`);
const giveBack = (client: Client, id: string) =>
  client.post(`/api/revisions/${id}/return`, { comment: 'The feet are unstated.' });
const approve = (client: Client, id: string, password = PASSWORD) =>
  client.post(`/api/revisions/${id}/approve`, { password });

const stateless = aPortal();
const twoStates = (): FrameInput => ({
  ...aPortal(),
  states: [
    { id: 'soft', name: 'Feet soft', supports: 'soft' },
    { id: 'stiff', name: 'Feet stiff', supports: 'stiff' },
  ],
});

describe('submitting', () => {
  it('lists every result that is missing, and freezes them all when they are in', async () => {
    const project = await aProject(designer, twoStates());
    const path = `/api/projects/${project.id}/revisions`;
    const note = { draftVersion: 1, changeNote: 'First frame.' };
    await designer.post('/api/solves', { projectId: project.id, stateId: null }).expect(202);
    await solveAll(designer, project.id, ['soft']);
    const refused = await designer.post(path, note).expect(409);
    expect((refused.body as { details: { missing: object[] } }).details.missing).toEqual([
      ...['consistent', 'lumped'].map((method) => ({
        ...{ stateId: 'stiff', stateName: 'Feet stiff', method, reason: 'not solved' },
      })),
    ]);
    await solveAll(designer, project.id, ['stiff']);
    const submitted = (await designer.post(path, note).expect(201)).body as RevisionResponse;
    expect(submitted).toMatchObject({ number: 1, state: 'submitted', acceptedReviews: 0 });
    expect(submitted.solves).toHaveLength(4);
    expect(submitted.firstFrequencyHz).toBeGreaterThan(0);
    expect(submitted.firstFrequencyComplete).toBe(true);
    expect(submitted.documentFingerprint).toBe(project.draftFingerprint);
    expect(submitted.authors.map(({ id }) => id)).toEqual([people.designer.id]);
    await designer.post(path, note).expect(409);
    const [mail] = await mailsTo(people.reviewer.email);
    expect(mail?.subject).toContain('R1 waits for review');
    expect(mail?.text).toContain(
      `${app.config.publicUrl}/projects/${project.id}/release?revision=${submitted.number}`,
    );
  });

  it('refuses a draft that moved on (412), an unsolvable one and an empty note (422)', async () => {
    const broken = aPortal();
    broken.members[0]!.section = 'none';
    const { id } = await aProject(designer, broken);
    const path = `/api/projects/${id}/revisions`;
    await designer.post(path, { draftVersion: 2, changeNote: 'x' }).expect(412);
    const refused = await designer.post(path, { draftVersion: 1, changeNote: 'x' }).expect(422);
    expect(refused.body).toMatchObject({ code: 'invalid-document' });
    await designer.post(path, { draftVersion: 1, changeNote: ' ' }).expect(422);
  });

  it('is for designers of the project', async () => {
    const { id } = await aProject(designer);
    const note = { draftVersion: 1, changeNote: 'x' };
    const path = `/api/projects/${id}/revisions`;
    await (await visitor(app.express)).post(path, note).expect(401);
    await reviewer.post(path, note).expect(403);
    await colleague.post(path, note).expect(404);
  });
});

describe('the way to a locked revision', () => {
  it('goes from submitted to accepted to approved, with a lock record, and supersedes', async () => {
    const project = await aProject(designer, stateless);
    const first = await submit(designer, project.id);
    expect(await read(reviewer, first.id)).toMatchObject({
      abilities: { review: true, return: true, approve: false, comment: true },
      withheld: { review: null, approve: null },
    });
    await approve(lead, first.id).expect(409);
    const accepted = await accept(reviewer, first.id).expect(200);
    expect(accepted.body).toMatchObject({ state: 'accepted', acceptedReviews: 1 });
    expect((await accept(reviewer, first.id).expect(200)).body).toMatchObject({
      acceptedReviews: 1,
    });
    await approve(lead, first.id, 'not my password').expect(401);
    await approve(reviewer, first.id).expect(403);
    const approved = (await approve(lead, first.id).expect(200)).body as RevisionResponse;
    expect(approved).toMatchObject({ state: 'approved', approvedBy: { id: people.lead.id } });
    expect(approved.lock?.content).toMatchObject({
      ...{ revision: 1, scope: 'calculation released for manufacture' },
      ...{ documentFingerprint: first.documentFingerprint, approvedBy: people.lead.id },
      release: { requiredReviews: 1, soleReviewerMayApprove: false },
    });
    expect(approved.lock?.content.results.map(({ method }) => method).sort()).toEqual([
      'consistent',
      'lumped',
    ]);
    await approve(lead, first.id).expect(409);

    const draft = (await designer.get(`/api/projects/${project.id}/draft`)).body as DraftResponse;
    const changed = { ...draft.document, name: 'Portal, stiffer' };
    await designer
      .put(`/api/projects/${project.id}/draft`, { version: draft.version, document: changed })
      .expect(200);
    const second = await submit(designer, project.id);
    await accept(reviewer, second.id).expect(200);
    await approve(lead, second.id).expect(200);
    const listed = await lead.get(`/api/projects/${project.id}/revisions`).expect(200);
    const { revisions } = listed.body as { revisions: RevisionBrief[] };
    expect(revisions.map(({ number, state }) => [number, state])).toEqual([
      [2, 'approved'],
      [1, 'superseded'],
    ]);
    expect((await read(lead, first.id)).lock?.fingerprint).toBe(approved.lock?.fingerprint);

    await designer.post(`/api/revisions/${second.id}/withdraw`, { reason: 'x' }).expect(403);
    await lead.post(`/api/revisions/${second.id}/withdraw`, { reason: ' ' }).expect(422);
    const withdrawn = await lead
      .post(`/api/revisions/${second.id}/withdraw`, { reason: 'Wrong motor mass.' })
      .expect(200);
    expect(withdrawn.body).toMatchObject({
      state: 'withdrawn',
      withdrawal: { by: { id: people.lead.id }, reason: 'Wrong motor mass.' },
    });
    await lead.post(`/api/revisions/${first.id}/withdraw`, { reason: 'x' }).expect(409);
  });

  it('lets authors recall and nobody else, and reviewers return with a comment', async () => {
    const { id: projectId } = await aProject(designer, aPortal({ width: 1.2 }));
    await designer.put(`/api/projects/${projectId}/members/${people.colleague.id}`).expect(200);
    const first = await submit(designer, projectId);
    await colleague.post(`/api/revisions/${first.id}/recall`).expect(403);
    const recalled = await designer.post(`/api/revisions/${first.id}/recall`).expect(200);
    expect(recalled.body).toMatchObject({ state: 'recalled' });
    await accept(reviewer, first.id).expect(409);
    const second = await submit(designer, projectId);
    expect(second.number).toBe(2);
    await reviewer.post(`/api/revisions/${second.id}/return`, { comment: '' }).expect(422);
    expect((await giveBack(reviewer, second.id).expect(200)).body).toMatchObject({
      state: 'returned',
      reviews: [{ verdict: 'return', comment: 'The feet are unstated.' }],
    });
    await vi.waitFor(async () => {
      const mails = await mailsTo(people.designer.email);
      expect(mails.map(({ text }) => text).join()).toContain('The feet are unstated.');
    }, 10_000);
  });

  it('takes a comment once, however often it is sent', async () => {
    const { id: projectId } = await aProject(designer, aPortal({ width: 1.21 }));
    const revision = await submit(designer, projectId);
    const comment = { id: randomUUID(), body: 'Why four divisions?' };
    const path = `/api/revisions/${revision.id}/comments`;
    await reviewer.post(path, comment).expect(201);
    await reviewer.post(path, comment).expect(201);
    await designer.post(path, { ...comment, body: 'Mine' }).expect(409);
    expect((await read(designer, revision.id)).comments).toHaveLength(1);
  });
});

describe('who may review and approve', () => {
  it('keeps whoever changed the draft from both, also after a change of role', async () => {
    const author = await aPerson(team, { name: 'Wren Tolley' });
    const client = await signedIn(app.express, author);
    const { id: projectId } = await aProject(client, aPortal({ width: 1.3 }));
    const revision = await submit(client, projectId);
    await author.update({ role: 'lead' });
    await accept(client, revision.id).expect(403);
    await accept(reviewer, revision.id).expect(200);
    await approve(client, revision.id).expect(403);
    expect((await read(client, revision.id)).withheld.approve).toContain('You changed this draft');
    expect((await read(client, revision.id)).abilities).toMatchObject({ approve: false });
  });

  it('lets a sole reviewer approve only where the team’s rule frozen with the revision says so', async () => {
    const { id: projectId } = await aProject(designer, aPortal({ width: 1.4 }));
    const strict = await submit(designer, projectId);
    await accept(lead, strict.id).expect(200);
    await approve(lead, strict.id).expect(403);
    expect((await read(lead, strict.id)).withheld.approve).toContain('only reviewer');
    const administrator = await anAdministrator(team);
    await updateTeam(administrator, { settings: { soleReviewerMayApprove: true } });
    await approve(lead, strict.id).expect(403);
    await giveBack(lead, strict.id).expect(200);
    const lenient = await submit(designer, projectId);
    await accept(lead, lenient.id).expect(200);
    await approve(lead, lenient.id).expect(200);
    await updateTeam(administrator, { settings: { soleReviewerMayApprove: false } });
  });

  it('counts distinct reviewers up to the number required', async () => {
    const administrator = await anAdministrator(team);
    await updateTeam(administrator, { settings: { requiredReviews: 2 } });
    const { id: projectId } = await aProject(designer, aPortal({ width: 1.5 }));
    const revision = await submit(designer, projectId);
    await updateTeam(administrator, { settings: { requiredReviews: 1 } });
    await accept(reviewer, revision.id).expect(200);
    const once = (await accept(reviewer, revision.id).expect(200)).body as RevisionResponse;
    expect(once).toMatchObject({ state: 'submitted', acceptedReviews: 1, requiredReviews: 2 });
    expect(once.withheld.review).toContain('accepted');
    expect((await accept(lead, revision.id).expect(200)).body).toMatchObject({ state: 'accepted' });
  });

  it('says in the list whose move it is', async () => {
    const { id: projectId } = await aProject(designer, aPortal({ width: 1.6 }));
    const revision = await submit(designer, projectId);
    const row = async (client: Client): Promise<ProjectSummary> =>
      (await client.get(`/api/projects/${projectId}`).expect(200)).body as ProjectResponse;
    expect(await row(reviewer)).toMatchObject({ waitsFor: 'reviewer', waitsForMe: true });
    expect(await row(designer)).toMatchObject({ waitsFor: 'reviewer', waitsForMe: false });
    await accept(reviewer, revision.id).expect(200);
    expect(await row(lead)).toMatchObject({ waitsFor: 'lead', waitsForMe: true });
    expect(await row(reviewer)).toMatchObject({ waitsFor: 'lead', waitsForMe: false });
    await approve(lead, revision.id).expect(200);
    expect(await row(lead)).toMatchObject({
      ...{ waitsFor: 'nobody', waitsForMe: false, approvedRevision: { number: 1 } },
    });
  });
});

describe('races', () => {
  const anAccepted = async (width: number): Promise<RevisionResponse> => {
    const { id } = await aProject(designer, aPortal({ width }));
    const revision = await submit(designer, id);
    await accept(reviewer, revision.id).expect(200);
    return revision;
  };

  it.each([1.71, 1.72, 1.73])('approve against return ends one way (%s)', async (width) => {
    const { id } = await anAccepted(width);
    const answers = await Promise.all([approve(lead, id), giveBack(reviewer, id)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    const loser = answers.find(({ status }) => status === 409)!;
    const { state, lock } = await read(lead, id);
    expect((loser.body as { detail: string }).detail).toMatch(
      state === 'approved' ? /has been approved/ : /has been returned/,
    );
    expect(lock === null).toBe(state === 'returned');
  });

  it('two approvals lock once', async () => {
    const { id } = await anAccepted(1.74);
    const other = await signedIn(app.express, await aPerson(team, { role: 'lead' }));
    const answers = await Promise.all([approve(lead, id), approve(other, id)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  it('two submissions make one revision; recall against accept ends one way', async () => {
    const { id: projectId } = await aProject(designer, aPortal({ width: 1.75 }));
    await solveAll(designer, projectId);
    const send = () =>
      designer.post(`/api/projects/${projectId}/revisions`, { draftVersion: 1, changeNote: 'x' });
    const answers = await Promise.all([send(), send()]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409]);
    const { id } = answers.find(({ status }) => status === 201)!.body as RevisionResponse;
    const moves = await Promise.all([
      designer.post(`/api/revisions/${id}/recall`),
      accept(reviewer, id),
    ]);
    expect(moves.map(({ status }) => status).sort()).toEqual([200, 409]);
  });
});
