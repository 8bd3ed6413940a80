import { useMutation, useQuery, useQueryClient, type QueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import {
  createInvitation,
  deleteInvitation,
  listSentMail,
  updatePerson,
  updateTeam,
} from '#shared/schemas/team.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

export const useSentMail = () =>
  useQuery({
    queryKey: queryKeys.sentMail,
    queryFn: ({ signal }) => call(listSentMail, { signal }),
    select: (answer) => answer.mails,
    staleTime: 0,
  });

const refreshTeam = (client: QueryClient) => client.invalidateQueries({ queryKey: queryKeys.team });

export function useUpdateTeam() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof updateTeam.body>) => call(updateTeam, { body }),
    onSuccess: (team) => client.setQueryData(queryKeys.team, team),
  });
}

export function useUpdatePerson() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ personId, ...body }: z.input<typeof updatePerson.body> & { personId: string }) =>
      call(updatePerson, { params: { personId }, body }),
    // After a refusal too: the list then shows what holds.
    onSettled: () => refreshTeam(client),
  });
}

export function useCreateInvitation() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof createInvitation.body>) => call(createInvitation, { body }),
    onSuccess: () => refreshTeam(client),
  });
}

export function useDeleteInvitation() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (invitationId: string) => call(deleteInvitation, { params: { invitationId } }),
    onSettled: () => refreshTeam(client),
  });
}
