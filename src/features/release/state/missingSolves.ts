import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { SolveBrief } from '#shared/schemas/solve.ts';
import { DEFAULT_SOLVE_SETTINGS, type Method } from '#shared/schemas/solveResult.ts';

/** A revision rests on both mass kinds in every operating state. */
const REQUIRED: readonly Method[] = ['consistent', 'lumped'];

const sameSettings = (solve: SolveBrief): boolean =>
  solve.settings.modes === DEFAULT_SOLVE_SETTINGS.modes &&
  solve.settings.upToHz === undefined &&
  solve.settings.divisions === undefined &&
  solve.settings.supports === undefined;

/**
 * What the server would answer a submission with, said before the button is pressed: each solve that is missing
 * or incomplete, in words. The server decides; this only spares a refused attempt.
 */
export function missingSolves(document: FrameDocument, solves: readonly SolveBrief[]): string[] {
  const states = document.states.length > 0 ? document.states : [null];
  return states.flatMap((state) =>
    REQUIRED.flatMap((method) => {
      const found = solves.find(
        (solve) =>
          solve.method === method &&
          solve.stateId === (state?.id ?? null) &&
          solve.status === 'done' &&
          sameSettings(solve),
      );
      if (found?.complete === true) return [];
      const what = `${method} mass${state ? `, ${state.name}` : ''}`;
      return [found ? `${what}: modes may be missing` : what];
    }),
  );
}
