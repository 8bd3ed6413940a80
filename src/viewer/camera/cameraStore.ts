import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import { corners, sizeOf, type Bounds } from '../model/bounds.ts';
import type { NamedView } from './namedViews.ts';
import { viewDirections } from './projection.ts';

/** Where the frame is looked at from: a parallel projection with Z up. */
export interface CameraState {
  /** The point in the middle of the view, m. */
  readonly target: Vector3;
  /** Turn about Z, rad: 0 looks from the front (from −Y), π/2 from the right (from +X). */
  readonly azimuth: number;
  /** Height over the horizon, rad, −π/2 … π/2. */
  readonly elevation: number;
  /** Length that the smaller side of the view shows, m. */
  readonly span: number;
}

export interface ViewSize {
  readonly width: number;
  readonly height: number;
}

/** The view a person has chosen. Views that share one store stay locked to each other. */
export interface CameraStore {
  get(): CameraState;
  subscribe(listener: () => void): () => void;
  orbit(byAzimuth: number, byElevation: number): void;
  /** Moves the frame with the pointer: px on a view of the given size. */
  pan(dx: number, dy: number, size: ViewSize): void;
  /** Factor above 1 shows more; `at` px from the middle of the view stays where it is. */
  zoom(factor: number, at?: { dx: number; dy: number; size: ViewSize }): void;
  look(view: NamedView): void;
  fit(bounds: Bounds, size: ViewSize): void;
  /** Fits once, when nobody has yet: the first view to be drawn decides. */
  fitFirst(bounds: Bounds, size: ViewSize): void;
}

/** Share of the view that the frame fills after fitting; the rest is margin for symbols and names. */
const FILL = 0.72;
const SPAN_LIMITS = { least: 1e-3, most: 1e5 } as const;
const QUARTER = Math.PI / 2;

const START: CameraState = { target: [0, 0, 0], azimuth: -0.6, elevation: 0.38, span: 3 };

export function createCameraStore(start: CameraState = START): CameraStore {
  let state = start;
  let fitted = false;
  const listeners = new Set<() => void>();

  const set = (change: Partial<CameraState>): void => {
    state = { ...state, ...change };
    for (const listener of listeners) listener();
  };

  const moveTarget = (dx: number, dy: number, { width, height }: ViewSize, span: number): void => {
    const { right, up } = viewDirections(state);
    const metres = span / Math.max(1, Math.min(width, height));
    const along = (axis: 0 | 1 | 2) =>
      state.target[axis] - (right[axis] * dx - up[axis] * dy) * metres;
    set({ target: [along(0), along(1), along(2)] });
  };

  const fit = (bounds: Bounds, size: ViewSize): void => {
    fitted = true;
    const target: Vector3 = [
      (bounds.min[0] + bounds.max[0]) / 2,
      (bounds.min[1] + bounds.max[1]) / 2,
      (bounds.min[2] + bounds.max[2]) / 2,
    ];
    set({ target, span: fittingSpan(bounds, target, state, size) });
  };

  return {
    get: () => state,
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    orbit: (byAzimuth, byElevation) =>
      set({
        azimuth: state.azimuth + byAzimuth,
        elevation: Math.min(QUARTER, Math.max(-QUARTER, state.elevation + byElevation)),
      }),
    pan: (dx, dy, size) => moveTarget(dx, dy, size, state.span),
    zoom: (factor, at) => {
      const span = Math.min(SPAN_LIMITS.most, Math.max(SPAN_LIMITS.least, state.span * factor));
      if (at) moveTarget(at.dx, at.dy, at.size, span - state.span);
      set({ span });
    },
    look: (view) => set({ azimuth: view.azimuth, elevation: view.elevation }),
    fit,
    fitFirst: (bounds, size) => {
      if (!fitted) fit(bounds, size);
    },
  };
}

function fittingSpan(
  bounds: Bounds,
  target: Vector3,
  state: CameraState,
  { width, height }: ViewSize,
): number {
  const { right, up } = viewDirections(state);
  let across = 0;
  let upwards = 0;
  for (const corner of corners(bounds)) {
    const x = corner[0] - target[0];
    const y = corner[1] - target[1];
    const z = corner[2] - target[2];
    across = Math.max(across, 2 * Math.abs(x * right[0] + y * right[1] + z * right[2]));
    upwards = Math.max(upwards, 2 * Math.abs(x * up[0] + y * up[1] + z * up[2]));
  }
  const smaller = Math.min(width, height);
  const metresPerPixel = Math.max(across / width, upwards / height) / FILL;
  // A frame of one point has no extent: show a metre around it.
  return metresPerPixel > 0 ? metresPerPixel * smaller : Math.max(1, sizeOf(bounds));
}
