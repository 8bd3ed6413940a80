import type { Member, PointMass, Section } from '../../schemas/frameDocument.ts';
import { formatNumber } from '../../units/formatQuantity.ts';
import { poissonRatio } from '../materialProperties.ts';
import { sectionProperties } from '../sectionProperties.ts';
import { norm, subtract } from '../vector3.ts';
import { mentionEntry } from './findings.ts';
import type { Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';
import { totalMass } from './masses.ts';
import { checkMaterialUnits } from './materialUnits.ts';
import { memberEnds } from './members.ts';
import type { UnknownSet } from './reducedSet.ts';
import { checkSectionUnits } from './sectionUnits.ts';
import { askUnit, isWithin, likelySlips, showLength } from './unitSlip.ts';
import type { Range, Slip } from './unitSlip.ts';

/** [m] The longest edge of the box around a machine frame: from instrument stands to cranes (common practice). */
const POSSIBLE_EXTENT: Range = { least: 0.02, most: 100 };
const USUAL_EXTENT: Range = { least: 0.05, most: 20 };
const COORDINATE_SLIPS: readonly Slip[] = [
  { unit: 'mm', factor: 1e-3 },
  { unit: 'inches', factor: 0.0254 },
  { unit: 'm where mm are shown', factor: 1e3 },
];

/**
 * Length of a beam over its least radius of gyration. Practice stays under 200 for struts and 400 for ties; mm taken
 * for m, or inches, multiply or divide what is usual by 1000 or 39. Bars, whose bending plays no part, may be wires.
 */
const SLENDEREST = 1000;
/** The longest beam of a section over its radius: shorter stubs than half the radius are no beams. */
const STOCKIEST = 0.5;

/** Density of the block of steel that masses are held against [kg/m³]. */
const STEEL = 7850;
/** Cubes of steel, as wide as all there is: frames weigh hundredths of one, and grams taken for kilograms several. */
const HEAVIEST_CUBES = 3;
/** [kg/m] A steel wire of 0.4 mm weighs as much. */
const LIGHTEST_PER_METRE = 1e-3;

/**
 * Warns where another system of units was likely typed: sizes of sections, moduli, densities, the extent of the whole,
 * slenderness, total mass. One slip has one warning: what follows from a value already named is not told again.
 */
export function checkUnitSlips(
  document: FormedDocument,
  set: UnknownSet,
  findings: Findings,
): void {
  const material = checkMaterialUnits(document, findings);
  const sections = checkSectionUnits(document, findings);
  if (checkExtent(document, findings)) return;
  const slender = set.has('ry') && checkSlenderness(document, sections, findings);
  if (!material && !slender && sections.size === 0) checkTotalMass(document, findings);
}

function checkExtent(document: FormedDocument, findings: Findings): boolean {
  const extent = widthOf(document, []);
  if (extent === 0 || isWithin(extent, POSSIBLE_EXTENT)) return false;
  const likely = likelySlips(extent, COORDINATE_SLIPS, USUAL_EXTENT);
  const question = askUnit(extent, likely, showLength, 'Were its coordinates typed');
  findings.warn('nodes', `The frame measures ${showLength(extent)} from end to end. ${question}`);
  return true;
}

/** Longest edge of the box around all nodes and the bodies of some masses [m]. */
function widthOf(document: FormedDocument, masses: readonly (PointMass | undefined)[]): number {
  const least = [Infinity, Infinity, Infinity];
  const most = [-Infinity, -Infinity, -Infinity];
  const include = (axis: number, from: number, to: number) => {
    least[axis] = Math.min(least[axis]!, from);
    most[axis] = Math.max(most[axis]!, to);
  };
  for (const node of document.nodes.entries) {
    if (node) [node.x, node.y, node.z].forEach((at, axis) => include(axis, at, at));
  }
  for (const body of masses) {
    const node = body && document.nodes.find(body.node);
    if (!body || !node) continue;
    const { Ixx, Iyy, Izz } = body.inertia ?? { Ixx: 0, Iyy: 0, Izz: 0 };
    const radius = Math.sqrt(Math.max(Ixx, Iyy, Izz) / body.mass);
    [node.x, node.y, node.z].forEach((at, axis) => {
      const centre = at + body.offset[axis]!;
      include(axis, centre - radius, centre + radius);
    });
  }
  return Math.max(0, ...most.map((value, axis) => value - least[axis]!));
}

interface Longest {
  readonly member: Member;
  readonly length: number;
}

function checkSlenderness(
  document: FormedDocument,
  told: ReadonlySet<string>,
  findings: Findings,
): boolean {
  const longest = longestBeams(document);
  let slipped = false;
  document.sections.entries.forEach((section, place) => {
    const found = section && !told.has(section.id) && longest.get(section.id);
    if (!found) return;
    const radius = leastRadius(document, section, found.member);
    const ratio = found.length / radius;
    if (radius === 0 || (ratio <= SLENDEREST && ratio >= STOCKIEST)) return;
    slipped = true;
    const member = mentionEntry('members', found.member);
    const figures = `${member} of this section is ${showLength(found.length)} long, ${formatNumber(ratio, 3)} times its least radius of gyration (${showLength(radius)})`;
    const practice =
      ratio > SLENDEREST
        ? 'practice stays under 200 for struts and 400 for ties. Was its size typed in m where mm are shown, or were the coordinates typed in inches or mm?'
        : 'it is no beam then. Was its size typed in mm or inches, or were the coordinates typed in m where mm are shown?';
    findings
      .about('sections', place, section)
      .warn('shape', `${figures}; ${practice} Correct the one that slipped.`);
  });
  return slipped;
}

/** The longest beam of each section. */
function longestBeams(document: FormedDocument): Map<string, Longest> {
  const longest = new Map<string, Longest>();
  for (const member of document.members.entries) {
    const ends = member?.kind === 'beam' && memberEnds(document, member);
    if (!member || !ends) continue;
    const length = norm(subtract(ends[1], ends[0]));
    if (length > (longest.get(member.section)?.length ?? 0)) {
      longest.set(member.section, { member, length });
    }
  }
  return longest;
}

/** √(I/A) about the weaker principal axis [m]; 0 where the document does not say. */
function leastRadius(document: FormedDocument, section: Section, member: Member): number {
  const material = document.materials.find(member.material);
  if (!material) return 0;
  const { A, Iy, Iz, Iyz } = sectionProperties(section.shape, poissonRatio(material));
  const least = (Iy + Iz) / 2 - Math.hypot((Iy - Iz) / 2, Iyz);
  return least > 0 && A > 0 ? Math.sqrt(least / A) : 0;
}

function checkTotalMass(document: FormedDocument, findings: Findings): void {
  const { members, masses } = document;
  const total = totalMass(document);
  let metres = 0;
  for (const member of members.entries) {
    const ends = member && memberEnds(document, member);
    if (ends) metres += norm(subtract(ends[1], ends[0]));
  }
  if (!(metres > 0)) return;
  const weighs = `The frame weighs ${formatNumber(total, 4)} kg in all`;
  if (total < LIGHTEST_PER_METRE * metres) {
    findings.warn(
      'members',
      `${weighs}, less than 1 g per metre of its members. Check the units of densities, sections and masses: kg/m³, m and kg.`,
    );
    return;
  }
  const width = widthOf(document, masses.entries);
  const cube = STEEL * width ** 3;
  if (total <= HEAVIEST_CUBES * cube) return;
  const beside = `more than ${HEAVIEST_CUBES} solid cubes of steel as wide as all of it (${showLength(width)}, ${formatNumber(cube, 4)} kg each)`;
  const place = masses.entries.findIndex((mass) => mass && mass.mass > total / 2);
  const heaviest = masses.entries[place];
  if (!heaviest) {
    findings.warn(
      'members',
      `${weighs}, ${beside}. Check the units of masses, masses per metre and densities: kg, kg/m and kg/m³.`,
    );
    return;
  }
  const kilograms = `${formatNumber(heaviest.mass, 4)} kg`;
  findings
    .about('masses', place, heaviest)
    .warn(
      'mass',
      `with its ${kilograms} the frame weighs ${beside}. Was it typed in g? Then enter ${formatNumber(heaviest.mass / 1e3, 4)} kg.`,
    );
}
