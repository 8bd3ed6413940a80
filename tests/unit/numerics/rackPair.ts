import { assembleSymmetric, type SymmetricCsc } from '#shared/numerics/sparse/SymmetricCsc.ts';

export interface RackSize {
  /** Bays along X and Y, storeys along Z. */
  bays: [number, number];
  storeys: number;
  /** Elements per member. */
  divisions: number;
  /** Feet clamped, or nothing held. */
  clamped?: boolean;
  lumped?: boolean;
}

export interface RackPair {
  K: SymmetricCsc;
  M: SymmetricCsc;
  /** Coordinates [x, y, z] of the node of every unknown, and its displacement 0 … 5. */
  unknowns: { at: [number, number, number]; displacement: number }[];
}

/**
 * A rack of square steel tubes 80×80×4 (bays 2.7 m and 1.1 m, storeys 1.9 m): textbook 12-unknown
 * Bernoulli members (Przemieniecki 1968, sections 5.6 and 11.7), all along the axes.
 */
export function rackPair(size: RackSize): RackPair {
  const E = 210e9;
  const G = 81e9;
  const rho = 7850;
  const A = 0.08 ** 2 - 0.072 ** 2;
  const I = (0.08 ** 4 - 0.072 ** 4) / 12;
  const J = 0.076 ** 3 * 0.004;
  const pitch = [2.7, 1.1, 1.9];
  const count = [size.bays[0] + 1, size.bays[1] + 1, size.storeys + 1];
  const nodes: [number, number, number][] = [];
  const elements: { a: number; b: number; axis: number; length: number }[] = [];
  const joint = (x: number, y: number, z: number) => (z * count[1]! + y) * count[0]! + x;
  for (let z = 0; z < count[2]!; z++) {
    for (let y = 0; y < count[1]!; y++) {
      for (let x = 0; x < count[0]!; x++) nodes.push([x * 2.7, y * 1.1, z * 1.9]);
    }
  }
  const member = (a: number, b: number, axis: number) => {
    let from = a;
    for (let d = 1; d <= size.divisions; d++) {
      let to = b;
      if (d < size.divisions) {
        const at: [number, number, number] = [...nodes[a]!];
        at[axis]! += (pitch[axis]! * d) / size.divisions;
        to = nodes.push(at) - 1;
      }
      elements.push({ a: from, b: to, axis, length: pitch[axis]! / size.divisions });
      from = to;
    }
  };
  for (let z = 0; z < count[2]!; z++) {
    for (let y = 0; y < count[1]!; y++) {
      for (let x = 0; x < count[0]!; x++) {
        if (z > 0 && x + 1 < count[0]!) member(joint(x, y, z), joint(x + 1, y, z), 0);
        if (z > 0 && y + 1 < count[1]!) member(joint(x, y, z), joint(x, y + 1, z), 1);
        if (z + 1 < count[2]!) member(joint(x, y, z), joint(x, y, z + 1), 2);
      }
    }
  }
  const number = new Int32Array(6 * nodes.length).fill(-1);
  const unknowns: RackPair['unknowns'] = [];
  nodes.forEach((at, node) => {
    if (size.clamped !== false && at[2] === 0) return;
    for (let displacement = 0; displacement < 6; displacement++) {
      number[6 * node + displacement] = unknowns.push({ at, displacement }) - 1;
    }
  });
  const rows: number[] = [];
  const cols: number[] = [];
  const k: number[] = [];
  const m: number[] = [];
  const add = (i: number, j: number, stiffness: number, mass: number) => {
    if (number[i]! < 0 || number[j]! < 0) return;
    rows.push(number[i]!);
    cols.push(number[j]!);
    k.push(stiffness);
    m.push(mass);
  };
  for (const { a, b, axis, length: L } of elements) {
    const mass = rho * A * L;
    const spin = rho * 2 * I * L;
    const line = (d: number, stiffness: number, inertia: number) => {
      const pair = size.lumped ? [inertia / 2, 0] : [inertia / 3, inertia / 6];
      add(6 * a + d, 6 * a + d, stiffness, pair[0]!);
      add(6 * b + d, 6 * b + d, stiffness, pair[0]!);
      add(6 * a + d, 6 * b + d, -stiffness, pair[1]!);
    };
    line(axis, (E * A) / L, mass);
    line(axis + 3, (G * J) / L, spin);
    // Bending: v along e1 with rotation about e2 = axis × e1 taken right-handed.
    for (const turn of [1, 2]) {
      const v = (axis + turn) % 3;
      const r = 3 + ((axis + 3 - turn) % 3);
      const s = turn === 1 ? 1 : -1;
      const at = [6 * a + v, 6 * a + r, 6 * b + v, 6 * b + r];
      const sign = [1, s, 1, s];
      const f = (E * I) / L ** 3;
      const Kb = [
        [12, 6 * L, -12, 6 * L],
        [6 * L, 4 * L * L, -6 * L, 2 * L * L],
        [-12, -6 * L, 12, -6 * L],
        [6 * L, 2 * L * L, -6 * L, 4 * L * L],
      ];
      const Mb = [
        [156, 22 * L, 54, -13 * L],
        [22 * L, 4 * L * L, 13 * L, -3 * L * L],
        [54, 13 * L, 156, -22 * L],
        [-13 * L, -3 * L * L, -22 * L, 4 * L * L],
      ];
      for (let i = 0; i < 4; i++) {
        for (let j = 0; j <= i; j++) {
          const g = sign[i]! * sign[j]!;
          const half = i === j && i % 2 === 0 ? mass / 2 : 0;
          const inertia = size.lumped ? half : (g * mass * Mb[i]![j]!) / 420;
          add(at[i]!, at[j]!, g * f * Kb[i]![j]!, inertia);
        }
      }
    }
    // The other entries of the two 6×6 blocks are zero here but not for a member at an angle.
    for (let i = 0; i < 12; i++) {
      for (let j = 0; j <= i; j++) {
        add(6 * (i < 6 ? a : b) + (i % 6), 6 * (j < 6 ? a : b) + (j % 6), 0, 0);
      }
    }
  }
  const n = unknowns.length;
  const i = Int32Array.from(rows);
  const j = Int32Array.from(cols);
  return {
    K: assembleSymmetric(n, i, j, Float64Array.from(k), i.length),
    M: assembleSymmetric(n, i, j, Float64Array.from(m), i.length),
    unknowns,
  };
}

/** The six rigid-body motions of an unclamped rack: along and about X, Y, Z. */
export function rigidMotions(pair: RackPair): Float64Array[] {
  return [0, 1, 2, 3, 4, 5].map((motion) =>
    Float64Array.from(pair.unknowns, ({ at: [x, y, z], displacement }) => {
      if (motion < 3) return displacement === motion ? 1 : 0;
      const moved = [
        [0, -z, y, 1, 0, 0],
        [z, 0, -x, 0, 1, 0],
        [-y, x, 0, 0, 0, 1],
      ];
      return moved[motion - 3]![displacement]!;
    }),
  );
}
