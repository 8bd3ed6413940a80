import type { FrameDocument } from '../../schemas/frameDocument.ts';
import type { Carriers } from './carriers.ts';

/** Component of each rigid group: the groups that members and springs join, directly or through others. */
export function componentsOf(
  document: FrameDocument,
  { groupOf, index, reference }: Carriers,
): { componentOf: Int32Array; components: number } {
  const neighbours: number[][] = reference.map(() => []);
  for (const { start, end } of [...document.members, ...document.springs]) {
    const a = groupOf[index.get(start)!]!;
    const b = groupOf[index.get(end)!]!;
    neighbours[a]!.push(b);
    neighbours[b]!.push(a);
  }
  const componentOf = new Int32Array(reference.length).fill(-1);
  let components = 0;
  for (let first = 0; first < reference.length; first++) {
    if (componentOf[first] !== -1) continue;
    const waiting = [first];
    componentOf[first] = components;
    for (let group = waiting.pop(); group !== undefined; group = waiting.pop()) {
      for (const next of neighbours[group]!) {
        if (componentOf[next] !== -1) continue;
        componentOf[next] = components;
        waiting.push(next);
      }
    }
    components += 1;
  }
  return { componentOf, components };
}
