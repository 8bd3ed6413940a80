import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import {
  changePassword,
  signOutEverywhere,
  updateAccount,
  type SessionResponse,
} from '#shared/schemas/session.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

export function useUpdateAccount() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof updateAccount.body>) => call(updateAccount, { body }),
    onSuccess: (person) => {
      client.setQueryData<SessionResponse>(queryKeys.session, (session) =>
        session ? { ...session, person } : session,
      );
    },
  });
}

export const useChangePassword = () =>
  useMutation({
    mutationFn: (body: z.input<typeof changePassword.body>) => call(changePassword, { body }),
  });

export const useSignOutEverywhere = () =>
  useMutation({ mutationFn: () => call(signOutEverywhere, {}) });
