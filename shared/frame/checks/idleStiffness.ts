import { DISPLACEMENTS } from '../../schemas/frameDocument.ts';
import type { Displacement, Member } from '../../schemas/frameDocument.ts';
import { norm } from '../vector3.ts';
import type { Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';
import { nodeGroups } from './nodeGroups.ts';
import { FLAT_TOLERANCE, memberDisplacementInSet, quarterTurns } from './reducedSet.ts';
import type { UnknownSet } from './reducedSet.ts';

const isRotation = (displacement: Displacement) => displacement.startsWith('r');

/** What feels how one rigid body of nodes moves. */
interface Feelers {
  /** Ends of members, and of those the ones that a turn of the body moves or bends. */
  ends: number;
  turningEnds: number;
  springs: number;
  /** Other bodies at the far ends of its springs. */
  readonly opposite: Set<number>;
  supported: boolean;
  turnSupported: boolean;
  masses: number;
  turningMasses: number;
  nodes: number;
}

/**
 * Warns of stiffness that ends where nothing has mass or holds on: a spring to a node that carries nothing else, and a
 * stiff joint to a node that nothing else feels. Its unknown there is massless, follows the rest without resistance,
 * and the stiffness does nothing, which no figure of a solve shows.
 *
 * Other massless unknowns draw no warning. A spring or joint between things that do feel it acts as it should, with
 * mass on its unknown or without (lumped members have none in bending); two springs in a row through a massless node
 * are one softer spring; and a joint that is free leaves its node as loose as no joint would.
 */
export function checkIdleStiffness(
  document: FormedDocument,
  set: UnknownSet,
  findings: Findings,
): void {
  const groups = nodeGroups(document);
  const feelers = feelersOf(document, groups.of);
  document.springs.entries.forEach((spring, place) => {
    if (!spring || spring.start === spring.end) return;
    for (const field of ['start', 'end'] as const) {
      const at = feelers.get(groups.of(spring[field]));
      if (!at || at.ends + at.masses > 0 || at.supported || at.opposite.size !== 1) continue;
      findings
        .about('springs', place, spring)
        .warn(
          field,
          `its ${field} node “${spring[field]}” carries nothing and stands on nothing, so the spring holds nothing. Support that node, or give it the mass that stands there.`,
        );
    }
  });
  document.members.entries.forEach((member, place) => {
    if (!member) return;
    for (const field of ['start', 'end'] as const) {
      const at = feelers.get(groups.of(member[field]));
      const idle = at ? idleIn(member, field, at, set) : [];
      if (idle.length === 0) continue;
      findings
        .about('members', place, member)
        .warn(
          `joints.${field}`,
          `the stiffness of its ${field} joint in ${idle.join(', ')} does nothing, since nothing else at node “${member[field]}” resists or weighs in that motion. Remove it, or attach what the joint is to hold.`,
        );
    }
  });
}

/** Displacements in which a stiff joint at one end of a member has nothing to hold. */
function idleIn(
  member: Member,
  field: 'start' | 'end',
  at: Feelers,
  set: UnknownSet,
): Displacement[] {
  const joint = member.joints?.[field];
  if (!joint) return [];
  const moved = at.ends - 1 + at.springs + at.masses > 0 || at.supported;
  const own = feelsTurns(member, field) ? 1 : 0;
  // By an arm, or on a rigid body of several nodes, a turn at the joint shifts what stands at the far end.
  const lever = hasArm(member, field) || at.nodes > 1;
  const turned =
    at.turningEnds - own + at.springs + at.turningMasses > 0 ||
    at.turnSupported ||
    (lever && moved);
  const turns = quarterTurns(member.roll) ?? 0;
  return DISPLACEMENTS.filter((d) => {
    if (!(joint[d]! > 0) || (set.reduced && !memberDisplacementInSet(set, d, turns))) return false;
    if (!isRotation(d)) return !moved;
    return member.kind === 'beam' && !turned;
  });
}

/** By rigid body of nodes; operating states may move masses onto others. */
function feelersOf(document: FormedDocument, of: (node: string) => number): Map<number, Feelers> {
  const feelers = new Map<number, Feelers>();
  const at = (node: string): Feelers => {
    const body = of(node);
    let found = feelers.get(body);
    if (!found) {
      found = {
        ends: 0,
        turningEnds: 0,
        springs: 0,
        opposite: new Set(),
        supported: false,
        turnSupported: false,
        masses: 0,
        turningMasses: 0,
        nodes: 0,
      };
      feelers.set(body, found);
    }
    return found;
  };
  for (const node of document.nodes.entries) if (node) at(node.id).nodes += 1;
  for (const member of document.members.entries) {
    if (!member) continue;
    for (const field of ['start', 'end'] as const) {
      at(member[field]).ends += 1;
      if (feelsTurns(member, field)) at(member[field]).turningEnds += 1;
    }
  }
  for (const spring of document.springs.entries) {
    if (!spring || of(spring.start) === of(spring.end)) continue;
    for (const [near, far] of [
      [spring.start, spring.end],
      [spring.end, spring.start],
    ] as const) {
      at(near).springs += 1;
      at(near).opposite.add(of(far));
    }
  }
  for (const support of document.supports.entries) {
    if (!support) continue;
    const held = DISPLACEMENTS.filter(
      (d) => support.fixed.includes(d) || support.stiffness?.[d] !== undefined,
    );
    if (held.length > 0) at(support.node).supported = true;
    if (held.some(isRotation)) at(support.node).turnSupported = true;
  }
  for (const mass of document.masses.entries) {
    if (!mass) continue;
    at(mass.node).masses += 1;
    if (mass.inertia || norm(mass.offset) > FLAT_TOLERANCE) at(mass.node).turningMasses += 1;
  }
  for (const state of document.states.entries) {
    for (const { node, offset } of Object.values(state?.masses ?? {})) {
      if (node === undefined) continue;
      at(node).masses += 1;
      if (offset) at(node).turningMasses += 1;
    }
  }
  return feelers;
}

/** Whether a turn of its node bends a member or, by an arm, shifts its end. */
function feelsTurns(member: Member, field: 'start' | 'end'): boolean {
  if (hasArm(member, field)) return true;
  const joint = member.joints?.[field];
  return member.kind === 'beam' && DISPLACEMENTS.some((d) => isRotation(d) && joint?.[d] !== 0);
}

function hasArm(member: Member, field: 'start' | 'end'): boolean {
  const arm = field === 'start' ? member.startArm : member.endArm;
  return arm !== undefined && norm(arm) > FLAT_TOLERANCE;
}
