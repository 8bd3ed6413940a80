import { useQuery } from '@tanstack/react-query';
import { readSolve } from '#shared/schemas/solve.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

/** One solve with its summary; `null` while none is chosen. */
export const useSolve = (solveId: string | null) =>
  useQuery({
    queryKey: queryKeys.solve(solveId ?? ''),
    queryFn: ({ signal }) => call(readSolve, { params: { solveId: solveId ?? '' }, signal }),
    enabled: solveId !== null,
  });
