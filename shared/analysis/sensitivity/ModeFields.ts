import type { FrameModel } from '../../frame/assembly/FrameModel.ts';
import { displacements } from '../../frame/freedoms/Combination.ts';
import { cross, subtract } from '../../frame/vector3.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';

/** Displacement of a rigid group: of its reference point, and its rotation. */
export interface GroupMotion {
  readonly t: Vector3;
  readonly r: Vector3;
}

/** What one mode moves, apart from the unknowns it was found in. */
export interface ModeField {
  /** By group. */
  readonly groups: readonly GroupMotion[];
  /**
   * By place in `model.parts`: displacements of its stations in member axes, on its own side of joints, station after
   * station: 6 of a beam, 3 of a bar.
   */
  readonly stations: readonly Float64Array[];
  /** By place in `model.ties`: how far each is stretched. */
  readonly ties: Float64Array;
}

/** `phi` over the model's unknowns. */
export function modeField(model: FrameModel, phi: Float64Array): ModeField {
  const d = new Float64Array(12);
  const groups: GroupMotion[] = [];
  model.nodes.forEach((motion, i) => {
    const group = model.groupOf[i]!;
    if (groups[group] !== undefined) return;
    displacements(motion, phi, d);
    const r: Vector3 = [d[3]!, d[4]!, d[5]!];
    const { x, y, z } = model.document.nodes[i]!;
    // Where the first node of a group is its reference, nothing is carried.
    const [a, b, c] = cross(r, subtract(model.reference[group]!, [x, y, z]));
    groups[group] = { t: [d[0]! + a, d[1]! + b, d[2]! + c], r };
  });
  const stations = model.parts.map(
    ({ member, divisions }) => new Float64Array((divisions + 1) * (member.kind === 'bar' ? 3 : 6)),
  );
  for (const { part, number, motion } of model.segments) {
    displacements(motion, phi, d);
    const width = motion.rows / 2;
    stations[part.index]!.set(d.subarray(0, motion.rows), number * width);
  }
  const ties = new Float64Array(model.ties.length);
  model.ties.forEach(({ motion }, i) => displacements(motion, phi, ties, i));
  return { groups, stations, ties };
}

/** Displacement of a point that a group carries. */
export function carriedTo({ t, r }: GroupMotion, reference: Vector3, point: Vector3): Vector3 {
  const [a, b, c] = cross(r, subtract(point, reference));
  return [t[0] + a, t[1] + b, t[2] + c];
}
