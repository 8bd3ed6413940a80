import type { ViewSize } from '../camera/cameraStore.ts';
import type { Spot } from './pen.ts';

const GAP = 28;
const MARGIN = 8;

/**
 * The upper left corner of a panel that stands beside a spot: to its right where there is room, else to its left,
 * and always inside the view. px
 */
export function placeBeside(spot: Spot, panel: ViewSize, view: ViewSize): Spot {
  const rightward = spot.x + GAP;
  const leftward = spot.x - GAP - panel.width;
  const fitsRight = rightward + panel.width + MARGIN <= view.width;
  const x = fitsRight || leftward < MARGIN ? rightward : leftward;
  return {
    x: Math.max(MARGIN, Math.min(x, view.width - panel.width - MARGIN)),
    y: Math.max(MARGIN, Math.min(spot.y - panel.height / 3, view.height - panel.height - MARGIN)),
  };
}
