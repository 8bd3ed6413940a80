import { randomUUID } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import { json } from 'node:stream/consumers';
import type { Response, Test } from 'supertest';
import { aPortal } from '#tests/builders/aFrame.ts';
import { PASSWORD } from '#tests/builders/aPerson.ts';
import type { Asker, World } from './world.ts';

/**
 * What the product answers. `may`: anything but a refusal (the request may still be in conflict with the state
 * of things). `signIn`: 401. `mayNot`: 403. `hidden`: 404.
 */
export type Verdict = 'may' | 'signIn' | 'mayNot' | 'hidden';

export interface Row {
  /** One letter per actor, in the order of ACTORS: + may, ? sign in, - may not, 0 hidden. */
  readonly own: string;
  /** What everybody of another team gets who names the world's things; `own`: it names none, so they get theirs. */
  readonly foreign: Verdict | 'own';
  readonly send: (asker: Asker, world: World) => PromiseLike<Response>;
  /** The request changes the asker's session: each asker sends it from a new browser. */
  readonly changesSession?: true;
}

const made = () => ({ id: randomUUID(), name: 'New', machine: '', document: aPortal() });
const token = 'a-token-that-nobody-was-ever-sent';

/**
 * Every endpoint. The columns of `own`: visitor, guest, technician, designer, reviewer, lead, outsider (a designer
 * the project is not shared with), administrator (a technician with the switch, it is not shared with).
 */
export const table: Readonly<Record<string, Row>> = {
  // prettier-ignore
  ...{
  'get /api/health':             { own: '++++++++', foreign: 'own', send: ({ client }) => client.get('/api/health') },
  'get /api/ready':              { own: '++++++++', foreign: 'own', send: ({ client }) => client.get('/api/ready') },
  'get /api/openapi.json':       { own: '++++++++', foreign: 'own', send: ({ client }) => client.get('/api/openapi.json') },
  'get /api/session':            { own: '++++++++', foreign: 'own', send: ({ client }) => client.get('/api/session') },
  'post /api/session':           { own: '++++++++', foreign: 'own', changesSession: true, send: ({ client }, { subject }) => client.post('/api/session', { email: subject.email, password: PASSWORD }) },
  'delete /api/session':         { own: '++++++++', foreign: 'own', changesSession: true, send: ({ client }) => client.delete('/api/session') },
  'delete /api/sessions':        { own: '?+++++++', foreign: 'own', changesSession: true, send: ({ client }) => client.delete('/api/sessions') },
  'post /api/password-resets':   { own: '++++++++', foreign: 'own', send: ({ client }) => client.post('/api/password-resets', { email: 'nobody@example.com' }) },
  'put /api/password-resets':    { own: '++++++++', foreign: 'own', send: ({ client }) => client.put('/api/password-resets', { token, password: PASSWORD }) },
  'post /api/invitations/read':  { own: '++++++++', foreign: 'own', send: ({ client }) => client.post('/api/invitations/read', { token }) },
  'post /api/invitations/accept': { own: '++++++++', foreign: 'own', send: ({ client }) => client.post('/api/invitations/accept', { token, name: 'New', password: PASSWORD }) },
  'patch /api/account':          { own: '?+++++++', foreign: 'own', send: ({ client }) => client.patch('/api/account', { theme: 'chalk' }) },
  'put /api/account/password':   { own: '?+++++++', foreign: 'own', changesSession: true, send: ({ client }) => client.put('/api/account/password', { currentPassword: PASSWORD, newPassword: PASSWORD }) },
  'get /api/team':               { own: '?+++++++', foreign: 'own', send: ({ client }) => client.get('/api/team') },
  'patch /api/team':             { own: '?------+', foreign: 'may', send: ({ client }) => client.patch('/api/team', { settings: { requiredReviews: 1 } }) },
  'patch /api/team/people/:personId': { own: '?------+', foreign: 'hidden', send: ({ client }, { subject }) => client.patch(`/api/team/people/${subject.id}`, { role: 'guest' }) },
  'post /api/team/invitations':  { own: '?------+', foreign: 'may', send: ({ client }) => client.post('/api/team/invitations', { email: `${randomUUID()}@example.com`, role: 'guest' }) },
  'delete /api/team/invitations/:invitationId': { own: '?000000+', foreign: 'hidden', send: async ({ client }, { invite }) => client.delete(`/api/team/invitations/${await invite()}`) },
  'get /api/team/mail':          { own: '?------+', foreign: 'may', send: ({ client }) => client.get('/api/team/mail') },
  'get /api/activity':           { own: '?+++++00', foreign: 'hidden', send: ({ client }, { projectId }) => client.get(`/api/activity?projectId=${projectId}`) },

  'get /api/projects':           { own: '?+++++++', foreign: 'own', send: ({ client }) => client.get('/api/projects') },
  'post /api/projects':          { own: '?--+--+-', foreign: 'own', send: ({ client }) => client.post('/api/projects', made()) },
  'get /api/projects/:projectId': { own: '?+++++00', foreign: 'hidden', send: ({ client }, { projectId }) => client.get(`/api/projects/${projectId}`) },
  'patch /api/projects/:projectId': { own: '?--+--00', foreign: 'hidden', send: ({ client }, { projectId }) => client.patch(`/api/projects/${projectId}`, { name: 'Stand 5' }) },
  'put /api/projects/:projectId/members/:personId': { own: '?--+-+00', foreign: 'hidden', send: ({ client }, { projectId, subject }) => client.put(`/api/projects/${projectId}/members/${subject.id}`) },
  'delete /api/projects/:projectId/members/:personId': { own: '?--+-+00', foreign: 'hidden', send: ({ client }, { projectId, subject }) => client.delete(`/api/projects/${projectId}/members/${subject.id}`) },
  'get /api/projects/:projectId/draft': { own: '?+++++00', foreign: 'hidden', send: ({ client }, { projectId }) => client.get(`/api/projects/${projectId}/draft`) },
  'put /api/projects/:projectId/draft': { own: '?--+--00', foreign: 'hidden', send: ({ client }, { projectId }) => client.put(`/api/projects/${projectId}/draft`, { version: 1, document: aPortal() }) },
  'get /api/projects/:projectId/events': { own: '?+++++00', foreign: 'hidden', send: ({ client }, { projectId }) => headOnly(client.get(`/api/projects/${projectId}/events`)) },

  'post /api/solves':            { own: '?--+++00', foreign: 'hidden', send: ({ client }, { projectId }) => client.post('/api/solves', { projectId }) },
  'get /api/solves':             { own: '?+++++00', foreign: 'hidden', send: ({ client }, { projectId }) => client.get(`/api/solves?projectId=${projectId}`) },
  'get /api/solves/:solveId':    { own: '?+++++00', foreign: 'hidden', send: ({ client }, { solveId }) => client.get(`/api/solves/${solveId}`) },
  'get /api/solves/:solveId/shapes': { own: '?+++++00', foreign: 'hidden', send: ({ client }, { solveId }) => client.get(`/api/solves/${solveId}/shapes`) },
  'post /api/solves/:solveId/cancel': { own: '?--+++00', foreign: 'hidden', send: ({ client }, { solveId }) => client.post(`/api/solves/${solveId}/cancel`) },

  'get /api/projects/:projectId/revisions': { own: '?+++++00', foreign: 'hidden', send: ({ client }, { projectId }) => client.get(`/api/projects/${projectId}/revisions`) },
  'post /api/projects/:projectId/revisions': { own: '?--+--00', foreign: 'hidden', send: ({ client }, { projectId }) => client.post(`/api/projects/${projectId}/revisions`, { draftVersion: 1, changeNote: 'stiffer legs' }) },
  'get /api/revisions/:revisionId': { own: '?+++++00', foreign: 'hidden', send: ({ client }, { revisionId }) => client.get(`/api/revisions/${revisionId}`) },
  'post /api/revisions/:revisionId/recall': { own: '?-----00', foreign: 'hidden', send: ({ client }, { revisionId }) => client.post(`/api/revisions/${revisionId}/recall`) },
  'post /api/revisions/:revisionId/approve': { own: '?----+00', foreign: 'hidden', send: ({ client }, { revisionId }) => client.post(`/api/revisions/${revisionId}/approve`, { password: PASSWORD }) },
  'post /api/revisions/:revisionId/withdraw': { own: '?----+00', foreign: 'hidden', send: ({ client }, { revisionId }) => client.post(`/api/revisions/${revisionId}/withdraw`, { reason: 'wrong feet' }) },
  'post /api/revisions/:revisionId/comments': { own: '?--+++00', foreign: 'hidden', send: ({ client }, { revisionId }) => client.post(`/api/revisions/${revisionId}/comments`, { id: randomUUID(), body: 'Which feet?' }) },
  'post /api/revisions/:revisionId/accept': { own: '?---++00', foreign: 'hidden', send: ({ client }, { revisionId }) => client.post(`/api/revisions/${revisionId}/accept`, { comment: '' }) },
  'post /api/revisions/:revisionId/return': { own: '?---++00', foreign: 'hidden', send: ({ client }, { revisionId }) => client.post(`/api/revisions/${revisionId}/return`, { comment: 'which feet?' }) },
  } satisfies Record<string, Row>,
};

/** An event stream never ends by itself: its head is enough. A refusal is read whole. */
const headOnly = (test: Test): Test =>
  test.buffer(true).parse((message, done) => {
    const response = message as unknown as IncomingMessage;
    if (response.statusCode === 200) {
      response.destroy();
      done(null, null);
      return;
    }
    json(response).then(
      (body) => {
        done(null, body);
      },
      (error: unknown) => {
        done(error as Error, null);
      },
    );
  });

const LETTERS: Readonly<Record<string, Verdict>> = {
  '+': 'may',
  '?': 'signIn',
  '-': 'mayNot',
  '0': 'hidden',
};

/** What the letter of the actor at this place of the row says. */
export function verdictAt(row: Row, place: number): Verdict {
  const verdict = LETTERS[row.own[place] ?? ''];
  if (verdict === undefined) throw new Error(`The row ${row.own} has no letter ${place}.`);
  return verdict;
}
