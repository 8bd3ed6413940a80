import type { FrameDocument, Vector3 } from '../../schemas/frameDocument.ts';
import type { GroupDisplacement } from '../freedoms/GroupFreedoms.ts';
import { rigidGroups, rotationRow, translationRow } from '../freedoms/rigidGroups.ts';
import { norm, subtract } from '../vector3.ts';
import { nodePositions } from './memberParts.ts';

export const GLOBAL_AXES: readonly [Vector3, Vector3, Vector3] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** Where the nodes of a frame are and which rigid group carries each. */
export interface Carriers {
  readonly groupOf: Int32Array;
  readonly reference: readonly Vector3[];
  readonly scale: number;
  readonly at: ReadonlyMap<string, Vector3>;
  readonly index: ReadonlyMap<string, number>;
}

/** Extent of the frame as a power of two [m]: scaling by it rounds nothing. */
function powerOfTwoExtent(points: readonly Vector3[]): number {
  const first = points[0];
  const extent = first ? Math.max(...points.map((point) => norm(subtract(point, first)))) : 0;
  return extent > 0 ? 2 ** Math.round(Math.log2(extent)) : 1;
}

export function carriersOf(document: FrameDocument): Carriers {
  const index = new Map(document.nodes.map((node, i) => [node.id, i]));
  const at = nodePositions(document);
  return { ...rigidGroups(document, index), scale: powerOfTwoExtent([...at.values()]), at, index };
}

/**
 * The six displacements of a point that `node` carries rigidly: three along, then three about `axes`.
 *   point  [m]; the node's own position when absent
 */
export function carriedBy(
  carriers: Carriers,
  node: string,
  axes: readonly [Vector3, Vector3, Vector3] = GLOBAL_AXES,
  point?: Vector3,
): GroupDisplacement[] {
  const group = groupOfNode(carriers, node);
  const offset = offsetFrom(carriers, group, point ?? carriers.at.get(node)!);
  return [
    ...axes.map((axis) => ({ group, row: translationRow(axis, offset, carriers.scale) })),
    ...axes.map((axis) => ({ group, row: rotationRow(axis, carriers.scale) })),
  ];
}

/** From the reference of the group that carries `node` to a point [m]. */
export function offsetFrom(carriers: Carriers, group: number, point: Vector3): Vector3 {
  return subtract(point, carriers.reference[group]!);
}

/** Rigid group of a node. */
export function groupOfNode({ groupOf, index }: Carriers, node: string): number {
  return groupOf[index.get(node)!]!;
}
