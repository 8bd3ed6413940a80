import { formatNumber } from '../../units/formatQuantity.ts';
import type { Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';
import { askUnit, isWithin, likelySlips } from './unitSlip.ts';
import type { Range, Slip } from './unitSlip.ts';

/** [Pa] From soft plastics to diamond, which nothing exceeds (textbook values). */
const POSSIBLE_E: Range = { least: 1e8, most: 1.3e12 };
/** [Pa] What frames are made of: from timber to steel. */
const USUAL_E: Range = { least: 5e9, most: 2.5e11 };
const E_SLIPS: readonly Slip[] = [
  { unit: 'GPa', factor: 1e9 },
  { unit: 'MPa', factor: 1e6 },
  { unit: 'psi', factor: 6894.757 },
  { unit: 'ksi', factor: 6.894757e6 },
  { unit: 'MPa where GPa are shown', factor: 1e-3 },
];

/** [kg/m³] From foam to more than osmium, 22,600, the densest metal (textbook value). */
const POSSIBLE_DENSITY: Range = { least: 30, most: 25_000 };
/** [kg/m³] From light timber to tungsten. */
const USUAL_DENSITY: Range = { least: 300, most: 20_000 };
const DENSITY_SLIPS: readonly Slip[] = [
  { unit: 'g/cm³', factor: 1e3 },
  { unit: 'lbm/in³', factor: 27_679.9 },
  { unit: 'kg/mm³', factor: 1e9 },
  { unit: 't/mm³', factor: 1e12 },
  { unit: 'g/m³', factor: 1e-3 },
  { unit: 'kg/m³ where lbm/in³ are shown', factor: 1 / 27_679.9 },
];

const showModulus = (E: number) =>
  E < 1e6 ? `${formatNumber(E, 4)} Pa` : `${formatNumber(E / 1e9, 4)} GPa`;
const perCubicMetre = (density: number) => `${formatNumber(density, 4)} kg/m³`;

/** Warns of a modulus or a density that no solid has; returns whether there was any. */
export function checkMaterialUnits(document: FormedDocument, findings: Findings): boolean {
  let slipped = false;
  document.materials.entries.forEach((material, place) => {
    if (!material) return;
    const about = findings.about('materials', place, material);
    const { E, density } = material;
    if (!isWithin(E, POSSIBLE_E)) {
      slipped = true;
      const question = askUnit(E, likelySlips(E, E_SLIPS, USUAL_E), showModulus);
      about.warn('E', `E is ${showModulus(E)}, but solids have 0.1 to 1300 GPa. ${question}`);
    }
    if (!isWithin(density, POSSIBLE_DENSITY)) {
      slipped = true;
      const likely = likelySlips(density, DENSITY_SLIPS, USUAL_DENSITY);
      const question = askUnit(density, likely, perCubicMetre);
      about.warn(
        'density',
        `its density is ${perCubicMetre(density)}, but solids have 30 to 25000 kg/m³. ${question}`,
      );
    }
  });
  return slipped;
}
