import { solveFrame } from '#shared/analysis/solveFrame.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { Method, SolveSummary } from '#shared/schemas/solveResult.ts';

export type Timing = SolveSummary['timing'];

/** Stages that the reference library has too: all but the assembly and the count. */
const COMPARED = ['order', 'symbolic', 'factor', 'iterate', 'finish'] as const;

/** The engine compiles what runs often: solves of this long in all [ms] are not counted, one at the least. */
const WARM_UP = 1_000;

/** Milliseconds of the stages compared with the reference. */
export function comparedTime(timing: Timing): number {
  return COMPARED.reduce((sum, stage) => sum + timing[stage], 0);
}

/** One solve, timed by stage. */
export function solveOnce(document: FrameDocument, method: Method, modes: number): SolveSummary {
  return solveFrame(
    { document, method, stateId: null, settings: { modes } },
    { now: () => performance.now() },
  ).summary;
}

/**
 * The run with the median time of `runs`, after a warm-up.
 *   time  what is compared, in ms
 */
export function medianSolve(
  document: FrameDocument,
  method: Method,
  modes: number,
  runs: number,
  time: (timing: Timing) => number,
): SolveSummary {
  const began = performance.now();
  do solveOnce(document, method, modes);
  while (performance.now() - began < WARM_UP);
  const summaries = Array.from({ length: runs }, () => solveOnce(document, method, modes));
  summaries.sort((a, b) => time(a.timing) - time(b.timing));
  return summaries[Math.floor(runs / 2)]!;
}
