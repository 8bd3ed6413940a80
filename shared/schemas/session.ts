import { z } from 'zod';
import { UNIT_SYSTEMS } from '../units/displayUnits.ts';
import { emailAddress, newPassword, noContent, nothing, personName, role, uuid } from './common.ts';
import { endpoint } from './endpoint.ts';

export const unitSystem = z.enum(UNIT_SYSTEMS);
export const theme = z.enum(['paper', 'chalk', 'system']);
export type Theme = z.infer<typeof theme>;

/** The person signed in, with what the client may offer them. */
export const signedInPerson = z.object({
  id: uuid,
  name: z.string(),
  email: z.string(),
  role,
  isAdministrator: z.boolean(),
  units: unitSystem,
  theme,
  team: z.object({ id: uuid, name: z.string() }),
  abilities: z.object({
    createProject: z.boolean(),
    administerTeam: z.boolean(),
    readSentMail: z.boolean(),
  }),
});
export type SignedInPerson = z.infer<typeof signedInPerson>;

/** `csrfToken` goes back in the `X-CSRF-Token` header of every state-changing request. */
export const sessionResponse = z.object({
  person: signedInPerson.nullable(),
  csrfToken: z.string(),
  /** Whether mail goes to the local fake server, read at Team → Sent mail. */
  mailIsLocal: z.boolean(),
});
export type SessionResponse = z.infer<typeof sessionResponse>;

export const readSession = endpoint({
  method: 'get',
  path: '/api/session',
  summary: 'Who is signed in, and the token for state-changing requests.',
  status: 200,
  access: 'public',
  params: nothing,
  query: nothing,
  body: nothing,
  response: sessionResponse,
});

export const signIn = endpoint({
  method: 'post',
  path: '/api/session',
  summary: 'Sign in with e-mail address and password.',
  status: 200,
  access: 'public',
  params: nothing,
  query: nothing,
  body: z.strictObject({ email: emailAddress, password: z.string().min(1).max(200) }),
  response: sessionResponse,
});

export const signOut = endpoint({
  method: 'delete',
  path: '/api/session',
  summary: 'Sign out here.',
  status: 204,
  access: 'public',
  params: nothing,
  query: nothing,
  body: nothing,
  response: noContent,
});

export const signOutEverywhere = endpoint({
  method: 'delete',
  path: '/api/sessions',
  summary: 'Sign out everywhere, here included.',
  status: 204,
  access: 'signed-in',
  params: nothing,
  query: nothing,
  body: nothing,
  response: noContent,
});

const token = z.string().min(20).max(200);

export const requestPasswordReset = endpoint({
  method: 'post',
  path: '/api/password-resets',
  summary:
    'Ask for a reset link by e-mail. The answer is the same whether or not the address is known.',
  status: 202,
  access: 'public',
  params: nothing,
  query: nothing,
  body: z.strictObject({ email: emailAddress }),
  response: z.object({ message: z.string() }),
});

export const resetPassword = endpoint({
  method: 'put',
  path: '/api/password-resets',
  summary: 'Set a new password with the token of a reset link; ends every session.',
  status: 204,
  access: 'public',
  params: nothing,
  query: nothing,
  body: z.strictObject({ token, password: newPassword }),
  response: noContent,
});

export const readInvitation = endpoint({
  method: 'post',
  path: '/api/invitations/read',
  summary: 'What an invitation token is for (the token travels in the body, never in a URL).',
  status: 200,
  access: 'public',
  params: nothing,
  query: nothing,
  body: z.strictObject({ token }),
  response: z.object({ email: z.string(), teamName: z.string(), role }),
});

export const acceptInvitation = endpoint({
  method: 'post',
  path: '/api/invitations/accept',
  summary: 'Join the team with an invitation token; signs in.',
  status: 200,
  access: 'public',
  params: nothing,
  query: nothing,
  body: z.strictObject({ token, name: personName, password: newPassword }),
  response: sessionResponse,
});

export const updateAccount = endpoint({
  method: 'patch',
  path: '/api/account',
  summary: 'Change your name, units or theme.',
  status: 200,
  access: 'signed-in',
  params: nothing,
  query: nothing,
  body: z.strictObject({
    name: personName.optional(),
    units: unitSystem.optional(),
    theme: theme.optional(),
  }),
  response: signedInPerson,
});

export const changePassword = endpoint({
  method: 'put',
  path: '/api/account/password',
  summary: 'Change your password; every other session ends.',
  status: 204,
  access: 'signed-in',
  params: nothing,
  query: nothing,
  body: z.strictObject({ currentPassword: z.string().min(1).max(200), newPassword }),
  response: noContent,
});
