import { AppError } from '../../errors/AppError.ts';
import type { FrameModel } from '../assembly/FrameModel.ts';
import { describeMotion } from './describeMotion.ts';
import { stiffnessFreeMotions } from './stiffnessFreeMotions.ts';

/**
 * Refuses a frame with a motion that nothing resists and that is not a whole component moving rigidly.
 *   model  the frame with one element per member
 *   rigid  its rigid motions, over the same unknowns
 * Throws AppError `mechanism`: one issue per motion, naming the nodes, members and directions that move.
 */
export function refuseMechanisms(model: FrameModel, rigid: readonly Float64Array[]): void {
  const motions = isolated(stiffnessFreeMotions(model, rigid));
  if (motions.length === 0) return;
  const issues = motions.map((x) => describeMotion(model, x));
  const more = issues.length > 1 ? ` (and ${issues.length - 1} more such motions)` : '';
  throw new AppError(
    'mechanism',
    `The frame is a mechanism: ${issues[0]!.message}${more} Support, brace or join what moves, or remove the ` +
      'joints that free it.',
    { issues },
  );
}

/**
 * The same motions by Gauss-Jordan elimination with complete pivoting: each unlike the others in one unknown,
 * so that mechanisms in different places are told apart. Each is scaled to a largest component of 1.
 */
function isolated(motions: readonly Float64Array[]): Float64Array[] {
  const rows = motions.map((x) => x.slice());
  for (let k = 0; k < rows.length; k++) {
    let row = k;
    let column = 0;
    for (let r = k; r < rows.length; r++) {
      rows[r]!.forEach((value, c) => {
        if (Math.abs(value) > Math.abs(rows[row]![column]!)) [row, column] = [r, c];
      });
    }
    [rows[k], rows[row]] = [rows[row]!, rows[k]!];
    const pivot = rows[k]![column]!;
    for (let c = 0; c < rows[k]!.length; c++) rows[k]![c]! /= pivot;
    rows.forEach((other, r) => {
      if (r === k) return;
      const factor = other[column]!;
      for (let c = 0; c < other.length; c++) other[c]! -= factor * rows[k]![c]!;
    });
  }
  return rows.map((x) => {
    const largest = x.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
    return x.map((value) => value / largest);
  });
}
