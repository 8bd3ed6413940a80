import type { Request, Response } from 'express';
import { AppError } from '#shared/errors/AppError.ts';
import {
  acceptInvitation as acceptInvitationContract,
  readInvitation,
  readSession,
  requestPasswordReset as requestPasswordResetContract,
  resetPassword as resetPasswordContract,
  signIn,
  signOut,
  signOutEverywhere,
  type SessionResponse,
} from '#shared/schemas/session.ts';
import { acceptInvitation, findInvitation } from '#server/commands/acceptInvitation.ts';
import { endSessions } from '#server/commands/endSessions.ts';
import { requestPasswordReset, resetPassword } from '#server/commands/resetPassword.ts';
import { beginSession, checkPassword, endSession } from '#server/middlewares/authenticate.ts';
import { handle, handlePublic, personOf, type Route } from '#server/middlewares/handle.ts';
import { inTransaction } from '#server/models/database.ts';
import { presentSignedInPerson } from '#server/presenters/person.ts';
import type { Services } from './services.ts';

export function sessionRoutes({ config, limits, csrf }: Services): readonly Route[] {
  const mailIsLocal = config.smtpUrl === undefined;
  const answer = (request: Request, response: Response): SessionResponse => {
    const person = personOf(request);
    return {
      person: person && presentSignedInPerson(person, mailIsLocal),
      csrfToken: csrf.issue(request, response),
      mailIsLocal,
    };
  };

  return [
    handlePublic(readSession, ({ request, response }) => answer(request, response)),

    handlePublic(signIn, async ({ input, request, response }) => {
      await limits.spend('sign-in-address', request.ip ?? '');
      await limits.spend('sign-in-account', input.body.email);
      const person = await checkPassword(request, response);
      if (person === null) {
        throw new AppError('wrong-credentials', 'E-mail address or password is not right.');
      }
      await limits.forgive('sign-in-account', input.body.email);
      await person.update({ lastSignInAt: new Date() });
      await beginSession(request, person);
      return answer(request, response);
    }),

    handlePublic(signOut, async ({ person, request }) => {
      if (person !== null) await endSession(request);
    }),

    handle(signOutEverywhere, async ({ person, request }) => {
      await inTransaction((transaction) => endSessions(transaction, person));
      await endSession(request);
    }),

    handlePublic(requestPasswordResetContract, async ({ input, request }) => {
      await limits.spend('reset-address', request.ip ?? '');
      await limits.spend('reset-account', input.body.email);
      await requestPasswordReset(input.body.email);
      return {
        message:
          'If the address has an account, a mail with a link is on its way. The link works for half an hour.',
      };
    }),

    handlePublic(resetPasswordContract, async ({ input, request }) => {
      await limits.spend('token-address', request.ip ?? '');
      await resetPassword(input.body.token, input.body.password);
    }),

    handlePublic(readInvitation, async ({ input, request }) => {
      await limits.spend('token-address', request.ip ?? '');
      const { email, team, role } = await findInvitation(input.body.token);
      return { email, teamName: team.name, role };
    }),

    handlePublic(acceptInvitationContract, async ({ input, request, response }) => {
      await limits.spend('token-address', request.ip ?? '');
      const { token, name, password } = input.body;
      await beginSession(request, await acceptInvitation(token, name, password));
      return answer(request, response);
    }),
  ];
}
