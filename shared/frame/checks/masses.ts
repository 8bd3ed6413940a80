import type { Inertia, PointMass } from '../../schemas/frameDocument.ts';
import { poissonRatio } from '../materialProperties.ts';
import { sectionProperties } from '../sectionProperties.ts';
import { norm, subtract } from '../vector3.ts';
import type { EntryFindings, Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';
import { memberEnds } from './members.ts';
import { checkNodeReference } from './nodes.ts';
import { FLAT_TOLERANCE, outOfPlane, type UnknownSet } from './reducedSet.ts';

/** From this mass on [kg], a mass without inertia draws a warning … */
export const HEAVY_MASS_KG = 50;
/** … and from this share of the whole frame's mass. */
export const HEAVY_MASS_SHARE = 0.1;

/** Inertias typed with six digits may miss the exact limits by this share of their trace. */
const INERTIA_SLACK = 1e-6;

/** Masses stand on nodes, have a possible inertia, and stay within a reduced set; the frame has any mass. */
export function checkMasses(document: FormedDocument, set: UnknownSet, findings: Findings): void {
  const total = totalMass(document);
  document.masses.entries.forEach((mass, place) => {
    if (!mass) return;
    const about = findings.about('masses', place, mass);
    checkNodeReference(document, mass.node, 'node', 'node', about);
    if (set.reduced) checkMassPlanarity(mass, set, about);
    if (mass.inertia) checkInertia(mass.inertia, about);
    else warnWithoutInertia(mass, total, about);
  });
}

/** Mass of members and point masses together [kg], as far as the document can be read. */
export function totalMass(document: FormedDocument): number {
  const perMetre = new Map<string, number>();
  let total = 0;
  for (const member of document.members.entries) {
    if (!member) continue;
    const ends = memberEnds(document, member);
    const key = `${member.section}\n${member.material}`;
    let own = perMetre.get(key);
    if (own === undefined) {
      const section = document.sections.find(member.section);
      const material = document.materials.find(member.material);
      own =
        section && material
          ? sectionProperties(section.shape, poissonRatio(material)).A * material.density
          : 0;
      perMetre.set(key, own);
    }
    if (ends) total += (own + member.massPerLength) * norm(subtract(ends[1], ends[0]));
  }
  for (const mass of document.masses.entries) total += mass?.mass ?? 0;
  return total;
}

function warnWithoutInertia(mass: PointMass, total: number, about: EntryFindings): void {
  const reasons: string[] = [];
  if (norm(mass.offset) > FLAT_TOLERANCE) reasons.push('it stands off its node');
  if (mass.mass >= HEAVY_MASS_KG) reasons.push(`it weighs ${HEAVY_MASS_KG} kg or more`);
  else if (mass.mass >= HEAVY_MASS_SHARE * total) {
    reasons.push(`it is ${HEAVY_MASS_SHARE * 100} % of the whole frame or more`);
  }
  if (reasons.length === 0) return;
  about.warn(
    'inertia',
    `${reasons.join(' and ')}, but has no inertia of its own. Without it, modes in which it turns come out too high.`,
  );
}

export function checkMassPlanarity(
  mass: Pick<PointMass, 'offset' | 'inertia'>,
  set: UnknownSet,
  about: EntryFindings,
  path = '',
): void {
  const off = outOfPlane(set, mass.offset);
  if (off !== '') {
    about.refuse(
      `${path}offset`,
      `with the unknowns ${set.words}, its offset along ${off} has to be 0. Set it to 0, or choose all six unknowns.`,
    );
  }
  const { Ixy = 0, Iyz = 0 } = mass.inertia ?? {};
  if (set.has('ry') && (Ixy !== 0 || Iyz !== 0)) {
    about.refuse(
      'inertia',
      `with the unknowns ${set.words}, its Ixy and Iyz would couple out of the X–Z plane. Set them to 0, or choose all six unknowns.`,
    );
  }
}

/**
 * A body's inertia tensor is positive semidefinite, and no principal moment exceeds the sum of the other
 * two: ½ tr(I)·1 − I, the tensor of ∫r rᵀ dm, is positive semidefinite as well.
 */
function checkInertia(inertia: Inertia, about: EntryFindings): void {
  const { Ixx, Iyy, Izz, Ixy = 0, Ixz = 0, Iyz = 0 } = inertia;
  const half = (Ixx + Iyy + Izz) / 2;
  if (!isPositiveSemidefinite(Ixx, Iyy, Izz, Ixy, Ixz, Iyz)) {
    about.refuse(
      'inertia',
      'no real body has this inertia: its products are too large beside Ixx, Iyy and Izz. Check them and their signs.',
    );
  } else if (!isPositiveSemidefinite(half - Ixx, half - Iyy, half - Izz, -Ixy, -Ixz, -Iyz)) {
    about.refuse(
      'inertia',
      'no real body has this inertia: one principal moment is larger than the other two together. Check Ixx, Iyy and Izz.',
    );
  }
}

/** All principal minors of a symmetric 3×3 matrix are ≥ 0, within INERTIA_SLACK of its trace. */
function isPositiveSemidefinite(
  a: number,
  b: number,
  c: number,
  ab: number,
  ac: number,
  bc: number,
): boolean {
  const size = Math.abs(a) + Math.abs(b) + Math.abs(c) + Math.abs(ab) + Math.abs(ac) + Math.abs(bc);
  const slack = INERTIA_SLACK * size;
  if (a < -slack || b < -slack || c < -slack) return false;
  const pair = Math.min(a * b - ab ** 2, a * c - ac ** 2, b * c - bc ** 2);
  if (pair < -slack * size) return false;
  const determinant = a * (b * c - bc ** 2) - ab * (ab * c - bc * ac) + ac * (ab * bc - b * ac);
  return determinant >= -slack * size ** 2;
}
