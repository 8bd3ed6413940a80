import type { FrameDocument, Vector3 } from '#shared/schemas/frameDocument.ts';

type Point = readonly [number, number];

/** A frame as lines on paper, in metres of the drawing, y downwards. */
export interface Outline {
  readonly lines: readonly (readonly [Point, Point])[];
  readonly supports: readonly Point[];
  /** From the node to the centre of gravity. */
  readonly masses: readonly (readonly [Point, Point])[];
  /** x, y, width, height of all of it. */
  readonly box: readonly [number, number, number, number];
}

/** Oblique view: X to the right and a little down, Y to the back right, Z up. */
const project = ([x, y, z]: Vector3): Point => [0.94 * x + 0.56 * y, 0.16 * x - 0.4 * y - z];

export function outlineOf(document: FrameDocument): Outline {
  const nodes = new Map(document.nodes.map((node) => [node.id, node]));
  const at = (id: string, offset: Vector3 = [0, 0, 0]): Point => {
    const node = nodes.get(id);
    return project([
      (node?.x ?? 0) + offset[0],
      (node?.y ?? 0) + offset[1],
      (node?.z ?? 0) + offset[2],
    ]);
  };
  const lines = document.members.map(
    (member) => [at(member.start, member.startArm), at(member.end, member.endArm)] as const,
  );
  const supports = document.supports.map((support) => at(support.node));
  const masses = document.masses.map(
    (mass) => [at(mass.node), at(mass.node, mass.offset)] as const,
  );
  return { lines, supports, masses, box: boxOf([...lines.flat(), ...supports, ...masses.flat()]) };
}

function boxOf(points: readonly Point[]): Outline['box'] {
  let [left, top, right, bottom] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const [x, y] of points) {
    left = Math.min(left, x);
    right = Math.max(right, x);
    top = Math.min(top, y);
    bottom = Math.max(bottom, y);
  }
  return points.length === 0 ? [0, 0, 1, 1] : [left, top, right - left, bottom - top];
}
