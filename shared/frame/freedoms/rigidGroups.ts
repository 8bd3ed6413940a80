import type { FrameDocument, Vector3 } from '../../schemas/frameDocument.ts';
import { DisjointSets } from '../disjointSets.ts';
import { cross } from '../vector3.ts';
import type { Row } from './rowSpace.ts';

/** Nodes that move as one rigid body: those joined by rigid links, chains of links included, or one alone. */
export interface RigidGroups {
  /** Group of each node of the document. */
  readonly groupOf: Int32Array;
  /** Point whose displacements stand for the group's: its first node in document order. */
  readonly reference: Vector3[];
}

/** Joins the nodes of every rigid link; several links on one node, and loops of links, are one body. */
export function rigidGroups(
  document: FrameDocument,
  nodeIndex: ReadonlyMap<string, number>,
): RigidGroups {
  const bodies = new DisjointSets(document.nodes.length);
  for (const link of document.rigidLinks) {
    for (const other of link.others) bodies.join(nodeIndex.get(link.main)!, nodeIndex.get(other)!);
  }
  const groupOf = new Int32Array(document.nodes.length);
  const reference: Vector3[] = [];
  document.nodes.forEach((node, i) => {
    const root = bodies.find(i);
    if (root === i) {
      groupOf[i] = reference.length;
      reference.push([node.x, node.y, node.z]);
    } else {
      groupOf[i] = groupOf[root]!;
    }
  });
  return { groupOf, reference };
}

/**
 * Displacement along `axis` of a point carried rigidly, as a row over the carrier's six displacements.
 *   axis    unit vector              offset  from the carrier's reference to the point [m]
 *   length  [m]: rotations are held as length × angle, which makes all six metres
 */
export function translationRow(axis: Vector3, offset: Vector3, length: number): Row {
  const turning = cross(offset, axis);
  return Float64Array.of(...axis, ...turning.map((value) => value / length));
}

/** Rotation about `axis` [rad] of a point carried rigidly, as a row over the carrier's displacements. */
export function rotationRow(axis: Vector3, length: number): Row {
  return Float64Array.of(0, 0, 0, ...axis.map((value) => value / length));
}
