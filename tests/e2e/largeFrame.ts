import { aRack } from '#tests/builders/aFrame.ts';

/**
 * A frame of some 110,000 unknowns in which no two members are of one length, which saves the solver nothing: its
 * solve takes seconds, long enough to be interrupted.
 */
export function largeFrame(name: string): object {
  const rack = aRack({ bays: 6, storeys: 7, divisions: 20 });
  const nodes = rack.nodes.map((node, i) => ({
    ...node,
    x: node.x + 0.1 * Math.sin(1.3 * i),
    y: (node.y ?? 0) + 0.1 * Math.sin(2.1 * i),
  }));
  return { ...rack, nodes, name };
}
