import type { FrameNode } from '../../schemas/frameDocument.ts';
import { formatNumber } from '../../units/formatQuantity.ts';
import { norm, subtract } from '../vector3.ts';
import { CappedWarnings } from './CappedWarnings.ts';
import { extentOf, visitClosePairs } from './closePairs.ts';
import { mentionEntry } from './findings.ts';
import type { Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';
import { memberEnds } from './members.ts';
import { nearness } from './nearness.ts';
import { nodeGroups } from './nodeGroups.ts';
import { attachedNodes } from './nodes.ts';

/** Distance over the frame's extent that rounding of coordinates explains. */
const SAME_PLACE = 1e-9;

/** Nodes count as close within this share of the shortest member at either of them at most. */
const SHARE_OF_MEMBER = 0.1;

/**
 * Warns of nodes that stand in one place, or closer than `nearness` (and 10 % of the members there), without a member, a spring or a rigid link between
 * them: what is drawn as one joint then is none. Nodes with nothing attached have a warning of their own.
 */
export function checkCloseNodes(document: FormedDocument, findings: Findings): void {
  const attached = attachedNodes(document);
  const places: number[] = [];
  const coordinates: number[] = [];
  document.nodes.entries.forEach((node, place) => {
    if (!node || !attached.has(node.id)) return;
    places.push(place);
    for (let end = 0; end < 2; end++) coordinates.push(node.x, node.y, node.z);
  });
  const points = Float64Array.from(coordinates);
  const extent = extentOf(points);
  const tolerance = nearness(extent);
  const joined = joinedNodes(document);
  const shortest = shortestMembers(document);
  const reach = (node: FrameNode) =>
    Math.min(tolerance, SHARE_OF_MEMBER * (shortest.get(node.id) ?? Infinity));
  const warnings = new CappedWarnings(
    findings,
    'nodes',
    (more) => `${more} more nodes stand in the place of others, or close by, without being joined.`,
  );
  const all = visitClosePairs(points, tolerance, (i, j) => {
    const distance = Math.hypot(
      points[6 * j]! - points[6 * i]!,
      points[6 * j + 1]! - points[6 * i + 1]!,
      points[6 * j + 2]! - points[6 * i + 2]!,
    );
    if (distance > tolerance) return;
    const node = document.nodes.entries[places[j]!]!;
    const other = document.nodes.entries[places[i]!]!;
    if (distance > Math.min(reach(node), reach(other)) || joined(node.id, other.id)) return;
    const mention = mentionEntry('nodes', other);
    const where =
      distance <= SAME_PLACE * extent
        ? `it stands at the same place as ${mention}`
        : `it is only ${formatNumber(distance * 1e3, 3)} mm from ${mention}`;
    warnings.warn(
      places[j]!,
      node,
      `${where}, but nothing joins the two. Make them one node, or join them by a spring or a rigid link.`,
    );
  });
  warnings.finish();
  if (!all) {
    findings.warn(
      'nodes',
      'Too many nodes lie in a heap to look for all that stand in one place. Check their coordinates.',
    );
  }
}

/** Length of the shortest member at each node [m]. */
function shortestMembers(document: FormedDocument): Map<string, number> {
  const shortest = new Map<string, number>();
  for (const member of document.members.entries) {
    const ends = member && memberEnds(document, member);
    if (!member || !ends) continue;
    const length = norm(subtract(ends[1], ends[0]));
    for (const node of [member.start, member.end]) {
      shortest.set(node, Math.min(length, shortest.get(node) ?? Infinity));
    }
  }
  return shortest;
}

/** Whether a rigid link, a spring or a member joins two nodes directly. */
function joinedNodes(document: FormedDocument): (a: string, b: string) => boolean {
  const groups = nodeGroups(document);
  const neighbours = new Map<number, Set<number>>();
  for (const member of document.members.entries) {
    if (!member) continue;
    const [a, b] = [groups.of(member.start), groups.of(member.end)];
    for (const [from, to] of [
      [a, b],
      [b, a],
    ] as const) {
      const known = neighbours.get(from);
      if (known) known.add(to);
      else neighbours.set(from, new Set([to]));
    }
  }
  return (first, second) => {
    const [a, b] = [groups.of(first), groups.of(second)];
    return a === b || groups.sprung(a, b) || neighbours.get(a)?.has(b) === true;
  };
}
