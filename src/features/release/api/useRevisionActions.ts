import { useMutation, useQueryClient } from '@tanstack/react-query';
import {
  acceptRevision,
  approveRevision,
  createRevisionComment,
  recallRevision,
  returnRevision,
  submitRevision,
  withdrawRevision,
  type RevisionResponse,
} from '#shared/schemas/revision.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

/** What follows every change of a revision: the answer is the truth, everything around it is read again. */
function useSettle(projectId: string) {
  const client = useQueryClient();
  return {
    onSuccess: (revision: RevisionResponse) => {
      client.setQueryData(queryKeys.revision(revision.id), revision);
    },
    // After a refusal too: somebody else may have decided meanwhile, and the screen has to say so.
    onSettled: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: queryKeys.project(projectId) }),
        client.invalidateQueries({ queryKey: ['revision'] }),
        client.invalidateQueries({ queryKey: queryKeys.projects }),
      ]),
  };
}

export function useSubmitRevision(projectId: string) {
  return useMutation({
    mutationFn: (body: { draftVersion: number; changeNote: string }) =>
      call(submitRevision, { params: { projectId }, body }),
    ...useSettle(projectId),
  });
}

export function useRecallRevision(projectId: string, revisionId: string) {
  return useMutation({
    mutationFn: () => call(recallRevision, { params: { revisionId } }),
    ...useSettle(projectId),
  });
}

export function useAcceptRevision(projectId: string, revisionId: string) {
  return useMutation({
    mutationFn: (body: { comment: string }) =>
      call(acceptRevision, { params: { revisionId }, body }),
    ...useSettle(projectId),
  });
}

export function useReturnRevision(projectId: string, revisionId: string) {
  return useMutation({
    mutationFn: (body: { comment: string }) =>
      call(returnRevision, { params: { revisionId }, body }),
    ...useSettle(projectId),
  });
}

export function useApproveRevision(projectId: string, revisionId: string) {
  return useMutation({
    mutationFn: (body: { password: string }) =>
      call(approveRevision, { params: { revisionId }, body }),
    ...useSettle(projectId),
  });
}

export function useWithdrawRevision(projectId: string, revisionId: string) {
  return useMutation({
    mutationFn: (body: { reason: string }) =>
      call(withdrawRevision, { params: { revisionId }, body }),
    ...useSettle(projectId),
  });
}

export function useCommentOnRevision(revisionId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { id: string; body: string }) =>
      call(createRevisionComment, { params: { revisionId }, body }),
    onSettled: () => client.invalidateQueries({ queryKey: queryKeys.revision(revisionId) }),
  });
}
