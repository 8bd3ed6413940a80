import {
  changePassword as changePasswordContract,
  updateAccount,
} from '#shared/schemas/session.ts';
import { changePassword } from '#server/commands/changePassword.ts';
import { updateAccount as changeAccount } from '#server/commands/updateAccount.ts';
import { beginSession } from '#server/middlewares/authenticate.ts';
import { handle, type Route } from '#server/middlewares/handle.ts';
import { authorize } from '#server/policies/policy.ts';
import { presentSignedInPerson } from '#server/presenters/person.ts';
import type { Services } from './services.ts';

export const accountRoutes = ({ config, limits }: Services): readonly Route[] => [
  handle(updateAccount, async ({ person, input }) => {
    authorize(person, 'change-account', person);
    const changed = await changeAccount(person, input.body);
    return presentSignedInPerson(changed, config.smtpUrl === undefined);
  }),

  handle(changePasswordContract, async ({ person, input, request }) => {
    authorize(person, 'change-account', person);
    await limits.spend('password-person', person.id);
    await changePassword(person, input.body.currentPassword, input.body.newPassword);
    await limits.forgive('password-person', person.id);
    await beginSession(request, person);
  }),
];
