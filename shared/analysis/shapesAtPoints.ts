import type { DividedPart, FrameModel } from '../frame/assembly/FrameModel.ts';
import { displacements } from '../frame/freedoms/Combination.ts';
import { add, scale } from '../frame/vector3.ts';
import type { FrameDocument } from '../schemas/frameDocument.ts';
import type { ModeShapes } from './shapesFile.ts';

/**
 * Displacements of every node, then of every member's stations from start to end, in each mode.
 *   phi  modes over the free unknowns, φᵀMφ = 1
 * A member's end is taken on the member's side of its joint. A bar stays straight: its rotations across
 * its axis are its chord's. A displacement that is no unknown is 0.
 */
export function shapesAtPoints(model: FrameModel, phi: readonly Float64Array[]): ModeShapes {
  const { document, parts, segments } = model;
  const { points, members, positions } = shapePoints(document, parts);
  const shapes = new Float32Array(phi.length * points * 6);
  const d = new Float64Array(12);
  phi.forEach((shape, mode) => {
    const base = mode * points * 6;
    model.nodes.forEach((motion, i) => {
      displacements(motion, shape, d);
      for (let k = 0; k < 6; k++) shapes[base + i * 6 + k] = d[k]!;
    });
    for (const { part, number, motion } of segments) {
      displacements(motion, shape, d);
      if (motion.rows === 6) spreadBar(d, part.segmentLength);
      const at = base + (members[part.index]!.first + number) * 6;
      writeGlobal(part, d, 0, shapes, at);
      writeGlobal(part, d, 6, shapes, at + 6);
    }
  });
  return {
    nodes: document.nodes.map((node) => node.id),
    members,
    points,
    modes: phi.length,
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
  for (const half of [0, 3]) {
    for (const k of [0, 1, 2] as const) {
      shapes[at + half + k] =
        x[k] * d[from + half]! + y[k] * d[from + half + 1]! + z[k] * d[from + half + 2]!;
    }
  }
}
