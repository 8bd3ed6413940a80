import type { ModeShapes } from '#shared/analysis/shapesFile.ts';

/** The clock a moving mode follows; several views on one clock keep the same phase. */
export interface PhaseClock {
  /** rad; the shape is drawn with the factor cos(phase). */
  readonly phase: { readonly current: number };
  /** Calls back after every change of phase; returns how to stop listening. */
  onPhase(listener: (phase: number) => void): () => void;
}

/** One mode for a `FrameView` to draw moving. */
export interface Deformation {
  readonly shapes: ModeShapes;
  /** 0-based index into the shapes. */
  readonly mode: number;
  /** What the largest displacement of the mode is drawn as, m. A shape is not an amplitude. */
  readonly amplitude: number;
  readonly clock: PhaseClock;
}
