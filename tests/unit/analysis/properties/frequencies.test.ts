import fc from 'fast-check';
import { eigs, multiply, transpose } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { assembleMatrices } from '#shared/frame/assembly/assembleMatrices.ts';
import { buildModel } from '#shared/frame/assembly/buildModel.ts';
import { memberAxes } from '#shared/frame/memberAxes.ts';
import { add, dot } from '#shared/frame/vector3.ts';
import type { Joint, Vector3 } from '#shared/schemas/frameDocument.ts';
import type { SymmetricCsc } from '#shared/numerics/sparse/SymmetricCsc.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { accepted, frequencies, solved, worstError } from '#tests/builders/aLine.ts';
import { randomFrame, SEED } from './aRandomFrame.ts';

const SETTINGS = { modes: 8 };
const METHODS = ['consistent', 'lumped'] as const;
/** Two runs round differently; energies keep what φᵀKφ would lose. */
const SAME = 1e-10;

const dense = (A: SymmetricCsc): number[][] => {
  const rows = Array.from({ length: A.n }, () => new Array<number>(A.n).fill(0));
  for (let j = 0; j < A.n; j++) {
    for (let p = A.colPtr[j]!; p < A.colPtr[j + 1]!; p++) {
      rows[A.rowIdx[p]!]![j] = rows[j]![A.rowIdx[p]!] = A.values[p]!;
    }
  }
  return rows;
};

/** Eigenvalues and, in columns, eigenvectors of a symmetric matrix by mathjs. */
function symmetricEigen(A: number[][]): { values: number[]; vectors: number[][] } {
  const { values, eigenvectors } = eigs(A, { precision: 1e-15 });
  const columns = eigenvectors.map(({ vector }) => vector as number[]);
  return { values: values as number[], vectors: transpose(columns) };
}

/**
 * All finite natural frequencies by mathjs: with K = VΛVᵀ, the eigenvalues 1/ω² of Λ^−½VᵀMVΛ^−½, which is
 * defined where M is singular. K and M are scaled to a unit diagonal of K first.
 */
function denseFrequencies(input: FrameInput, massKind: (typeof METHODS)[number]): number[] {
  const model = buildModel(accepted(input), { massKind, divisionsOf: () => 1 });
  const { K, M } = assembleMatrices(model);
  const stiffness = dense(K);
  const size = stiffness.map((row, i) => 1 / Math.sqrt(row[i]!));
  const scaled = (A: number[][]) => A.map((row, i) => row.map((a, j) => size[i]! * a * size[j]!));
  const { values, vectors } = symmetricEigen(scaled(stiffness));
  const half = vectors.map((row) => row.map((v, j) => v / Math.sqrt(values[j]!)));
  const inner = multiply(transpose(half), multiply(scaled(dense(M)), half));
  const symmetric = inner.map((row, i) => row.map((a, j) => (a + inner[j]![i]!) / 2));
  const mu = symmetricEigen(symmetric).values;
  const largest = Math.max(...mu);
  return mu
    .filter((value) => value > 1e-10 * largest)
    .map((value) => 1 / Math.sqrt(value) / (2 * Math.PI))
    .sort((a, b) => a - b);
}

/** The frame turned by a quarter about X, Y or Z as a whole, each roll set so that its section turns along. */
function quarterTurn(frame: FrameInput, about: 0 | 1 | 2): FrameInput {
  const [p, q] = [(about + 1) % 3, (about + 2) % 3] as [0 | 1 | 2, 0 | 1 | 2];
  const turn = (v: readonly number[]): Vector3 => {
    const turned: Vector3 = [v[0]!, v[1]!, v[2]!];
    turned[p] = -v[q]!;
    turned[q] = v[p]!;
    return turned;
  };
  const at = new Map(frame.nodes.map((n): [string, Vector3] => [n.id, [n.x, n.y ?? 0, n.z]]));
  const members = frame.members.map((member) => {
    const start = add(at.get(member.start)!, member.startArm ?? [0, 0, 0]);
    const end = add(at.get(member.end)!, member.endArm ?? [0, 0, 0]);
    const before = memberAxes(start, end, member.roll ?? 0);
    const unrolled = memberAxes(turn(start), turn(end), 0);
    const y = turn(before.y);
    return {
      ...member,
      roll: Math.atan2(dot(y, unrolled.z), dot(y, unrolled.y)),
      ...(member.startArm && { startArm: turn(member.startArm) }),
      ...(member.endArm && { endArm: turn(member.endArm) }),
    };
  });
  return {
    ...frame,
    nodes: frame.nodes.map((n) => {
      const [x, y, z] = turn([n.x, n.y ?? 0, n.z]);
      return { ...n, x, y, z };
    }),
    members,
    supports: frame.supports.map((support) => ({
      ...support,
      axes: {
        x: turn(support.axes?.x ?? [1, 0, 0]),
        z: turn(support.axes?.z ?? [0, 0, 1]),
      },
    })),
    springs: [],
    masses: frame.masses.map(({ inertia, ...mass }) => ({
      ...mass,
      offset: turn(mass.offset ?? [0, 0, 0]),
      ...(inertia && { inertia: turnInertia(inertia, turn) }),
    })),
  };
}

function turnInertia(
  {
    Ixx,
    Iyy,
    Izz,
    Ixy = 0,
    Ixz = 0,
    Iyz = 0,
  }: NonNullable<FrameInput['masses'][number]['inertia']>,
  turn: (v: readonly number[]) => Vector3,
) {
  const rows = [
    [Ixx, Ixy, Ixz],
    [Ixy, Iyy, Iyz],
    [Ixz, Iyz, Izz],
  ].map(turn);
  const columns = [0, 1, 2].map((j) => turn(rows.map((row) => row[j]!)));
  const I = (i: number, j: number) => columns[j]![i]!;
  return { Ixx: I(0, 0), Iyy: I(1, 1), Izz: I(2, 2), Ixy: I(0, 1), Ixz: I(0, 2), Iyz: I(1, 2) };
}

/** Holds for every random frame and both mass kinds. */
function holds(
  runs: number,
  property: (frame: FrameInput, method: (typeof METHODS)[number]) => void,
) {
  fc.assert(fc.property(randomFrame, fc.constantFrom(...METHODS), property), {
    seed: SEED,
    numRuns: runs,
  });
}

describe('natural frequencies of random frames', () => {
  it('are those that mathjs finds in the dense matrices, and the count is the dense spectrum’s', () => {
    holds(4, (frame, method) => {
      const expected = denseFrequencies(frame, method);
      const { summary } = solved(frame, method, SETTINGS);
      const found = summary.modes.map((mode) => mode.frequencyHz);
      expect(worstError(found, expected.slice(0, found.length))).toBeLessThan(1e-8);
      const below = expected.filter((hz) => hz < summary.count.shiftHz).length;
      expect(summary.count.below).toBe(below);
    });
  }, 60_000);

  it('stay when nodes and members are listed in another order', () => {
    holds(6, (frame, method) => {
      const other = {
        ...frame,
        nodes: [...frame.nodes].reverse(),
        members: [...frame.members.slice(5), ...frame.members.slice(0, 5)],
      };
      const before = frequencies(frame, method, SETTINGS);
      expect(worstError(frequencies(other, method, SETTINGS), before)).toBeLessThan(SAME);
    });
  }, 60_000);

  it('stay when the whole frame is moved', () => {
    holds(6, (frame, method) => {
      const nodes = frame.nodes.map((n) => ({ ...n, x: n.x + 16, y: (n.y ?? 0) - 8, z: n.z + 4 }));
      const before = frequencies(frame, method, SETTINGS);
      expect(worstError(frequencies({ ...frame, nodes }, method, SETTINGS), before)).toBeLessThan(
        1e-9,
      );
    });
  }, 60_000);

  it('stay when the whole frame is turned by a quarter about X, Y or Z', () => {
    holds(6, (frame, method) => {
      const before = frequencies({ ...frame, springs: [] }, method, SETTINGS);
      for (const axis of [0, 1, 2] as const) {
        const turned = frequencies(quarterTurn(frame, axis), method, SETTINGS);
        expect(worstError(turned, before)).toBeLessThan(1e-9);
      }
    });
  }, 60_000);

  it('stay when lengths are in mm and masses in t', () => {
    holds(6, (frame, method) => {
      const before = frequencies(frame, method, SETTINGS);
      expect(worstError(frequencies(inMillimetres(frame), method, SETTINGS), before)).toBeLessThan(
        SAME,
      );
    });
  }, 60_000);

  it('share out all of their energy', () => {
    holds(6, (frame, method) => {
      const { summary } = solved(frame, method, SETTINGS);
      const sum = (shares: readonly { share: number }[]) =>
        shares.reduce((total, { share }) => total + share, 0);
      for (const { strainShares: strain, kineticShares: kinetic } of summary.modes) {
        const parts = [strain.members, strain.joints, strain.supports, strain.springs];
        expect(parts.reduce((total, part) => total + sum(part), 0)).toBeCloseTo(1, 12);
        expect(sum(kinetic.members) + sum(kinetic.masses)).toBeCloseTo(1, 12);
        for (const { share } of [...parts.flat(), ...kinetic.members, ...kinetic.masses]) {
          expect(share).toBeGreaterThanOrEqual(0);
        }
      }
    });
  }, 60_000);

  it('are the same in every bit when solved again', () => {
    holds(2, (frame, method) => {
      expect(frequencies(frame, method, SETTINGS)).toEqual(frequencies(frame, method, SETTINGS));
    });
  }, 60_000);
});

/** The same frame in mm, t, N (MPa): lengths ×1e3, masses ×1e-3, E ×1e-6, densities ×1e-12. */
function inMillimetres(frame: FrameInput): FrameInput {
  const length = 1e3;
  const mm = (v: readonly number[] | undefined): Vector3 => [
    (v?.[0] ?? 0) * length,
    (v?.[1] ?? 0) * length,
    (v?.[2] ?? 0) * length,
  ];
  const stiffness = (given: Joint | undefined) =>
    Object.fromEntries(
      Object.entries(given ?? {}).map(([key, value]) => [
        key,
        (value ?? 0) * (key.startsWith('r') ? 1e3 : 1e-3),
      ]),
    );
  const inertia = (given: FrameInput['masses'][number]['inertia']) =>
    given &&
    Object.fromEntries(Object.entries(given).map(([key, value]) => [key, (value ?? 0) * 1e3]));
  return {
    ...frame,
    materials: frame.materials.map((m) => ({ ...m, E: m.E * 1e-6, density: m.density * 1e-12 })),
    sections: frame.sections.map((section) => {
      if (section.shape.kind !== 'custom')
        throw new Error('Only stated sections are converted here.');
      const { A, Iy, Iz, Iyz = 0, J } = section.shape;
      const fourth = length ** 4;
      return {
        ...section,
        shape: {
          ...section.shape,
          A: A * length ** 2,
          Iy: Iy * fourth,
          Iz: Iz * fourth,
          Iyz: Iyz * fourth,
          J: J * fourth,
        },
      };
    }),
    nodes: frame.nodes.map((n) => ({
      ...n,
      x: n.x * length,
      y: (n.y ?? 0) * length,
      z: n.z * length,
    })),
    members: frame.members.map((member) => ({
      ...member,
      startArm: mm(member.startArm),
      endArm: mm(member.endArm),
      joints: {
        ...(member.joints?.start && { start: stiffness(member.joints.start) }),
        ...(member.joints?.end && { end: stiffness(member.joints.end) }),
      },
    })),
    supports: frame.supports.map((support) => ({
      ...support,
      stiffness: stiffness(support.stiffness),
    })),
    springs: frame.springs.map((spring) => ({ ...spring, stiffness: stiffness(spring.stiffness) })),
    masses: frame.masses.map((mass) => ({
      ...mass,
      mass: mass.mass * 1e-3,
      offset: mm(mass.offset),
      inertia: inertia(mass.inertia),
    })) as FrameInput['masses'],
  };
}
