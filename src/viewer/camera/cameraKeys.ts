import type { Bounds } from '../model/bounds.ts';
import type { CameraStore, ViewSize } from './cameraStore.ts';

const ORBIT_STEP = Math.PI / 24;
const PAN_STEP_PX = 40;
export const ZOOM_STEP = 1.2;

/**
 * Arrows turn the view, with Shift they move it; + and − zoom, F fits.
 * Returns whether the key was one of these.
 */
export function cameraKey(
  { key, shiftKey }: { key: string; shiftKey: boolean },
  store: CameraStore,
  bounds: Bounds,
  size: ViewSize,
): boolean {
  const step = (dx: number, dy: number) => {
    if (shiftKey) store.pan(dx * PAN_STEP_PX, dy * PAN_STEP_PX, size);
    else store.orbit(-dx * ORBIT_STEP, dy * ORBIT_STEP);
  };
  switch (key) {
    case 'ArrowLeft':
      step(-1, 0);
      return true;
    case 'ArrowRight':
      step(1, 0);
      return true;
    case 'ArrowUp':
      step(0, -1);
      return true;
    case 'ArrowDown':
      step(0, 1);
      return true;
    case '+':
    case '=':
      store.zoom(1 / ZOOM_STEP);
      return true;
    case '-':
    case '−':
      store.zoom(ZOOM_STEP);
      return true;
    case 'f':
    case 'F':
      store.fit(bounds, size);
      return true;
    default:
      return false;
  }
}
