import { combine } from '../../frame/freedoms/Combination.ts';
import type { Combination, Terms } from '../../frame/freedoms/Combination.ts';
import type { DividedPart, FrameModel } from '../../frame/assembly/FrameModel.ts';
import { inModel } from '../../frame/assembly/chains.ts';
import { bendingInertia } from '../../frame/elements/beamProperties.ts';
import type { DynamicElement } from '../../frame/elements/DynamicElement.ts';
import { dynamicFlexure } from '../../frame/elements/dynamicFlexure.ts';
import { dynamicRod } from '../../frame/elements/dynamicRod.ts';
import { add, scale } from '../../frame/vector3.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';

/** A stretch of a member in one kind of vibration. */
export interface MemberPiece {
  readonly element: DynamicElement;
  readonly part: DividedPart;
  /** Distance of its start from the member's, and its length [m]. */
  readonly from: number;
  readonly length: number;
  /** The element's end displacements over the unknowns. */
  readonly motion: Combination;
  /** Global unit vectors: along which it displaces and about which it turns. */
  readonly direction: Vector3;
  readonly axis: Vector3;
}

/** Displacements u v w rx ry rz of one end in member axes. */
type End = readonly Terms[];

/**
 * Every member of a frame as uncoupled dynamic elements: stretching, twisting, and bending in the two principal
 * planes of its section, as far as the model's unknowns hold them. A beam has one of each per division of
 * `model`. A bar stretches only; it gets `barPieces` pieces, with unknowns of their own along it, which follow
 * the model's.
 *
 * Where Iyz couples the planes and ky ≠ kz, shear flexibility is a tensor whose principal axes are not those of
 * bending: its terms across the principal planes of bending are left out (`crossShear` names those members).
 */
export function memberPieces(
  model: FrameModel,
  barPieces: (part: DividedPart) => number,
): { pieces: MemberPiece[]; unknowns: number } {
  let unknowns = model.free;
  const pieces = model.segments.flatMap(({ part, number, motion }) => {
    if (part.member.kind === 'beam') return beamPieces(model, part, number, motion);
    const count = barPieces(part);
    const inner = Array.from({ length: count - 1 }, (): Terms => [[unknowns++, 1]]);
    const stations = [rowTerms(motion, 0), ...inner, rowTerms(motion, 3)];
    const length = part.axes.length / count;
    return Array.from({ length: count }, (_, i): MemberPiece => {
      return {
        ...stretch(part, length),
        from: i * length,
        motion: combine([stations[i]!, stations[i + 1]!]),
      };
    });
  });
  return { pieces, unknowns };
}

/** Members whose planes of bending are coupled by shear, which the mesh-free pieces leave out. */
export function crossShear(model: FrameModel): DividedPart[] {
  return model.parts.filter(({ member, properties: { Iyz, ky, kz, theory }, axes }) => {
    const both = [1, 2].every((i) => inModel([axes.x, axes.y, axes.z], i, model.exists));
    return member.kind === 'beam' && theory === 'timoshenko' && Iyz !== 0 && ky !== kz && both;
  });
}

function stretch(
  part: DividedPart,
  length: number,
): Pick<MemberPiece, 'element' | 'part' | 'length' | 'direction' | 'axis'> {
  const { E, A, rho, massPerLength } = part.properties;
  const inertia = rho * A + massPerLength;
  return {
    element: dynamicRod({ rigidity: E * A, inertia, length, twists: false }),
    part,
    length,
    direction: part.axes.x,
    axis: part.axes.x,
  };
}

function beamPieces(
  model: FrameModel,
  part: DividedPart,
  number: number,
  motion: Combination,
): MemberPiece[] {
  const { properties, axes, segmentLength: length } = part;
  const { E, G, A, J, rho, Iy, Iz, massPerLength, theory } = properties;
  const directions = [axes.x, axes.y, axes.z] as const;
  const from = number * length;
  const exists = (i: number) => inModel(directions, i, model.exists);
  const rows = Array.from({ length: 12 }, (_, i) => rowTerms(motion, i));
  const ends: readonly End[] = [rows.slice(0, 6), rows.slice(6)];
  const pieces: MemberPiece[] = [];
  if (exists(0)) {
    const along = combine(ends.map((end) => end[0]!));
    pieces.push({ ...stretch(part, length), from, motion: along });
  }
  if (exists(3)) {
    pieces.push({
      element: dynamicRod({ rigidity: G * J, inertia: rho * (Iy + Iz), length, twists: true }),
      part,
      from,
      length,
      motion: combine(ends.map((end) => end[3]!)),
      direction: axes.x,
      axis: axes.x,
    });
  }
  for (const { y, z, I, kappa } of bendingPlanes(part, exists(1), exists(2))) {
    pieces.push({
      element: dynamicFlexure({
        bending: E * I,
        shear: theory === 'timoshenko' ? kappa * G * A : Infinity,
        mass: rho * A + massPerLength,
        inertia: theory === 'timoshenko' ? rho * I : 0,
        length,
      }),
      part,
      from,
      length,
      // The slope of a deflection along n = y-part + z-part is the rotation about x × n.
      motion: combine(
        ends.flatMap((end) => [mix(end[1]!, y, end[2]!, z), mix(end[5]!, y, end[4]!, -z)]),
      ),
      direction: add(scale(axes.y, y), scale(axes.z, z)),
      axis: add(scale(axes.z, y), scale(axes.y, -z)),
    });
  }
  return pieces;
}

interface BendingPlane {
  /** Direction of the deflection over the member's y and z. */
  readonly y: number;
  readonly z: number;
  /** ∫n² dA [m⁴] and the shear coefficient along it. */
  readonly I: number;
  readonly kappa: number;
}

/** Principal planes of the section; in a reduced set of unknowns, the one plane that the set holds. */
function bendingPlanes({ properties }: DividedPart, v: boolean, w: boolean): BendingPlane[] {
  const I = bendingInertia(properties);
  const { ky, kz } = properties;
  if (!v && !w) return [];
  if (!v) return [{ y: 0, z: 1, I: I.ww, kappa: kz }];
  if (!w) return [{ y: 1, z: 0, I: I.vv, kappa: ky }];
  const angle = I.vw === 0 ? 0 : 0.5 * Math.atan2(2 * I.vw, I.vv - I.ww);
  const c = Math.cos(angle);
  const s = Math.sin(angle);
  return [
    { y: c, z: s },
    { y: -s, z: c },
  ].map(({ y, z }) => ({
    y,
    z,
    I: I.vv * y * y + 2 * I.vw * y * z + I.ww * z * z,
    kappa: 1 / ((y * y) / ky + (z * z) / kz),
  }));
}

function rowTerms({ dofs, T }: Combination, row: number): Terms {
  const terms: [number, number][] = [];
  dofs.forEach((dof, j) => {
    const value = T[row * dofs.length + j]!;
    if (value !== 0) terms.push([dof, value]);
  });
  return terms;
}

function mix(a: Terms, factorA: number, b: Terms, factorB: number): Terms {
  return [
    ...a.map(([dof, value]): [number, number] => [dof, factorA * value]),
    ...b.map(([dof, value]): [number, number] => [dof, factorB * value]),
  ].filter(([, value]) => value !== 0);
}
