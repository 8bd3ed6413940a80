import { DisjointSets } from '../disjointSets.ts';
import type { FormedDocument } from './formedDocument.ts';

/** Which nodes move as one, and which are tied to each other. */
export interface NodeGroups {
  /** Number of the rigid body that a node belongs to, by itself or through rigid links; −1 where it does not exist. */
  readonly of: (node: string) => number;
  /** Whether a spring ties two bodies. */
  readonly sprung: (a: number, b: number) => boolean;
}

export function nodeGroups(document: FormedDocument): NodeGroups {
  const { nodes, rigidLinks, springs } = document;
  const count = nodes.keys.length;
  const bodies = new DisjointSets(count);
  for (const link of rigidLinks.entries) {
    const main = link && nodes.placeOf(link.main);
    if (main === undefined) continue;
    for (const other of link!.others) {
      const place = nodes.placeOf(other);
      if (place !== undefined) bodies.join(main, place);
    }
  }
  const of = (node: string) => {
    const place = nodes.placeOf(node);
    return place === undefined ? -1 : bodies.find(place);
  };
  const key = (a: number, b: number) => Math.min(a, b) * count + Math.max(a, b);
  const tied = new Set<number>();
  for (const spring of springs.entries) {
    if (spring) tied.add(key(of(spring.start), of(spring.end)));
  }
  return { of, sprung: (a, b) => tied.size > 0 && tied.has(key(a, b)) };
}
