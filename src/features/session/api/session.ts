import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import {
  acceptInvitation,
  readInvitation,
  requestPasswordReset,
  resetPassword,
  signIn,
  type SessionResponse,
} from '#shared/schemas/session.ts';
import { call, rememberCsrfToken } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

/** Begins a session in this window: nothing fetched for an earlier person stays. */
function useBeginSession() {
  const client = useQueryClient();
  return (session: SessionResponse) => {
    rememberCsrfToken(session.csrfToken);
    client.clear();
    client.setQueryData(queryKeys.session, session);
  };
}

export function useSignIn() {
  const begin = useBeginSession();
  return useMutation({
    mutationFn: (body: z.input<typeof signIn.body>) => call(signIn, { body }),
    onSuccess: begin,
  });
}

export function useAcceptInvitation() {
  const begin = useBeginSession();
  return useMutation({
    mutationFn: (body: z.input<typeof acceptInvitation.body>) => call(acceptInvitation, { body }),
    onSuccess: begin,
  });
}

export const useReadInvitation = () =>
  useMutation({ mutationFn: (token: string) => call(readInvitation, { body: { token } }) });

export const useRequestPasswordReset = () =>
  useMutation({ mutationFn: (email: string) => call(requestPasswordReset, { body: { email } }) });

export const useResetPassword = () =>
  useMutation({
    mutationFn: (body: z.input<typeof resetPassword.body>) => call(resetPassword, { body }),
  });
