import type { FrameModel } from '../model/frameModel.ts';

/** More members than this are drawn as lines: bodies would be a few px wide and slow to turn. */
const MOST_BODIES = 2500;

/** Whether members are drawn with their section. */
export function drawsBodies(model: FrameModel): boolean {
  return hasWebGl() && model.members.length > 0 && model.members.length <= MOST_BODIES;
}

let webGl: boolean | null = null;

/** Whether this browser can draw in three dimensions; without, members are drawn as lines. */
export function hasWebGl(): boolean {
  webGl ??= document.createElement('canvas').getContext('webgl2') !== null;
  return webGl;
}
