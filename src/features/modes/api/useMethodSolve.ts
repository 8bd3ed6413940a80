import { useMemo } from 'react';
import type { ModeShapes } from '#shared/analysis/shapesFile.ts';
import type { SolveBrief, SolveStatus } from '#shared/schemas/solve.ts';
import type { Method, SolveSummary } from '#shared/schemas/solveResult.ts';
import { useSolve } from '#src/hooks/useSolve.ts';
import { useSolveShapes } from '#src/hooks/useSolveShapes.ts';

export interface Solved {
  readonly summary: SolveSummary;
  readonly shapes: ModeShapes;
}

/** One method's solve of the frame and state shown, as far as it is. */
export interface MethodSolve {
  readonly method: Method;
  /** Null: nobody has asked for it. */
  readonly status: SolveStatus | null;
  /** Why it failed, in words. */
  readonly problem: string | null;
  /** Null until summary and shapes are here. */
  readonly solved: Solved | null;
}

export function useMethodSolve(method: Method, solve: SolveBrief | undefined): MethodSolve {
  const id = solve?.status === 'done' ? solve.id : null;
  const { data, error } = useSolve(id);
  const shapes = useSolveShapes(id);
  const summary = data?.summary ?? null;
  const status = solve?.status ?? null;
  const problem = solve?.error?.message ?? error?.message ?? shapes.error?.message ?? null;
  return useMemo(
    () => ({
      ...{ method, status, problem },
      solved: summary && shapes.data ? { summary, shapes: shapes.data } : null,
    }),
    [method, status, problem, summary, shapes.data],
  );
}
