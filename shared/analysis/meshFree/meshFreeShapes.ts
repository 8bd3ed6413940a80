import type { DividedPart } from '../../frame/assembly/FrameModel.ts';
import type { WavePoint } from '../../frame/elements/DynamicElement.ts';
import { displacements } from '../../frame/freedoms/Combination.ts';
import { dot } from '../../frame/vector3.ts';
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
  const point: WavePoint = { displacement: 0, rotation: 0, strain: 0 };
  modes.forEach(({ omega, x }, mode) => {
    const base = mode * points * 6;
    model.nodes.forEach((motion, i) => {
      displacements(motion, x, d);
      shapes.set(d, base + i * 6);
    });
    const stations = drawn.map(({ divisions }) => new Float64Array((divisions + 1) * 6));
    for (const piece of system.pieces) {
      const part = drawn[piece.part.index]!;
      displacements(piece.motion, x, d);
      const wave = piece.element.wave(omega, d);
      for (const station of stationsOn(piece, part)) {
        const xi = (station * part.segmentLength - piece.from) / piece.length - 0.5;
        wave.at(Math.min(Math.max(xi, -0.5), 0.5), point);
        addPoint(piece, point, stations[part.index]!, station * 6);
      }
    }
    for (const [index, motion] of barMotion) {
      displacements(motion, x, d);
      local.set(d);
      spreadBar(local, drawn[index]!.axes.length);
      // Along its axis a bar's ends are its pieces' already.
      local[0] = local[6] = 0;
      const values = stations[index]!;
      for (let i = 0; i < 12; i++) values[i]! += local[i]!;
    }
    drawn.forEach((part, index) => {
      const { first, count } = members[index]!;
      for (let station = 0; station < count; station++) {
        writeGlobal(part, stations[index]!, station * 6, shapes, base + (first + station) * 6);
      }
    });
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

/** Stations on a piece; one between two pieces belongs to the later, the last to the last. */
function stationsOn({ from, length }: MemberPiece, part: DividedPart): number[] {
  const tolerance = 1e-9 * part.axes.length;
  const ends = from + length >= part.axes.length - tolerance;
  const all = Array.from({ length: part.divisions + 1 }, (_, station) => station);
  return all.filter((station) => {
    const at = station * part.segmentLength;
    return at >= from - tolerance && (ends || at < from + length - tolerance);
  });
}

/** Adds what one kind of vibration does at a station, in member axes. */
function addPoint(
  { part: { axes }, direction, axis }: MemberPiece,
  { displacement, rotation }: WavePoint,
  values: Float64Array,
  at: number,
): void {
  [axes.x, axes.y, axes.z].forEach((unit, k) => {
    values[at + k]! += displacement * dot(unit, direction);
    values[at + 3 + k]! += rotation * dot(unit, axis);
  });
}
