import { poissonRatio } from '../materialProperties.ts';
import type { Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';

/** Share by which a stated G may differ from E/2(1+ν) before the document page asks for a warning. */
const MODULUS_DISAGREEMENT = 0.02;

/** ν or G is there, both agree, and G alone implies a possible ν. */
export function checkMaterials(document: FormedDocument, findings: Findings): void {
  document.materials.entries.forEach((material, place) => {
    if (!material) return;
    const about = findings.about('materials', place, material);
    const { E, nu, G } = material;
    if (nu === undefined && G === undefined) {
      about.refuse(
        'nu',
        'neither Poisson’s ratio ν nor the shear modulus G is given. Give one of them.',
      );
      return;
    }
    if (nu !== undefined && G !== undefined) {
      const implied = E / (2 * (1 + nu));
      const difference = Math.abs(G - implied) / implied;
      if (difference > MODULUS_DISAGREEMENT) {
        about.warn(
          'G',
          `G is ${(difference * 100).toFixed(0)} % away from E/2(1+ν) = ${(implied / 1e9).toPrecision(3)} GPa. G is used for shear and torsion as stated.`,
        );
      }
      return;
    }
    const implied = poissonRatio(material);
    if (implied <= -1 || implied >= 0.5) {
      about.refuse(
        'G',
        `E and G imply a Poisson’s ratio of ${implied.toPrecision(3)}, which is outside −1 to 0.5. Correct one of them, or state ν as well.`,
      );
    }
  });
}
