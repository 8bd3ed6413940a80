import { INK_STEPS, type ModePicture } from './modePicture.ts';

export interface PictureInks {
  readonly pencil: string;
  readonly ink: string;
}

/** Palest ink that can still be told from the ground. */
const PALEST = 0.3;

/**
 * Draws one moment of a mode: the undeformed frame as a thin pencil line, the moving one from pale ink where it
 * hardly moves to full ink where it moves most.
 *   factor  −1 … 1, the cosine of the phase
 */
export function drawModePicture(
  context: CanvasRenderingContext2D,
  picture: ModePicture,
  factor: number,
  inks: PictureInks,
  width: number,
  height: number,
): void {
  context.clearRect(0, 0, width, height);
  context.lineCap = 'round';
  context.globalAlpha = 0.55;
  context.strokeStyle = inks.pencil;
  context.lineWidth = 0.75;
  trace(context, picture, 0, -1);
  context.strokeStyle = inks.ink;
  context.lineWidth = 1.75;
  for (let step = 0; step < INK_STEPS; step += 1) {
    context.globalAlpha = PALEST + ((1 - PALEST) * step) / (INK_STEPS - 1);
    trace(context, picture, factor, step);
  }
  context.globalAlpha = 1;
}

/** Strokes the segments of one ink step (all of them for −1) in a single path. */
function trace(
  context: CanvasRenderingContext2D,
  { still, swing, segments }: ModePicture,
  factor: number,
  step: number,
): void {
  context.beginPath();
  for (let s = 0; s < segments.length; s += 3) {
    if (step >= 0 && segments[s + 2] !== step) continue;
    const a = 2 * (segments[s] ?? 0);
    const b = 2 * (segments[s + 1] ?? 0);
    context.moveTo(
      (still[a] ?? 0) + factor * (swing[a] ?? 0),
      (still[a + 1] ?? 0) + factor * (swing[a + 1] ?? 0),
    );
    context.lineTo(
      (still[b] ?? 0) + factor * (swing[b] ?? 0),
      (still[b + 1] ?? 0) + factor * (swing[b + 1] ?? 0),
    );
  }
  context.stroke();
}
