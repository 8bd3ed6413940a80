import type { Combination } from '../../frame/freedoms/Combination.ts';
import type { DividedPart, FrameModel, Segment } from '../../frame/assembly/FrameModel.ts';
import { inModel } from '../../frame/assembly/chains.ts';
import { bendingInertia } from '../../frame/elements/beamProperties.ts';
import type { DynamicElement } from '../../frame/elements/DynamicElement.ts';
import { dynamicFlexure } from '../../frame/elements/dynamicFlexure.ts';
import { dynamicRod } from '../../frame/elements/dynamicRod.ts';
import { add, scale } from '../../frame/vector3.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';

/** A stretch of a member in one kind of vibration. */
export interface MemberPiece {
  /** Shared by pieces of equal section, material, theory and length. */
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

/** One row of an element over the rows of a segment's ends: Σ factor × row. */
type RowMix = readonly (readonly [row: number, factor: number])[];

/** What segments of one make in one set of unknowns share. */
interface PieceMake {
  readonly element: DynamicElement;
  readonly rows: readonly RowMix[];
  /** Direction and axis over the member's x, y and z. */
  readonly direction: Vector3;
  readonly axis: Vector3;
}

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
  const pieces: MemberPiece[] = [];
  const beams = new Map<string, { makes: readonly PieceMake[]; turned: TurnedBeam[] }>();
  const bars = new Map<string, DynamicElement>();
  for (const { part, number, motion } of segmentsOf(model)) {
    const { axes, make, segmentLength } = part;
    if (part.member.kind === 'beam') {
      const exists = [0, 1, 2, 3].map((i) => inModel([axes.x, axes.y, axes.z], i, model.exists));
      const key = `${make} ${exists.join()}`;
      let beam = beams.get(key);
      if (beam === undefined) {
        beam = { makes: beamMakes(part, exists), turned: [] };
        beams.set(key, beam);
      }
      const { makes, turned } = beam;
      let alike = turned.find((other) => turnedAlike(other, part, motion));
      if (alike === undefined) {
        alike = turnedBeam(makes, part, motion);
        if (turned.length < MOST_ORIENTATIONS) turned.push(alike);
      }
      for (let i = 0; i < makes.length; i++) {
        const { columns, T, direction, axis } = alike.rows[i]!;
        const dofs = new Int32Array(columns.length);
        for (let k = 0; k < columns.length; k++) dofs[k] = motion.dofs[columns[k]!]!;
        pieces.push({
          element: makes[i]!.element,
          part,
          from: number * segmentLength,
          length: segmentLength,
          motion: { rows: makes[i]!.rows.length, dofs, T },
          direction,
          axis,
        });
      }
      continue;
    }
    const count = barPieces(part);
    const length = axes.length / count;
    const key = `${make} ${count}`;
    let element = bars.get(key);
    if (element === undefined) {
      element = stretching(part, length);
      bars.set(key, element);
    }
    const whole = mixed(motion, [[[0, 1]], [[3, 1]]]);
    const first = unknowns;
    unknowns += count - 1;
    for (let i = 0; i < count; i++) {
      pieces.push({
        element,
        part,
        from: i * length,
        length,
        motion: count === 1 ? whole : betweenStations(whole, first, i, count),
        direction: axes.x,
        axis: axes.x,
      });
    }
  }
  return { pieces, unknowns };
}

/** Segments in the order of members; those of undivided members are their chains. */
function segmentsOf(model: FrameModel): readonly Segment[] {
  if (model.parts.some(({ divisions }) => divisions > 1)) return model.segments;
  return model.chains
    .flat()
    .map(({ part, ends }) => ({ part, number: 0, motion: ends }))
    .sort((a, b) => a.part.index - b.part.index);
}

/** Members whose planes of bending are coupled by shear, which the mesh-free pieces leave out. */
export function crossShear(model: FrameModel): DividedPart[] {
  return model.parts.filter(({ member, properties: { Iyz, ky, kz, theory }, axes }) => {
    const both = [1, 2].every((i) => inModel([axes.x, axes.y, axes.z], i, model.exists));
    return member.kind === 'beam' && theory === 'timoshenko' && Iyz !== 0 && ky !== kz && both;
  });
}

function stretching({ properties }: DividedPart, length: number): DynamicElement {
  const { E, A, rho, massPerLength } = properties;
  const inertia = rho * A + massPerLength;
  return dynamicRod({ rigidity: E * A, inertia, length, twists: false });
}

/** exists: of the displacements u v w and the rotation rx in the member's axes. */
function beamMakes(part: DividedPart, exists: readonly boolean[]): PieceMake[] {
  const { properties, segmentLength: length } = part;
  const { E, G, A, J, rho, Iy, Iz, massPerLength, theory } = properties;
  const makes: PieceMake[] = [];
  const along: Vector3 = [1, 0, 0];
  if (exists[0]) {
    const rows = [[[0, 1]], [[6, 1]]] as const;
    makes.push({ element: stretching(part, length), rows, direction: along, axis: along });
  }
  if (exists[3]) {
    makes.push({
      element: dynamicRod({ rigidity: G * J, inertia: rho * (Iy + Iz), length, twists: true }),
      rows: [[[3, 1]], [[9, 1]]],
      direction: along,
      axis: along,
    });
  }
  for (const { y, z, I, kappa } of bendingPlanes(part, exists[1]!, exists[2]!)) {
    makes.push({
      element: dynamicFlexure({
        bending: E * I,
        shear: theory === 'timoshenko' ? kappa * G * A : Infinity,
        mass: rho * A + massPerLength,
        inertia: theory === 'timoshenko' ? rho * I : 0,
        length,
      }),
      // The slope of a deflection along n = y-part + z-part is the rotation about x × n.
      rows: [0, 6].flatMap((end): RowMix[] => [
        [
          [end + 1, y],
          [end + 2, z],
        ],
        [
          [end + 5, y],
          [end + 4, -z],
        ],
      ]),
      direction: [0, y, z],
      axis: [0, -z, y],
    });
  }
  return makes;
}

/** Beams of one make that stand alike: their pieces differ in unknowns alone. */
interface TurnedBeam {
  readonly part: DividedPart;
  readonly motion: Combination;
  readonly rows: readonly (MixedRows & { readonly direction: Vector3; readonly axis: Vector3 })[];
}

/** Orientations of one make that are looked through for one alike; more are formed anew. */
const MOST_ORIENTATIONS = 16;

function turnedBeam(
  makes: readonly PieceMake[],
  part: DividedPart,
  motion: Combination,
): TurnedBeam {
  const rows = makes.map((make) => ({
    ...mixedRows(motion, make.rows),
    direction: inGlobal(part, make.direction),
    axis: inGlobal(part, make.axis),
  }));
  return { part, motion, rows };
}

function turnedAlike(
  { part: { axes }, motion: { T } }: TurnedBeam,
  other: DividedPart,
  motion: Combination,
): boolean {
  if (T.length !== motion.T.length) return false;
  for (let k = 0; k < 3; k++) {
    if (axes.x[k] !== other.axes.x[k] || axes.z[k] !== other.axes.z[k]) return false;
  }
  for (let i = 0; i < T.length; i++) if (T[i] !== motion.T[i]) return false;
  return true;
}

function inGlobal({ axes }: DividedPart, [x, y, z]: Vector3): Vector3 {
  return add(add(scale(axes.x, x), scale(axes.y, y)), scale(axes.z, z));
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

/** Mixed rows over those columns of a combination that take part in them. */
interface MixedRows {
  readonly columns: readonly number[];
  /** rows × columns, row by row. */
  readonly T: Float64Array;
}

function mixedRows({ dofs, T }: Combination, rows: readonly RowMix[]): MixedRows {
  const width = dofs.length;
  const values = rows.map((mix) =>
    Float64Array.from({ length: width }, (_, j) =>
      mix.reduce((sum, [row, factor]) => sum + factor * T[row * width + j]!, 0),
    ),
  );
  const columns = Array.from(dofs.keys()).filter((j) => values.some((row) => row[j] !== 0));
  return {
    columns,
    T: Float64Array.from(values.flatMap((row) => columns.map((j) => row[j]!))),
  };
}

function mixed(motion: Combination, rows: readonly RowMix[]): Combination {
  const { columns, T } = mixedRows(motion, rows);
  return { rows: rows.length, dofs: Int32Array.from(columns, (j) => motion.dofs[j]!), T };
}

/** Ends of the `i`-th of `count` pieces of a bar whose inner stations are the unknowns from `first`. */
function betweenStations(whole: Combination, first: number, i: number, count: number): Combination {
  const outer = i === 0 ? mixed(whole, [[[0, 1]]]) : mixed(whole, [[[1, 1]]]);
  if (i > 0 && i < count - 1) {
    return {
      rows: 2,
      dofs: Int32Array.of(first + i - 1, first + i),
      T: Float64Array.of(1, 0, 0, 1),
    };
  }
  const width = outer.dofs.length + 1;
  const T = new Float64Array(2 * width);
  const outerRow = i === 0 ? 0 : 1;
  T.set(outer.T, outerRow * width);
  T[(1 - outerRow) * width + width - 1] = 1;
  return { rows: 2, dofs: Int32Array.of(...outer.dofs, i === 0 ? first : first + count - 2), T };
}
