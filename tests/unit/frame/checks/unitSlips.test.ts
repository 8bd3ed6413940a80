import { describe, expect, it } from 'vitest';

import { checkDocument } from '#shared/frame/checkDocument.ts';
import { standardMaterials } from '#shared/frame/materials.ts';
import { sectionShelf } from '#shared/frame/shelf.ts';
import { aCantilever, aStand, type FrameInput, type FrameOptions } from '#tests/builders/aFrame.ts';

function warningsOf(input: FrameInput): string[] {
  const { errors, warnings } = checkDocument(input);
  expect(errors).toEqual([]);
  return warnings.map(({ path, message }) => `${path} | ${message}`);
}

const quietStand = () => aStand({ mass: 5, massHeight: 0 });

describe('coordinates', () => {
  const scaled = (factor: number) => {
    const stand = quietStand();
    for (const node of stand.nodes) {
      node.x *= factor;
      node.y! *= factor;
      node.z *= factor;
    }
    return stand;
  };

  it('of 1.2 m typed in mm: one warning, not one for all that follows', () => {
    expect(warningsOf(scaled(1000))).toEqual([
      'nodes | The frame measures 1200 m from end to end. Were its coordinates typed in mm? Then enter 1.2 m.',
    ]);
  });

  it('of 1.2 m typed where mm are shown', () => {
    expect(warningsOf(scaled(1e-3)).join()).toContain(
      'The frame measures 1.2 mm from end to end. Were its coordinates typed in m where mm are shown? Then enter 1.2 m.',
    );
  });

  it('of 500, which may be either', () => {
    expect(warningsOf(scaled(500 / 1.2)).join()).toContain(
      'Were its coordinates typed in mm or in inches? Then enter 500 mm or 12.7 m.',
    );
  });

  it.each([0.1, 1, 10, 40])('of a stand ×%d pass', (factor) => {
    expect(warningsOf(scaled(factor)).filter((text) => text.startsWith('nodes'))).toEqual([]);
  });
});

// Structural steel: E 210 GPa = 30.46e6 psi, 7850 kg/m³ = 0.2836 lbm/in³ (factors of NIST SP 811).
describe('materials', () => {
  const withSteel = (changes: NonNullable<FrameOptions['material']>) =>
    warningsOf(aCantilever({ material: changes }));

  it.each([
    [210, 'GPa', '210 GPa'],
    [210e3, 'MPa', '210 GPa'],
    [30.46e6, 'psi', '210 GPa'],
    [210e12, 'MPa where GPa are shown', '210 GPa'],
  ])('E of steel as %d, typed in %s', (E, unit, right) => {
    const lines = withSteel({ E });
    expect(lines).toHaveLength(1);
    expect(lines[0]).toMatch(/^materials\.0\.E \| Material Structural steel \(“steel”\): E is /);
    expect(lines[0]).toContain(`Was it typed in ${unit}? Then enter ${right}.`);
  });

  it.each([
    [7.85, 'g/cm³'],
    [7.85e-6, 'kg/mm³'],
    [7.85e-9, 't/mm³'],
    [0.2836, 'lbm/in³'],
    [7.85e6, 'g/m³'],
  ])('density of steel as %d, typed in %s', (density, unit) => {
    const lines = withSteel({ density });
    expect(lines).toHaveLength(1);
    expect(lines[0]).toContain('materials.0.density');
    expect(lines[0]).toContain(`Was it typed in ${unit}? Then enter 7850 kg/m³.`);
  });

  it('where several units make sense, all are named; where none does, none', () => {
    expect(withSteel({ E: 30_000 }).join()).toContain(
      'typed in MPa or in ksi? Then enter 30 GPa or 206.8 GPa.',
    );
    expect(withSteel({ density: 29 }).join()).toContain('Check its unit.');
  });
});

describe('sections', () => {
  const withShape = (shape: FrameInput['sections'][number]['shape'], length = 1) =>
    warningsOf(aCantilever({ shape, length }));

  it('a tube of 100×100×5 typed in mm', () => {
    const lines = withShape({
      kind: 'rectangular-tube',
      width: 100,
      height: 100,
      wall: 5,
      radius: 10,
    });
    expect(lines).toEqual([
      'sections.0.shape.width | Section Tube (“tube”): its width is 100 m. Was it typed in mm? Then enter 100 mm.',
      'sections.0.shape.height | Section Tube (“tube”): its height is 100 m. Was it typed in mm? Then enter 100 mm.',
      'sections.0.shape.wall | Section Tube (“tube”): its wall is 5 m. Was it typed in mm? Then enter 5 mm.',
    ]);
  });

  it('a rod of 20 mm typed as 0.02 where mm are shown', () => {
    const lines = withShape({ kind: 'solid-round', diameter: 2e-5 });
    expect(lines).toHaveLength(1);
    expect(lines[0]).toContain('typed in m where mm are shown? Then enter 20 mm.');
  });

  // SHS 100×5 of EN 10219: A 18.356 cm², I 271.10 cm⁴, I_t 440.5 cm⁴ (domain table).
  const right = { kind: 'custom', A: 18.356e-4, Iy: 271.1e-8, Iz: 271.1e-8, J: 440.5e-8 } as const;
  const custom = (changes: Partial<Record<'A' | 'Iy' | 'Iz' | 'J', number>>) =>
    withShape({ ...right, ky: 0.44, kz: 0.44, ...changes }).map((text) =>
      text.replace(' Section Tube (“tube”): ', ' '),
    );

  it('stated as the table has them: none', () => {
    expect(custom({})).toEqual([]);
  });

  it('stated in cm, one figure or all', () => {
    expect(custom({ A: 18.356 })).toEqual([
      'sections.0.shape.A | its area is 18.36 m². Was it typed in cm²? Then enter 18.36 cm².',
    ]);
    expect(custom({ Iz: 271.1 })).toEqual([
      'sections.0.shape.Iz | its Iz of 271.1 m⁴ makes a radius of gyration √(Iz/A) of 384.3 m. Was it typed in cm⁴? Then enter 271.1 cm⁴.',
    ]);
    expect(custom({ J: 440.5 })).toEqual([
      'sections.0.shape.J | its J of 440.5 m⁴ is larger than Iy + Iz, as no section’s is. Was it typed in cm⁴? Then enter 440.5 cm⁴.',
    ]);
    expect(custom({ A: 18.356, Iy: 271.1, Iz: 271.1, J: 440.5 })).toHaveLength(4);
  });

  it('stated in mm⁴', () => {
    expect(custom({ Iy: 2.711e6 }).join()).toContain('Was it typed in mm⁴? Then enter 271.1 cm⁴.');
  });

  it('a beam far too slender, and one far too stocky', () => {
    // A round rod has i = d/4.
    const slender = withShape({ kind: 'solid-round', diameter: 9e-4 });
    expect(slender).toHaveLength(1);
    expect(slender[0]).toMatch(
      /^sections\.0\.shape .*member “arm” .* 1 m long, 4440 times .*\(0\.225 mm\)/,
    );
    const stocky = withShape({ kind: 'solid-round', diameter: 0.8 }, 0.09);
    expect(stocky).toHaveLength(1);
    expect(stocky[0]).toContain('0.45 times its least radius of gyration (200 mm); it is no beam');
    expect(withShape({ kind: 'solid-round', diameter: 5e-3 })).toEqual([]);
  });
});

describe('total mass', () => {
  it('a motor of 120 kg typed in g', () => {
    const lines = warningsOf(aStand({ mass: 120_000, massHeight: 0 }));
    // A cube of steel of 1.2 m: 7850 × 1.728 = 13,565 kg.
    expect(lines.filter((text) => !text.includes('inertia'))).toEqual([
      'masses.0.mass | Mass Motor (“motor”): with its 120000 kg the frame weighs more than 3 solid cubes of steel as wide as all of it (1.2 m, 13560 kg each). Was it typed in g? Then enter 120 kg.',
    ]);
  });

  it('not a heavy machine that says how large it is', () => {
    const stand = aStand({ mass: 60_000, massHeight: 0 });
    // An even cube of 3 m: m a²/6 about every axis.
    stand.masses[0]!.inertia = { Ixx: 9e4, Iyy: 9e4, Izz: 9e4 };
    expect(warningsOf(stand)).toEqual([]);
  });

  it('cladding of 8 kg/m typed in g/m, and members that weigh next to nothing', () => {
    const clad = quietStand();
    for (const member of clad.members) member.massPerLength = 8000;
    expect(warningsOf(clad).join()).toMatch(/^members \| The frame weighs .*Check the units/);
    const light = aCantilever({
      shape: { kind: 'solid-round', diameter: 1.1e-3 },
      material: { density: 950 },
    });
    // Beams as thin as that are told to be too slender; a bar may be a wire.
    light.members[0]!.kind = 'bar';
    expect(warningsOf(light).join()).toContain('less than 1 g per metre of its members');
  });
});

it('every section of the shelf in every standard material, 0.2 m to 6 m long, passes', () => {
  for (const { shape } of sectionShelf()) {
    for (const { E, nu, density } of standardMaterials()) {
      for (const length of [0.2, 6]) {
        const material = { E, nu: nu!, density };
        expect(warningsOf(aCantilever({ shape, material, length }))).toEqual([]);
      }
    }
  }
});
