import type { Material } from '../schemas/frameDocument.ts';
import { fromGigapascals } from '../units/quantities.ts';

/**
 * The usual materials of machine frames. `basis` says where the figures come from and how far they spread.
 * A fresh list on every call. G is left to E and ν where the source gives ν.
 */
export function standardMaterials(): Material[] {
  return [
    {
      id: 'steel',
      name: 'Structural steel',
      E: fromGigapascals(210),
      nu: 0.3,
      density: 7850,
      basis: 'EN 1993-1-1 §3.2.6: E 210 GPa, ν 0.3 (G ≈ 81 GPa); 7850 kg/m³.',
    },
    {
      id: 'stainless',
      name: 'Austenitic stainless steel',
      E: fromGigapascals(200),
      nu: 0.3,
      density: 7900,
      basis:
        'Common values: E 200 GPa, ν 0.3, 7900 kg/m³. Check against your copy of the standard.',
    },
    {
      id: 'aluminium',
      name: 'Aluminium, 6000 series',
      E: fromGigapascals(70),
      nu: 0.3,
      density: 2700,
      basis:
        'EN 1999-1-1: E 70 GPa, ν 0.3 (G ≈ 27 GPa), 2700 kg/m³. Check against your copy of the standard.',
    },
    {
      id: 'grey iron',
      name: 'Grey cast iron EN-GJL-250',
      E: fromGigapascals(110),
      nu: 0.26,
      density: 7200,
      basis:
        'Common values: E 103 to 118 GPa, falling with section thickness; the middle is taken here. ν 0.26, 7200 kg/m³.',
    },
    {
      id: 'mineral casting',
      name: 'Mineral casting',
      E: fromGigapascals(40),
      nu: 0.25,
      density: 2350,
      basis:
        'Makers give E 35 to 45 GPa and 2300 to 2400 kg/m³; the middle is taken here. ν 0.25 is an assumption: ask your maker.',
    },
  ];
}
