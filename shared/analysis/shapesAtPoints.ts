import type { DividedPart, FrameModel, ModelChain } from '../frame/assembly/FrameModel.ts';
import { displacements } from '../frame/freedoms/Combination.ts';
import type { ChainedPencil } from '../numerics/chains/ChainedPencil.ts';
import { add, scale } from '../frame/vector3.ts';
import type { FrameDocument } from '../schemas/frameDocument.ts';
import type { ModeShapes } from './shapesFile.ts';

/**
 * Displacements of every node, then of every member's stations from start to end, in each mode.
 *   addresses  of the modes in the pencil's arena, φᵀMφ = 1
 * A member's end is taken on the member's side of its joint. A bar stays straight: its rotations across
 * its axis are its chord's. A displacement that is no unknown is 0.
 */
export function shapesAtPoints(
  model: FrameModel,
  pencil: ChainedPencil,
  addresses: readonly number[],
): ModeShapes {
  const { document, parts, chains } = model;
  const { points, members, positions } = shapePoints(document, parts);
  const shapes = new Float32Array(addresses.length * points * 6);
  const stations = pencil.placeRows(pencil.pair.classes.map(() => new Float64Array(0)));
  const d = new Float64Array(12);
  addresses.forEach((address, mode) => {
    const base = mode * points * 6;
    const shape = pencil.arena.view(address, pencil.n);
    model.nodes.forEach((motion, i) => {
      displacements(motion, shape, d);
      for (let k = 0; k < 6; k++) shapes[base + i * 6 + k] = d[k]!;
    });
    pencil.applyRows(stations, address, ({ classIndex, count, inner, ends }) => {
      const rows = ends.length / count;
      const [{ make }] = chains[classIndex]! as [ModelChain];
      for (let m = 0; m < count; m++) {
        const { part, from: station, elements } = chains[classIndex]![m]!;
        const at = base + (members[part.index]!.first + station) * 6;
        const ofInner = m * make.inner;
        const ofEnds = m * rows - make.inner;
        if (rows === 6) {
          for (let i = 0; i < 3; i++) {
            d[i] = ends[ofEnds + make.places[0]![i]!]!;
            d[3 + i] = ends[ofEnds + make.places[1]![i]!]!;
          }
          spreadBar(d, part.segmentLength);
          writeGlobal(part, d, 0, shapes, at);
          writeGlobal(part, d, 6, shapes, at + 6);
          continue;
        }
        for (let s = 0; s <= elements; s++) {
          const places = make.places[s]!;
          for (let i = 0; i < 6; i++) {
            const place = places[i]!;
            if (place < 0) d[i] = 0;
            else d[i] = place < make.inner ? inner[ofInner + place]! : ends[ofEnds + place]!;
          }
          writeGlobal(part, d, 0, shapes, at + 6 * s);
        }
      }
    });
  });
  return {
    nodes: document.nodes.map((node) => node.id),
    members,
    points,
    modes: addresses.length,
    positions,
    shapes,
  };
}

/** Where a frame's shapes are given: its nodes, then the stations of each member as it is divided. */
export function shapePoints(
  document: FrameDocument,
  parts: readonly DividedPart[],
): Pick<ModeShapes, 'points' | 'members' | 'positions'> {
  let points = document.nodes.length;
  const members = parts.map(({ member, divisions }) => {
    const first = points;
    points += divisions + 1;
    return { id: member.id, first, count: divisions + 1 };
  });
  const positions = new Float32Array(points * 3);
  document.nodes.forEach((node, i) => positions.set([node.x, node.y, node.z], i * 3));
  parts.forEach(({ start, axes, segmentLength, divisions }, i) => {
    for (let station = 0; station <= divisions; station++) {
      const point = add(start, scale(axes.x, station * segmentLength));
      positions.set(point, (members[i]!.first + station) * 3);
    }
  });
  return { points, members, positions };
}

/** From 6 translations of a bar's ends to 12 displacements, the rotations being those of the chord. */
export function spreadBar(d: Float64Array, length: number): void {
  const ry = -(d[5]! - d[2]!) / length;
  const rz = (d[4]! - d[1]!) / length;
  d.set([d[0]!, d[1]!, d[2]!, 0, ry, rz, d[3]!, d[4]!, d[5]!, 0, ry, rz]);
}

/** Six displacements in member axes, from `d[from]`, written in global axes. */
export function writeGlobal(
  { axes: { x, y, z } }: DividedPart,
  d: Float64Array,
  from: number,
  shapes: Float32Array,
  at: number,
): void {
  for (let half = 0; half < 6; half += 3) {
    const a = d[from + half]!;
    const b = d[from + half + 1]!;
    const c = d[from + half + 2]!;
    shapes[at + half] = x[0] * a + y[0] * b + z[0] * c;
    shapes[at + half + 1] = x[1] * a + y[1] * b + z[1] * c;
    shapes[at + half + 2] = x[2] * a + y[2] * b + z[2] * c;
  }
}
