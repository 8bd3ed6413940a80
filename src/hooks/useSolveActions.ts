import { useMutation, useQueryClient } from '@tanstack/react-query';
import { cancelSolve, createSolves } from '#shared/schemas/solve.ts';
import { METHODS } from '#shared/schemas/solveResult.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

/** Queues solves of the draft or a revision, and cancels them. */
export function useSolveActions(projectId: string) {
  const client = useQueryClient();
  const refresh = () => client.invalidateQueries({ queryKey: queryKeys.solves(projectId) });
  /** One press queues a solve by every method for each of the states given (null: the frame as drawn). */
  const start = useMutation({
    mutationFn: async (of: { revisionId: string | null; stateIds: readonly (string | null)[] }) => {
      for (const stateId of of.stateIds) {
        await call(createSolves, {
          body: { projectId, revisionId: of.revisionId, stateId, methods: [...METHODS] },
        });
      }
    },
    onSettled: refresh,
  });
  const cancel = useMutation({
    mutationFn: (solveIds: readonly string[]) =>
      Promise.all(solveIds.map((solveId) => call(cancelSolve, { params: { solveId } }))),
    onSettled: refresh,
  });
  return { start, cancel };
}
