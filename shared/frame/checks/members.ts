import { DISPLACEMENTS, type Member, type Vector3 } from '../../schemas/frameDocument.ts';
import { poissonRatio } from '../materialProperties.ts';
import { memberAxes } from '../memberAxes.ts';
import { sectionProperties, type SectionProperties } from '../sectionProperties.ts';
import { SHEAR_CENTRE_NOTE } from '../sections/section.ts';
import { add, norm, subtract } from '../vector3.ts';
import { lowerFirst } from './findings.ts';
import type { EntryFindings, Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';
import { checkNodeReference } from './nodes.ts';
import {
  memberDisplacementInSet,
  outOfPlane,
  quarterTurns,
  type UnknownSet,
} from './reducedSet.ts';

/** A member shorter than a micrometre has no length: no part of a machine frame is that small. */
const NO_LENGTH = 1e-6;

/** Relative size of a coupling between the planes that rounding alone explains. */
const COUPLING_TOLERANCE = 1e-9;

/** References, lengths, orientation and, in a reduced set, that no member couples out of it. */
export function checkMembers(document: FormedDocument, set: UnknownSet, findings: Findings): void {
  const offCentre = new Set<string>();
  document.members.entries.forEach((member, place) => {
    if (!member) return;
    const about = findings.about('members', place, member);
    checkNodeReference(document, member.start, 'start', 'start node', about);
    checkNodeReference(document, member.end, 'end', 'end node', about);
    if (!document.materials.has(member.material)) {
      about.refuse(
        'material',
        `material “${member.material}” does not exist. Choose one of the materials.`,
      );
    }
    if (!document.sections.has(member.section)) {
      about.refuse(
        'section',
        `section “${member.section}” does not exist. Choose one of the sections.`,
      );
    }
    checkEnds(document, member, about);
    checkBarJoints(member, about);
    if (set.reduced) checkPlanarity(document, set, member, about);
    if (member.kind === 'beam') offCentre.add(member.section);
  });
  document.sections.entries.forEach((section, place) => {
    if (!section || !offCentre.has(section.id)) return;
    const { kind } = section.shape;
    if (kind === 'angle' || kind === 'channel' || kind === 'tee') {
      findings.about('sections', place, section).warn('shape', lowerFirst(SHEAR_CENTRE_NOTE));
    }
  });
}

/** The two ends of a member in global axes, arms included; null where a node is missing or malformed. */
export function memberEnds(document: FormedDocument, member: Member): [Vector3, Vector3] | null {
  const start = document.nodes.find(member.start);
  const end = document.nodes.find(member.end);
  if (!start || !end) return null;
  const none: Vector3 = [0, 0, 0];
  return [
    add([start.x, start.y, start.z], member.startArm ?? none),
    add([end.x, end.y, end.z], member.endArm ?? none),
  ];
}

function checkEnds(document: FormedDocument, member: Member, about: EntryFindings): void {
  if (member.start === member.end) {
    about.refuse('end', 'it starts and ends at the same node. Choose two different nodes.');
    return;
  }
  const ends = memberEnds(document, member);
  if (!ends) return;
  if (norm(subtract(ends[1], ends[0])) < NO_LENGTH) {
    const arms = (member.startArm ?? member.endArm) ? ' (arms included)' : '';
    about.refuse(
      'end',
      `its two ends${arms} are at the same place, so it has no length. Move one of them.`,
    );
    return;
  }
  if (member.kind === 'beam' && memberAxes(ends[0], ends[1], member.roll).nearlyUpright) {
    about.warn(
      '',
      'it is nearly but not quite upright, where a small move turns its section by a quarter turn. Check how its section lies, or make it upright.',
    );
  }
}

function checkBarJoints(member: Member, about: EntryFindings): void {
  if (member.kind !== 'bar') return;
  for (const end of ['start', 'end'] as const) {
    const joint = member.joints?.[end];
    if (!joint) continue;
    const idle = (['rx', 'ry', 'rz'] as const).filter((d) => joint[d] !== undefined);
    if (idle.length > 0) {
      about.warn(
        `joints.${end}`,
        `a bar carries no rotation, so its joint on ${idle.join(', ')} is ignored.`,
      );
    }
  }
}

function checkPlanarity(
  document: FormedDocument,
  set: UnknownSet,
  member: Member,
  about: EntryFindings,
): void {
  for (const field of ['startArm', 'endArm'] as const) {
    const arm = member[field];
    const off = arm ? outOfPlane(set, arm) : '';
    if (off !== '') {
      about.refuse(
        field,
        `with the unknowns ${set.words}, its arm may not reach along ${off}. Set that part to 0, or choose all six unknowns.`,
      );
    }
  }
  const turns = quarterTurns(member.roll);
  if (member.kind === 'beam') checkRoll(document, set, member, turns, about);
  for (const end of ['start', 'end'] as const) {
    const joint = member.joints?.[end];
    if (!joint) continue;
    const outside = DISPLACEMENTS.filter(
      (d) => joint[d] !== undefined && !memberDisplacementInSet(set, d, turns ?? 0),
    );
    if (outside.length > 0) {
      about.warn(
        `joints.${end}`,
        `its joint on ${outside.join(', ')} is ignored, since the unknowns are only ${set.words}.`,
      );
    }
  }
}

/** A roll may not couple bending in the plane with bending out of it. Pure stretching does not mind it. */
function checkRoll(
  document: FormedDocument,
  set: UnknownSet,
  member: Member,
  turns: number | null,
  about: EntryFindings,
): void {
  if (!set.has('ry')) return;
  const jointed = [member.joints?.start, member.joints?.end].some(
    (joint) => joint && (['v', 'w', 'ry', 'rz'] as const).some((d) => joint[d] !== undefined),
  );
  const section = document.sections.find(member.section);
  const material = document.materials.find(member.material);
  if (!section || !material) return;
  const properties = sectionProperties(section.shape, poissonRatio(material));
  const couples =
    couplesPlanes(properties, member.roll, member.theory === 'timoshenko') ||
    (turns === null && jointed);
  if (!couples) return;
  if (member.roll === 0) {
    about.warn(
      'section',
      `its section couples the X–Z plane with sideways motion, which the unknowns ${set.words} hold still.`,
    );
  } else {
    about.refuse(
      'roll',
      `with the unknowns ${set.words}, its roll would couple the X–Z plane with sideways motion. Turn it by quarter turns, or choose all six unknowns.`,
    );
  }
}

/** Whether the tensors of bending and shear, turned by `roll`, have an off-diagonal part. */
function couplesPlanes(section: SectionProperties, roll: number, shear: boolean): boolean {
  const { Iy, Iz, Iyz, ky, kz } = section;
  const sin = Math.sin(2 * roll);
  const cos = Math.cos(2 * roll);
  const bending = Math.abs(Iyz * cos + ((Iy - Iz) / 2) * sin);
  if (bending > COUPLING_TOLERANCE * (Iy + Iz)) return true;
  return shear && Math.abs((ky - kz) * sin) > COUPLING_TOLERANCE * (ky + kz);
}
