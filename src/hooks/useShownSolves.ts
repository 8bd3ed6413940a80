import type { SolveBrief } from '#shared/schemas/solve.ts';
import type { Method } from '#shared/schemas/solveResult.ts';
import type { ShownFrame } from './useShownFrame.ts';
import { useSolves } from './useSolves.ts';

/** The newest solves of what is shown, by method, and the newest older result where this document has none. */
export interface ShownSolves {
  /** Solves of exactly this document and state, whatever their status. */
  readonly current: Partial<Record<Method, SolveBrief>>;
  /** The newest finished consistent solve of the same state but another document, or null. */
  readonly stale: SolveBrief | null;
  readonly loading: boolean;
}

/** Solves that override divisions or supports answer another question and are left out. */
const isPlain = (solve: SolveBrief): boolean =>
  solve.settings.divisions === undefined && solve.settings.supports === undefined;

export function useShownSolves(projectId: string, shown: ShownFrame | null): ShownSolves {
  const solves = useSolves(projectId, shown?.revision ? { fingerprint: shown.fingerprint } : {}, {
    enabled: shown !== null,
  });
  if (!shown || !solves.data) return { current: {}, stale: null, loading: solves.isPending };
  const stateId = shown.state?.id ?? null;
  const candidates = solves.data
    .filter((solve) => solve.stateId === stateId && isPlain(solve))
    .toSorted((a, b) => b.requestedAt.localeCompare(a.requestedAt));
  const current: Partial<Record<Method, SolveBrief>> = {};
  let stale: SolveBrief | null = null;
  for (const solve of candidates) {
    if (solve.documentFingerprint === shown.fingerprint) current[solve.method] ??= solve;
    else if (solve.status === 'done' && solve.method === 'consistent') stale ??= solve;
  }
  return { current, stale, loading: false };
}
