import { useQuery } from '@tanstack/react-query';
import { decodeShapes } from '#shared/analysis/shapesFile.ts';
import { readSolveShapes } from '#shared/schemas/solve.ts';
import { callBinary } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

/** The mode shapes of a solve that is done; they never change, so they are fetched once. */
export const useSolveShapes = (solveId: string | null) =>
  useQuery({
    queryKey: queryKeys.solveShapes(solveId ?? ''),
    queryFn: async ({ signal }) => {
      const bytes = await callBinary(readSolveShapes, {
        params: { solveId: solveId ?? '' },
        signal,
      });
      return decodeShapes(new Uint8Array(bytes));
    },
    enabled: solveId !== null,
    staleTime: Infinity,
  });
