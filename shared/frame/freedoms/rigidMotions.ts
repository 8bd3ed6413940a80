import { AppError } from '../../errors/AppError.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';
import type { FrameModel, ModelChain } from '../assembly/FrameModel.ts';
import { add, cross, dot, scale, subtract } from '../vector3.ts';
import { complement, extendBasis, unitRow } from './rowSpace.ts';
import type { Row } from './rowSpace.ts';

/** Kinetic energy of a rigid motion, over that of the whole mass moving as far, under which it counts as none. */
const MASSLESS = 1e-20;
/** Part of a rigid motion's mass outside the motions before it, under which it is one of their mixtures. */
const DEPENDENT = 1e-10;

/** y ← M x. */
export type MultiplyMass = (x: Float64Array, y: Float64Array) => void;

/** A rigid motion of one component over the free unknowns of a frame. */
export interface RigidMotion {
  readonly component: number;
  readonly x: Float64Array;
}

/** One that nothing resists, as geometry gives it. */
export interface FreeMotion extends RigidMotion {
  /** Translation, and rotation times the model's `scale`, about the middle of the component [m]. */
  readonly six: Row;
}

/** Displacements (t + ω × a, ω) of a group whose reference lies at `a` from the centre, all scaled to metres. */
function groupMotion(g: Row, a: Vector3, length: number): Row {
  const omega: Vector3 = [g[3]! / length, g[4]! / length, g[5]! / length];
  const t = add([g[0]!, g[1]!, g[2]!], cross(omega, a));
  return Float64Array.of(...t, g[3]!, g[4]!, g[5]!);
}

/** Row over a component's rigid motion about its centre that a row over one of its groups amounts to. */
function aboutCentre(row: Row, a: Vector3, length: number): Row {
  const along: Vector3 = [row[0]!, row[1]!, row[2]!];
  const turning = scale(cross(a, along), 1 / length);
  return Float64Array.of(
    ...along,
    row[3]! + turning[0],
    row[4]! + turning[1],
    row[5]! + turning[2],
  );
}

/**
 * Motions that move one whole component rigidly and meet no stiffness: those of its at most six that no
 * support fixes or resists, however softly (springs between nodes store nothing in them). Judged by geometry
 * alone, so a support 1e-9 as stiff as the frame still holds. Translations come first.
 */
export function rigidMotions(model: FrameModel): FreeMotion[] {
  const { componentOf, components, reference, holds, meanings, scale: length } = model;
  const absent = [0, 1, 2, 3, 4, 5].filter((axis) => !model.exists[axis]).map(unitRow);
  const centre = componentCentres(model);
  const held: Row[][] = Array.from({ length: components }, () => []);
  for (const { group, row } of holds) {
    const component = componentOf[group]!;
    held[component]!.push(
      aboutCentre(row, subtract(reference[group]!, centre[component]!), length),
    );
  }
  const unknownsOf: number[][] = Array.from({ length: components }, () => []);
  meanings.forEach(({ group }, i) => unknownsOf[componentOf[group]!]!.push(i));
  return held.flatMap((rows, component) => {
    const fixed = extendBasis([], [...absent, ...rows]);
    return complement(fixed).flatMap((g) => {
      const x = new Float64Array(model.free);
      let largest = 0;
      for (const i of unknownsOf[component]!) {
        const { group, row } = meanings[i]!;
        const motion = groupMotion(g, subtract(reference[group]!, centre[component]!), length);
        let value = 0;
        for (let k = 0; k < 6; k++) value += row[k]! * motion[k]!;
        x[i] = value;
        largest = Math.max(largest, Math.abs(value));
      }
      for (const chain of model.chains.flat()) {
        const group = model.groupOf[model.nodeIndex.get(chain.part.member.start)!]!;
        if (componentOf[group] !== component) continue;
        addInnerMotion(chain, g, centre[component]!, length, x);
      }
      // A straight line of bars has no unknown that turns about the line.
      return largest > 1e-12 ? [{ component, x, six: g }] : [];
    });
  });
}

/** What the stations inside a chain do in a rigid motion about a centre. */
function addInnerMotion(
  { part, from, elements, inner, make }: ModelChain,
  g: Row,
  centre: Vector3,
  length: number,
  x: Float64Array,
): void {
  const axes = [part.axes.x, part.axes.y, part.axes.z] as const;
  const omega: Vector3 = [g[3]! / length, g[4]! / length, g[5]! / length];
  for (let station = 1; station < elements; station++) {
    const along = (from + station) * part.segmentLength;
    const point = add(part.start, scale(part.axes.x, along));
    const t = add([g[0]!, g[1]!, g[2]!], cross(omega, subtract(point, centre)));
    make.places[station]!.forEach((place, d) => {
      if (place >= 0) x[inner + place] = dot(axes[d % 3]!, d < 3 ? t : omega);
    });
  }
}

/** Middle of the groups of each component [m]. */
function componentCentres({ componentOf, components, reference }: FrameModel): Vector3[] {
  const sum: Vector3[] = Array.from({ length: components }, () => [0, 0, 0]);
  const count = new Int32Array(components);
  reference.forEach((point, group) => {
    const component = componentOf[group]!;
    sum[component] = add(sum[component]!, point);
    count[component]! += 1;
  });
  return sum.map((total, component) => scale(total, 1 / count[component]!));
}

/**
 * The same motions made orthonormal in the mass, xᵀMx = 1, in their order: so the rotations of each component are about
 * its centre of mass.
 *   multiplyMass  y ← M x over the free unknowns [kg]
 * Throws AppError `mechanism` where a whole component can move without mass moving.
 */
export function massNormalised(
  motions: readonly RigidMotion[],
  multiplyMass: MultiplyMass,
  model: FrameModel,
  totalMass: number,
): RigidMotion[] {
  const done: (RigidMotion & { Mx: Float64Array })[] = [];
  for (const { component, x: given } of motions) {
    const x = given.slice();
    const Mx = new Float64Array(model.free);
    const before = massOf(multiplyMass, x, Mx);
    for (let pass = 0; pass < 2; pass++) {
      for (const other of done) {
        if (other.component !== component) continue;
        let share = 0;
        for (let i = 0; i < x.length; i++) share += x[i]! * other.Mx[i]!;
        for (let i = 0; i < x.length; i++) x[i]! -= share * other.x[i]!;
      }
    }
    const left = massOf(multiplyMass, x, Mx);
    const largest = given.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
    if (before <= MASSLESS * totalMass * largest ** 2 || left <= DEPENDENT * before) {
      throw masslessComponent(model, component);
    }
    const factor = 1 / Math.sqrt(left);
    done.push({
      component,
      x: x.map((value) => value * factor),
      Mx: Mx.map((value) => value * factor),
    });
  }
  return done.map(({ component, x }) => ({ component, x }));
}

function massOf(multiplyMass: MultiplyMass, x: Float64Array, Mx: Float64Array): number {
  multiplyMass(x, Mx);
  let mass = 0;
  for (let i = 0; i < x.length; i++) mass += x[i]! * Mx[i]!;
  return mass;
}

function masslessComponent(model: FrameModel, component: number): AppError {
  const node = model.document.nodes.findIndex(
    (_, i) => model.componentOf[model.groupOf[i]!] === component,
  );
  const id = model.document.nodes[node]?.id ?? '';
  const message =
    `Nothing holds the part of the frame with node “${id}”, and it can move without any mass moving. ` +
    'Support it, join it to the frame, or give its masses their moments of inertia.';
  return new AppError('mechanism', message, { issues: [{ path: `nodes.${node}`, message }] });
}
