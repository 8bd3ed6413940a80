import type { SectionShape } from '../../schemas/frameDocument.ts';
import { formatNumber } from '../../units/formatQuantity.ts';
import type { EntryFindings, Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';
import { askUnit, isWithin, likelySlips, showLength } from './unitSlip.ts';
import type { Range, Slip } from './unitSlip.ts';

/** Outer dimension [m]: from thin wire to the deepest plate girders (common practice). */
const POSSIBLE_SIZE: Range = { least: 5e-4, most: 3 };
const USUAL_SIZE: Range = { least: 5e-3, most: 0.6 };
/** Wall, web or flange [m]: from foil on. */
const POSSIBLE_WALL: Range = { least: 1e-4, most: 3 };
const USUAL_WALL: Range = { least: 5e-4, most: 0.1 };
const LENGTH_SLIPS: readonly Slip[] = [
  { unit: 'mm', factor: 1e-3 },
  { unit: 'inches', factor: 0.0254 },
  { unit: 'm where mm are shown', factor: 1e3 },
];

/** Area [m²]: from thin wire to a solid block of one metre. */
const POSSIBLE_AREA: Range = { least: 1e-6, most: 1 };
const USUAL_AREA: Range = { least: 2e-5, most: 0.1 };
const AREA_SLIPS: readonly Slip[] = [
  { unit: 'mm²', factor: 1e-6 },
  { unit: 'cm²', factor: 1e-4 },
  { unit: 'm² where cm² are shown', factor: 1e4 },
  { unit: 'm² where mm² are shown', factor: 1e6 },
];

/** Radius of gyration √(I/A) [m]: below half the outer dimension of any section. */
const POSSIBLE_RADIUS: Range = { least: 1e-4, most: 1.5 };
const USUAL_RADIUS: Range = { least: 1e-3, most: 0.3 };
const MOMENT_SLIPS: readonly Slip[] = [
  { unit: 'mm⁴', factor: 1e-12 },
  { unit: 'cm⁴', factor: 1e-8 },
  { unit: 'm⁴ where cm⁴ are shown', factor: 1e8 },
  { unit: 'm⁴ where mm⁴ are shown', factor: 1e12 },
];
/** J over Iy + Iz: least of open thin sections; 1, which none exceeds, of round ones (Saint-Venant). */
const USUAL_TORSION: Range = { least: 1e-4, most: 1 };
const ROUNDED_TORSION = 1.01;

type Custom = Extract<SectionShape, { kind: 'custom' }>;

/** Warns of sections whose sizes are no section's; returns the ids of those. */
export function checkSectionUnits(document: FormedDocument, findings: Findings): Set<string> {
  const slipped = new Set<string>();
  document.sections.entries.forEach((section, place) => {
    if (!section) return;
    const about = findings.about('sections', place, section);
    const { shape } = section;
    const any = shape.kind === 'custom' ? checkStated(shape, about) : checkSizes(shape, about);
    if (any) slipped.add(section.id);
  });
  return slipped;
}

function checkSizes(shape: Exclude<SectionShape, Custom>, about: EntryFindings): boolean {
  let slipped = false;
  for (const [field, metres] of Object.entries(shape)) {
    if (typeof metres !== 'number' || field === 'radius' || field === 'innerRadius') continue;
    const outer = field === 'width' || field === 'height' || field === 'diameter';
    if (isWithin(metres, outer ? POSSIBLE_SIZE : POSSIBLE_WALL)) continue;
    slipped = true;
    const likely = likelySlips(metres, LENGTH_SLIPS, outer ? USUAL_SIZE : USUAL_WALL);
    const question = askUnit(metres, likely, showLength);
    about.warn(`shape.${field}`, `its ${field} is ${showLength(metres)}. ${question}`);
  }
  return slipped;
}

/** Area and second moments have to fit each other, and J both moments. */
function checkStated({ A, Iy, Iz, J }: Custom, about: EntryFindings): boolean {
  let slipped = false;
  const warn = (field: string, what: string, question: string) => {
    slipped = true;
    about.warn(`shape.${field}`, `${what}. ${question}`);
  };
  let area = A;
  if (!isWithin(A, POSSIBLE_AREA)) {
    const likely = likelySlips(A, AREA_SLIPS, USUAL_AREA);
    area *= likely[0]?.factor ?? 1;
    const show = (value: number) => `${formatNumber(value * 1e4, 4)} cm²`;
    warn('A', `its area is ${formatNumber(A, 4)} m²`, askUnit(A, likely, show));
  }
  const showMoment = (value: number) => `${formatNumber(value * 1e8, 4)} cm⁴`;
  const areaOf = (radius: Range): Range => ({
    least: area * radius.least ** 2,
    most: area * radius.most ** 2,
  });
  const moments = Object.entries({ Iy, Iz }).map(([field, moment]) => {
    if (isWithin(moment, areaOf(POSSIBLE_RADIUS))) return moment;
    const likely = likelySlips(moment, MOMENT_SLIPS, areaOf(USUAL_RADIUS));
    const radius = showLength(Math.sqrt(moment / area));
    const what = `its ${field} of ${formatNumber(moment, 4)} m⁴ makes a radius of gyration √(${field}/A) of ${radius}`;
    warn(field, what, askUnit(moment, likely, showMoment));
    return moment * (likely[0]?.factor ?? 1);
  });
  const both = moments[0]! + moments[1]!;
  if (J > ROUNDED_TORSION * both) {
    const usual = { least: USUAL_TORSION.least * both, most: USUAL_TORSION.most * both };
    const question = askUnit(J, likelySlips(J, MOMENT_SLIPS, usual), showMoment);
    warn(
      'J',
      `its J of ${formatNumber(J, 4)} m⁴ is larger than Iy + Iz, as no section’s is`,
      question,
    );
  }
  return slipped;
}
