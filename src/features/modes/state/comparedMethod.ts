import { pairModes, type ModePairing } from '#shared/analysis/pairModes.ts';
import type { MethodSolve, Solved } from '../api/useMethodSolve.ts';

/** A method beside consistent, and which of its modes is which. */
export interface ComparedMethod extends MethodSolve {
  /** Null until the method is solved. */
  readonly pairing: ModePairing | null;
}

const comparable = ({ summary, shapes }: Solved) => ({
  shapes,
  frequenciesHz: summary.modes.map(({ frequencyHz }) => frequencyHz),
});

/** Pairs the modes of a method by shape with those of consistent mass. */
export const compareMethod = (consistent: Solved, other: MethodSolve): ComparedMethod => ({
  ...other,
  pairing: other.solved && pairModes(comparable(consistent), comparable(other.solved)),
});

/** Why the column of a method is empty and what to do about it, without full stop; null where it is solved. */
export function whyEmpty({ solved, status, problem }: MethodSolve): string | null {
  if (solved) return null;
  if (status === 'queued' || status === 'running') return 'being solved; appears here by itself';
  if (problem !== null) return `failed: ${problem.replace(/\.$/, '')}`;
  if (status === 'done') return 'loading';
  if (status === 'cancelled') return 'cancelled; press Solve at Frame again';
  return 'not solved yet for this frame and state; press Solve at Frame';
}
