import { queryOptions, useQuery } from '@tanstack/react-query';
import { readSolve } from '#shared/schemas/solve.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

/** How one solve is read, for screens that read several at once. */
export const solveQuery = (solveId: string) =>
  queryOptions({
    queryKey: queryKeys.solve(solveId),
    queryFn: ({ signal }) => call(readSolve, { params: { solveId }, signal }),
  });

/** One solve with its summary; `null` while none is chosen. */
export const useSolve = (solveId: string | null) =>
  useQuery({ ...solveQuery(solveId ?? ''), enabled: solveId !== null });
