import type { Member } from '../../schemas/frameDocument.ts';
import { formatNumber } from '../../units/formatQuantity.ts';
import { CappedWarnings } from './CappedWarnings.ts';
import { closestApproach } from './closestApproach.ts';
import { extentOf, lengthOf, visitClosePairs } from './closePairs.ts';
import type { Lines } from './closePairs.ts';
import { mentionEntry } from './findings.ts';
import type { Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';
import { memberEnds } from './members.ts';
import { nearness } from './nearness.ts';
import { nodeGroups } from './nodeGroups.ts';
import { sharedLength } from './sharedLength.ts';

/** A line counts as touched within this share of the shorter line's length at most. */
const SHARE_OF_MEMBER = 0.01;

/** Members with a length, arms included. */
interface MemberLines {
  readonly lines: Lines;
  readonly lengths: Float64Array;
  readonly members: readonly Member[];
  /** Place of each in the document. */
  readonly places: readonly number[];
}

/**
 * Warns of members that stand in each other's place or meet where nothing joins them: the same two ends twice, an
 * overlap along one line, an end on another member's length, a crossing. Centre lines (arms included) meet where they
 * are closer than `nearness` and 1 % of the shorter member. Members on one rigid body, or tied by a spring, are joined.
 * Each kind names the first 20. Takes time in proportion to the members, as long as they do not lie in a heap.
 */
export function checkMemberPairs(document: FormedDocument, findings: Findings): void {
  const frame = memberLines(document);
  const { lines, lengths, members } = frame;
  const tolerance = nearness(extentOf(lines));
  const makes = warnOfDuplicates(frame, findings);
  const joined = joinedMembers(document, members);
  const warnings = meetingWarnings(frame, findings);
  const approach = new Float64Array(3);

  const all = visitClosePairs(lines, tolerance, (i, j) => {
    const [longer, shorter] = lengths[i]! >= lengths[j]! ? [i, j] : [j, i];
    const within = Math.min(tolerance, SHARE_OF_MEMBER * lengths[shorter]!);
    const shared = sharedLength(lines, longer, shorter, lengths[longer]!, within);
    if (shared > within && makes[i] !== makes[j]) warnings.overlap(j, i, shared);
    if (shared >= 0 || joined(i, j)) return;
    closestApproach(lines, i, j, approach);
    const [distance, s, t] = [approach[0]!, approach[1]!, approach[2]!];
    if (distance > within) return;
    const insideI = inside(s, lengths[i]!, within);
    const insideJ = inside(t, lengths[j]!, within);
    if (insideI && insideJ) warnings.crossing(j, i, t);
    else if (insideI) warnings.touch(j, t < 0.5, i);
    else if (insideJ) warnings.touch(i, s < 0.5, j);
  });
  warnings.finish();
  if (!all) {
    findings.warn(
      'members',
      'Too many members lie in a heap to look for all that overlap or cross. Check the coordinates of the nodes.',
    );
  }
}

function memberLines(document: FormedDocument): MemberLines {
  const members: Member[] = [];
  const places: number[] = [];
  const coordinates: number[] = [];
  document.members.entries.forEach((member, place) => {
    const ends = member && memberEnds(document, member);
    if (!member || !ends) return;
    const [start, end] = ends;
    if (start.every((value, axis) => value === end[axis])) return;
    members.push(member);
    places.push(place);
    coordinates.push(...start, ...end);
  });
  const lines = Float64Array.from(coordinates);
  return {
    lines,
    lengths: Float64Array.from(members, (_, i) => lengthOf(lines, i)),
    members,
    places,
  };
}

/** Whether a place on a line lies off both ends. */
function inside(share: number, length: number, tolerance: number): boolean {
  return share * length > tolerance && (1 - share) * length > tolerance;
}

/** Number of each member's pair of ends, alike for members between the same ends whichever way round. */
function warnOfDuplicates({ members, places }: MemberLines, findings: Findings): Int32Array {
  const warnings = new CappedWarnings(
    findings,
    'members',
    (more) => `${more} more members join the same two nodes as another.`,
  );
  const first = new Map<string, number>();
  const makes = members.map((member, i) => {
    const ends = [endKey(member.start, member.startArm), endKey(member.end, member.endArm)];
    const key = ends.sort().join('|');
    const make = first.get(key);
    if (make === undefined) {
      first.set(key, i);
      return i;
    }
    const other = mentionEntry('members', members[make]!);
    warnings.warn(
      places[i]!,
      member,
      `it joins the same two nodes as ${other}, so both carry and weigh in the same place. Remove one, unless two profiles lie side by side there.`,
    );
    return make;
  });
  warnings.finish();
  return Int32Array.from(makes);
}

function endKey(node: string, arm: readonly number[] | undefined): string {
  return arm?.some((part) => part !== 0) ? `${node}|${arm.join(' ')}` : node;
}

/** Whether two members share a rigid body, or a spring ties a body of one to a body of the other. */
function joinedMembers(document: FormedDocument, members: readonly Member[]) {
  const groups = nodeGroups(document);
  const starts = Int32Array.from(members, ({ start }) => groups.of(start));
  const ends = Int32Array.from(members, ({ end }) => groups.of(end));
  const one = (a: number, b: number) => a === b || groups.sprung(a, b);
  return (i: number, j: number): boolean => {
    const [a, b, c, d] = [starts[i]!, ends[i]!, starts[j]!, ends[j]!];
    return one(a, c) || one(a, d) || one(b, c) || one(b, d);
  };
}

/** The sentences about two members that meet; each is told about the first of the two numbers. */
function meetingWarnings({ lines, members, places }: MemberLines, findings: Findings) {
  const kind = (sentenceOf: (more: number) => string) =>
    new CappedWarnings(findings, 'members', sentenceOf);
  const overlaps = kind((more) => `${more} more members overlap others.`);
  const touches = kind((more) => `${more} more members end on others that they are not joined to.`);
  const crossings = kind((more) => `${more} more members cross others without a common node.`);
  const mention = (i: number) => mentionEntry('members', members[i]!);
  return {
    overlap(i: number, other: number, shared: number) {
      overlaps.warn(
        places[i]!,
        members[i]!,
        `it and ${mention(other)} lie in one line and overlap for ${rounded(shared)} m. Divide them at their nodes, or remove one.`,
      );
    },
    touch(i: number, atStart: boolean, other: number) {
      const node = atStart ? members[i]!.start : members[i]!.end;
      touches.warn(
        places[i]!,
        members[i]!,
        `its ${atStart ? 'start' : 'end'} at node “${node}” lies on ${mention(other)} but is not joined to it. Divide that member at this node, or join them by a spring or a rigid link.`,
      );
    },
    crossing(i: number, other: number, share: number) {
      const at = [0, 1, 2].map((axis) => {
        const start = lines[6 * i + axis]!;
        return rounded(start + share * (lines[6 * i + 3 + axis]! - start));
      });
      crossings.warn(
        places[i]!,
        members[i]!,
        `it crosses ${mention(other)} at X ${at[0]}, Y ${at[1]}, Z ${at[2]} m without a common node, so neither holds the other there. If they are joined, divide both at a node there.`,
      );
    },
    finish() {
      for (const warnings of [overlaps, touches, crossings]) warnings.finish();
    },
  };
}

function rounded(metres: number): string {
  return formatNumber(Math.abs(metres) < 1e-9 ? 0 : metres, 4);
}
