import type { DividedPart } from '../../frame/assembly/FrameModel.ts';
import type { DynamicElement } from '../../frame/elements/DynamicElement.ts';
import { displacements } from '../../frame/freedoms/Combination.ts';
import { shapePoints, spreadBar, writeGlobal } from '../shapesAtPoints.ts';
import type { ModeShapes } from '../shapesFile.ts';
import type { DynamicSystem } from './DynamicSystem.ts';
import type { MemberPiece } from './memberPieces.ts';

/**
 * Mode shapes at every node and at stations along every member, from the members' own functions: the stations only
 * say where the shape is drawn.
 *   drawn  the members, divided as they are to be drawn
 */
export function meshFreeShapes(
  system: DynamicSystem,
  drawn: readonly DividedPart[],
  modes: readonly { readonly omega: number; readonly x: Float64Array }[],
): ModeShapes {
  const { model } = system;
  const { points, members, positions } = shapePoints(model.document, drawn);
  const shapes = new Float32Array(modes.length * points * 6);
  const barMotion = new Map(system.bars.map(({ part, motion }) => [part, motion]));
  const d = new Float64Array(6);
  const local = new Float64Array(12);
  const across = new Float32Array(12);
  const runs = stationRuns(system, drawn);
  modes.forEach(({ omega, x }, mode) => {
    const base = mode * points * 6;
    model.nodes.forEach((motion, i) => {
      displacements(motion, x, d);
      shapes.set(d, base + i * 6);
    });
    const values = new Float64Array(points * 6);
    for (const run of runs) addRun(run, omega, x, members, values);
    for (const [index, motion] of barMotion) {
      displacements(motion, x, d);
      local.set(d);
      spreadBar(local, drawn[index]!.axes.length);
      // Along its axis a bar's ends are its pieces' already.
      local[0] = local[6] = 0;
      writeGlobal(drawn[index]!, local, 0, across, 0);
      writeGlobal(drawn[index]!, local, 6, across, 6);
      const at = members[index]!.first * 6;
      for (let i = 0; i < 12; i++) values[at + i]! += across[i]!;
    }
    shapes.set(values.subarray(model.nodes.length * 6), base + model.nodes.length * 6);
  });
  return {
    nodes: model.document.nodes.map((node) => node.id),
    members,
    points,
    modes: modes.length,
    positions,
    shapes,
  };
}

/** Pieces of one element at one place of their members, which are drawn at the same stations. */
interface StationRun {
  readonly element: DynamicElement;
  /** Number of the first station on the pieces, and the places of all, −½ … ½. */
  readonly first: number;
  readonly xi: readonly number[];
  readonly pieces: MemberPiece[];
}

function stationRuns(system: DynamicSystem, drawn: readonly DividedPart[]): StationRun[] {
  const runs = new Map<string, StationRun>();
  system.pieces.forEach((piece, i) => {
    const { from, length, element } = piece;
    const part = drawn[piece.part.index]!;
    const key = `${system.elementOf[i]!} ${part.divisions} ${(from / length).toFixed(6)}`;
    let run = runs.get(key);
    if (run === undefined) {
      const { first, count } = stationsOn(piece, part);
      const xi = Array.from({ length: count }, (_, k) => {
        const at = ((first + k) * part.segmentLength - from) / length - 0.5;
        return Math.min(Math.max(at, -0.5), 0.5);
      });
      run = { element, first, xi, pieces: [] };
      runs.set(key, run);
    }
    run.pieces.push(piece);
  });
  return [...runs.values()];
}

/** Adds what one kind of vibration does at the stations of a run, in global axes. */
function addRun(
  { element, first, xi, pieces }: StationRun,
  omega: number,
  x: Float64Array,
  members: ModeShapes['members'],
  values: Float64Array,
): void {
  const { rows } = element;
  const size = 2 * rows;
  const count = xi.length;
  const d = new Float64Array(4);
  const N = new Float64Array(count * size);
  for (let i = 0; i < count; i++) {
    element.shape(omega, xi[i]!, N.subarray(i * size, (i + 1) * size));
  }
  for (let p = 0; p < pieces.length; p++) {
    const piece = pieces[p]!;
    const { direction, axis } = piece;
    displacements(piece.motion, x, d);
    let at = (members[piece.part.index]!.first + first) * 6;
    for (let i = 0; i < count; i++, at += 6) {
      let displacement = 0;
      let rotation = 0;
      for (let j = 0; j < rows; j++) {
        displacement += N[i * size + j]! * d[j]!;
        rotation += N[i * size + rows + j]! * d[j]!;
      }
      for (let k = 0; k < 3; k++) {
        values[at + k]! += displacement * direction[k]!;
        values[at + 3 + k]! += rotation * axis[k]!;
      }
    }
  }
}

/** Stations on a piece; one between two pieces belongs to the later, the last to the last. */
function stationsOn({ from, length }: MemberPiece, part: DividedPart) {
  const tolerance = 1e-9 * part.axes.length;
  const ends = from + length >= part.axes.length - tolerance;
  const first = Math.ceil((from - tolerance) / part.segmentLength);
  const next = ends
    ? part.divisions + 1
    : Math.ceil((from + length - tolerance) / part.segmentLength);
  return { first, count: next - first };
}
