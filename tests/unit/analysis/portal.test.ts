import { describe, expect, it } from 'vitest';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { omegas, worstError } from '#tests/builders/aLine.ts';

type Base = 'fixed' | 'pinned';

/** Legs of 1 m, EI = m = 1; EA = 10⁸ keeps the lengths to 1e-7 of ω, so that ω is ω√(mL⁴/EI). */
function portal(base: Base, width: number, divisions: number): FrameInput {
  const beam = (id: string, start: string, end: string) => ({
    id,
    kind: 'beam' as const,
    start,
    end,
    material: 'unit',
    section: 'stiff',
    divisions,
    theory: 'bernoulli' as const,
  });
  return {
    name: 'Portal',
    unknowns: ['u', 'w', 'ry'],
    materials: [{ id: 'unit', name: 'Unit', E: 1, nu: 0, density: 1e-8 }],
    sections: [
      {
        id: 'stiff',
        name: 'Stiff',
        shape: { kind: 'custom', A: 1e8, Iy: 1, Iz: 1, J: 2, ky: 1, kz: 1 },
      },
    ],
    nodes: [
      { id: 'a', x: 0, z: 0 },
      { id: 'b', x: 0, z: 1 },
      { id: 'c', x: width, z: 1 },
      { id: 'd', x: width, z: 0 },
    ],
    members: [beam('left', 'a', 'b'), beam('rail', 'b', 'c'), beam('right', 'd', 'c')],
    supports: ['a', 'd'].map((node) => ({
      node,
      fixed: base === 'fixed' ? ['u', 'w', 'ry'] : ['u', 'w'],
    })),
    springs: [],
    rigidLinks: [],
    masses: [],
    states: [],
  };
}

describe('portal of inextensible members', () => {
  // Computed independently with general-purpose numerical libraries on a fine mesh; five decimals printed.
  it.each<[Base, number, readonly number[]]>([
    ['fixed', 1, [3.20457, 12.64806, 20.62916, 22.37339]],
    ['pinned', 1, [1.46293, 9.86961, 14.85553, 18.46882]],
    ['fixed', 2, [2.29244, 4.11896]],
    ['pinned', 2, [1.03096, 3.85456]],
  ])('%s base, rail %i times as long as the legs', (base, width, expected) => {
    const found = omegas(portal(base, width, 40), 'consistent', { modes: expected.length });
    // The table carries its own mesh: it prints π² as 9.86961 and 4.73004² as 22.37339, 5e-6 above.
    expect(worstError(found, expected)).toBeLessThan(6e-6);
  });

  it('has the modes in which no joint moves: the clamped beam’s and the pinned one’s', () => {
    // Thomson, Appendix D: a rail or leg between joints that stay swings as a beam by itself; 2e-7 is the mesh.
    const fixed = omegas(portal('fixed', 1, 40), 'consistent', { modes: 4 });
    expect(Math.abs(fixed[3]! / 4.73004074 ** 2 - 1)).toBeLessThan(4e-7);
    const pinned = omegas(portal('pinned', 1, 40), 'consistent', { modes: 2 });
    expect(Math.abs(pinned[1]! / Math.PI ** 2 - 1)).toBeLessThan(4e-7);
  });

  it('one consistent element per member: 3.21, 15.14 symmetric, 32.68 antisymmetric', () => {
    // Thomson, Theory of Vibration with Applications, example 10.5-4; with lengths that give, others lie far above.
    const found = omegas(portal('fixed', 1, 1), 'consistent', { modes: 3 });
    expect(found.map((omega) => omega.toFixed(2))).toEqual(['3.21', '15.14', '32.68']);
  });

  it('a ring in its plane: ω² = i²(i² − 1)²/(i² + 1) EI/mR⁴', () => {
    // Love's ring, after Timoshenko, Vibration Problems in Engineering; a polygon of 120 sides lies 2e-3 from it.
    const ring = portal('fixed', 1, 1);
    const sides = 120;
    const side = ring.members[0]!;
    ring.supports = [];
    ring.nodes = Array.from({ length: sides }, (_, i) => {
      const angle = (2 * Math.PI * i) / sides;
      return { id: `p${i}`, x: Math.cos(angle), z: Math.sin(angle) };
    });
    ring.members = ring.nodes.map(({ id }, i) => ({
      ...side,
      id: `side ${i}`,
      start: id,
      end: `p${(i + 1) % sides}`,
    }));
    const found = omegas(ring, 'consistent', { modes: 9 });
    expect(found.slice(0, 3)).toEqual([0, 0, 0]);
    const expected = [2, 2, 3, 3, 4, 4].map((i) =>
      Math.sqrt((i * i * (i * i - 1) ** 2) / (i * i + 1)),
    );
    expect(worstError(found.slice(3), expected)).toBeLessThan(2e-3);
  });
});
