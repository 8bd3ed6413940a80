import { VALUES_PER_POINT, type ModeShapes } from '#shared/analysis/shapesFile.ts';
import { add, cross, norm, scale } from '#shared/frame/vector3.ts';
import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import type { Deformation } from '../Deformation.ts';
import type { FrameModel, PlacedMass } from './frameModel.ts';

/** How one node moves in a mode: translation [m] and rotation [rad] as drawn, at full amplitude. */
interface NodeSwing {
  readonly translation: Vector3;
  readonly rotation: Vector3;
}

/** A mass of the moved model, with how much of the largest displacement it has, 0 … 1. */
export interface MovedMass extends PlacedMass {
  readonly amount: number;
}

export interface MovedModel extends FrameModel {
  readonly masses: readonly MovedMass[];
}

/**
 * What the shapes of a mode are multiplied by, m as drawn per unit of shape: the largest displacement of any point
 * or centre of gravity is then drawn as `amplitude`.
 */
export function modeScale(
  model: FrameModel,
  { shapes, mode, amplitude }: Pick<Deformation, 'shapes' | 'mode' | 'amplitude'>,
): number {
  let largest = 0;
  for (let point = 0; point < shapes.points; point += 1) {
    largest = Math.max(largest, norm(swingOf(shapes, mode, point, 1).translation));
  }
  const swings = nodeSwings(shapes, mode, 1);
  for (const placed of model.masses) {
    largest = Math.max(largest, norm(centreSwing(placed, swings)));
  }
  return largest > 0 ? amplitude / largest : 0;
}

/**
 * The frame's nodes, arms and masses at one moment of a mode, for drawing them as those at rest are drawn. The
 * returned function takes the factor −1 … 1.
 */
export function moveModel(
  model: FrameModel,
  deformation: Pick<Deformation, 'shapes' | 'mode' | 'amplitude'>,
): (factor: number) => MovedModel {
  const { shapes, mode, amplitude } = deformation;
  const swings = nodeSwings(shapes, mode, modeScale(model, deformation));
  const centres = model.masses.map((placed) => centreSwing(placed, swings));
  return (factor) => {
    const nodes = new Map<string, Vector3>();
    for (const [id, at] of model.nodes) {
      const swing = swings.get(id);
      nodes.set(id, swing ? add(at, scale(swing.translation, factor)) : at);
    }
    const endOf = (node: string, at: Vector3, end: Vector3): Vector3 => {
      const swing = swings.get(node);
      return swing ? add(end, scale(carried(swing, at, end), factor)) : end;
    };
    return {
      ...model,
      nodes,
      members: model.members.map((placed) => ({
        ...placed,
        startNode: nodes.get(placed.member.start) ?? placed.startNode,
        endNode: nodes.get(placed.member.end) ?? placed.endNode,
        start: endOf(placed.member.start, placed.startNode, placed.start),
        end: endOf(placed.member.end, placed.endNode, placed.end),
      })),
      masses: model.masses.map((placed, i) => {
        const swing = centres[i] ?? [0, 0, 0];
        return {
          ...placed,
          node: nodes.get(placed.mass.node) ?? placed.node,
          centre: add(placed.centre, scale(swing, factor)),
          amount: amplitude > 0 ? Math.min(1, norm(swing) / amplitude) : 0,
        };
      }),
    };
  };
}

function nodeSwings(shapes: ModeShapes, mode: number, by: number): Map<string, NodeSwing> {
  return new Map(shapes.nodes.map((id, point) => [id, swingOf(shapes, mode, point, by)]));
}

function swingOf(shapes: ModeShapes, mode: number, point: number, by: number): NodeSwing {
  const at = (mode * shapes.points + point) * VALUES_PER_POINT;
  const value = (k: number): number => (shapes.shapes[at + k] ?? 0) * by;
  return {
    translation: [value(0), value(1), value(2)],
    rotation: [value(3), value(4), value(5)],
  };
}

/** How a point rigidly carried by a node moves: u + θ × r. */
function carried({ translation, rotation }: NodeSwing, node: Vector3, point: Vector3): Vector3 {
  const r: Vector3 = [point[0] - node[0], point[1] - node[1], point[2] - node[2]];
  return add(translation, cross(rotation, r));
}

function centreSwing(placed: PlacedMass, swings: ReadonlyMap<string, NodeSwing>): Vector3 {
  const swing = swings.get(placed.mass.node);
  return swing ? carried(swing, placed.node, placed.centre) : [0, 0, 0];
}
