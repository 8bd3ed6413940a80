import type { FrameModel } from '../frame/assembly/FrameModel.ts';
import type { Vector3 } from '../schemas/frameDocument.ts';
import type { ModelWarning, SolveSummary } from '../schemas/solveResult.ts';
import type { ModeShapes } from './shapesFile.ts';

/** What the steps of a solve report to. */
export interface SolveProgress {
  /** Milliseconds. */
  readonly clock: () => number;
  readonly progress: (fraction: number, stage: string) => void;
  readonly shouldStop: () => boolean;
  /** Throws AppError `cancelled` once the solve is to stop. */
  readonly stopIfAsked: () => void;
}

/** What every method hands back; `timing` without `read` and `total`. */
export interface SolvedFrame extends Pick<
  SolveSummary,
  'count' | 'complete' | 'modes' | 'effectiveMass' | 'handChecks'
> {
  readonly model: FrameModel;
  readonly rigidBodyModes: number;
  readonly totalMass: number;
  readonly centre: Vector3;
  readonly shapes: ModeShapes;
  readonly warnings: readonly ModelWarning[];
  readonly timing: Omit<SolveSummary['timing'], 'read' | 'total'>;
}
