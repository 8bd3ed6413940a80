import type { SupportCondition } from '../schemas/frameDocument.ts';
import { SharedWork } from './SharedWork.ts';
import { solveFrame } from './solveFrame.ts';
import type { SolveHooks, SolveOutcome, SolveRequest } from './solveFrame.ts';

/** Soft, expected and stiff supports, in the order in which they are solved. */
export const BRACKETS: readonly SupportCondition[] = ['expected', 'soft', 'stiff'];

/**
 * A frame solved with every support soft, expected and stiff, whatever its state says of them. The three share the
 * analysis and what depends on mass alone.
 * Progress runs once over all three; errors are those of `solveFrame`.
 */
export function solveBrackets(
  request: SolveRequest,
  hooks: SolveHooks = {},
): Record<SupportCondition, SolveOutcome> {
  const shared = new SharedWork();
  const solveWith = (supports: SupportCondition): SolveOutcome => {
    const done = BRACKETS.indexOf(supports);
    return solveFrame(
      { ...request, settings: { ...request.settings, supports } },
      {
        ...hooks,
        onProgress: (fraction, stage) => {
          hooks.onProgress?.((done + fraction) / BRACKETS.length, stage);
        },
      },
      shared,
    );
  };
  return { expected: solveWith('expected'), soft: solveWith('soft'), stiff: solveWith('stiff') };
}
