import { z } from 'zod';
import { emailAddress, noContent, nothing, role, timestamp, uuid } from './common.ts';
import { endpoint } from './endpoint.ts';

export const teamSettings = z.strictObject({
  /** May one lead be both the only reviewer and the approver? */
  soleReviewerMayApprove: z.boolean(),
  /** How many reviewers have to accept before a lead can approve. */
  requiredReviews: z.int().min(1).max(5),
});
export type TeamSettings = z.infer<typeof teamSettings>;

export const teamPerson = z.object({
  id: uuid,
  name: z.string(),
  /** Shown to administrators only; empty otherwise. */
  email: z.string(),
  role,
  isAdministrator: z.boolean(),
  active: z.boolean(),
  lastSignInAt: timestamp.nullable(),
});
export type TeamPerson = z.infer<typeof teamPerson>;

export const invitation = z.object({
  id: uuid,
  email: z.string(),
  role,
  isAdministrator: z.boolean(),
  invitedBy: z.string(),
  expiresAt: timestamp,
});
export type Invitation = z.infer<typeof invitation>;

export const teamResponse = z.object({
  id: uuid,
  name: z.string(),
  settings: teamSettings,
  people: z.array(teamPerson),
  invitations: z.array(invitation),
  abilities: z.object({ administer: z.boolean(), readSentMail: z.boolean() }),
});
export type TeamResponse = z.infer<typeof teamResponse>;

export const readTeam = endpoint({
  method: 'get',
  path: '/api/team',
  summary: 'The team: its people, settings and, for administrators, open invitations.',
  status: 200,
  access: 'signed-in',
  params: nothing,
  query: nothing,
  body: nothing,
  response: teamResponse,
});

export const updateTeam = endpoint({
  method: 'patch',
  path: '/api/team',
  summary: 'Change the team’s name or settings (administrators).',
  status: 200,
  access: 'signed-in',
  params: nothing,
  query: nothing,
  body: z.strictObject({
    name: z.string().trim().min(1, 'Enter a name.').max(120).optional(),
    settings: teamSettings.partial().optional(),
  }),
  response: teamResponse,
});

export const updatePerson = endpoint({
  method: 'patch',
  path: '/api/team/people/:personId',
  summary:
    'Change a person’s role, administrator switch or activity (administrators); ends their sessions.',
  status: 200,
  access: 'signed-in',
  params: z.strictObject({ personId: uuid }),
  query: nothing,
  body: z.strictObject({
    role: role.optional(),
    isAdministrator: z.boolean().optional(),
    active: z.boolean().optional(),
  }),
  response: teamPerson,
});

export const createInvitation = endpoint({
  method: 'post',
  path: '/api/team/invitations',
  summary:
    'Invite somebody by e-mail (administrators). Repeating it replaces the earlier invitation.',
  status: 201,
  access: 'signed-in',
  params: nothing,
  query: nothing,
  body: z.strictObject({ email: emailAddress, role, isAdministrator: z.boolean().default(false) }),
  response: invitation,
});

export const deleteInvitation = endpoint({
  method: 'delete',
  path: '/api/team/invitations/:invitationId',
  summary: 'Take an invitation back (administrators).',
  status: 204,
  access: 'signed-in',
  params: z.strictObject({ invitationId: uuid }),
  query: nothing,
  body: nothing,
  response: noContent,
});

export const sentMail = z.object({
  id: uuid,
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  sentAt: timestamp,
});
export type SentMail = z.infer<typeof sentMail>;

export const listSentMail = endpoint({
  method: 'get',
  path: '/api/team/mail',
  summary:
    'Mail caught by the local fake server, newest first (administrators; 404 when a real server is set).',
  status: 200,
  access: 'signed-in',
  params: nothing,
  query: nothing,
  body: nothing,
  response: z.object({ mails: z.array(sentMail) }),
});
