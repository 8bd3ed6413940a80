import { describe, expect, it } from 'vitest';
import type { Displacement } from '#shared/schemas/frameDocument.ts';
import { aLine, omegas, solved } from './meshFreeFrames.ts';

/** Nothing of a mesh is left; what remains is rounding, well inside the promised 1e-9. */
const CLOSED_FORM = 1e-9;

function expectRelative(values: readonly number[], expected: readonly number[], tolerance: number) {
  expected.forEach((value, i) => {
    expect(Math.abs(values[i]! / value - 1), `${values[i]} for ${value}`).toBeLessThan(tolerance);
  });
}

/** Root of f between two bounds by bisection: the characteristic equations stand in the test itself. */
function root(f: (x: number) => number, low: number, high: number): number {
  let [a, b] = [low, high];
  const sign = Math.sign(f(a));
  for (let i = 0; i < 200; i += 1) {
    const middle = 0.5 * (a + b);
    if (Math.sign(f(middle)) === sign) a = middle;
    else b = middle;
  }
  return 0.5 * (a + b);
}

/** The n-th root of `f` counted by changes of sign on a grid. */
function roots(f: (x: number) => number, count: number, from = 0.05, step = 0.05): number[] {
  const found: number[] = [];
  for (let x = from; found.length < count; x += step) {
    if (Math.sign(f(x)) !== Math.sign(f(x + step))) found.push(root(f, x, x + step));
  }
  return found;
}

const { cos, sin, cosh, sinh, tan, tanh, PI } = Math;
const clamped: Displacement[] = ['w', 'ry'];
const pinned: Displacement[] = ['w'];
const guided: Displacement[] = ['ry'];

describe('Bernoulli-Euler beams, mesh-free', () => {
  // Characteristic equations and first digits: Thomson, Theory of Vibration, App. D.
  const rows = [
    ['clamped-free', clamped, [], 0, (x: number) => 1 / cosh(x) + cos(x)],
    ['clamped-clamped', clamped, clamped, 0, (x: number) => 1 / cosh(x) - cos(x)],
    ['free-free', [], [], 2, (x: number) => (x < 1 ? 1 : 1 / cosh(x) - cos(x))],
    ['clamped-pinned', clamped, pinned, 0, (x: number) => sin(x) - cos(x) * tanh(x)],
    ['pinned-free', pinned, [], 1, (x: number) => sin(x) - cos(x) * tanh(x)],
    ['clamped-guided', clamped, guided, 0, (x: number) => sin(x) + cos(x) * tanh(x)],
    ['free-guided', [], guided, 1, (x: number) => sin(x) + cos(x) * tanh(x)],
    ['pinned-pinned', pinned, pinned, 0, (x: number) => sin(x)],
    ['guided-guided', guided, guided, 1, (x: number) => sin(x)],
    ['pinned-guided', pinned, guided, 0, (x: number) => cos(x)],
  ] as const;
  const table: Record<string, readonly number[]> = {
    'clamped-free': [1.87510407, 4.69409113, 7.85475744, 10.99554073],
    'clamped-clamped': [4.73004074, 7.85320462, 10.99560784, 14.13716549],
    'clamped-pinned': [3.92660231, 7.06858275, 10.21017612, 13.35176878],
    'clamped-guided': [2.36502037, 5.49780392, 8.63937983, 11.78097245],
  };

  it.each(rows)('%s: first eight roots, rigid modes first', (name, start, end, rigid, equation) => {
    const { summary } = solved(aLine({ start: [...start], end: [...end] }), { modes: 8 + rigid });
    expect(summary.complete).toBe(true);
    expect(summary.rigidBodyModes).toBe(rigid);
    const omega = summary.modes.map((mode) => 2 * PI * mode.frequencyHz);
    expect(omega.slice(0, rigid)).toEqual(Array(rigid).fill(0));
    const betas = roots(equation, 8);
    expectRelative(
      omega.slice(rigid),
      betas.map((x) => x * x),
      CLOSED_FORM,
    );
    // The published digits themselves: eight decimals.
    expectRelative(betas, table[name] ?? [], 1e-8);
  });

  it('a high mode: nothing overflows at βL = 60.5π', () => {
    const { summary } = solved(aLine({ start: clamped }), { modes: 61 });
    expect(summary.complete).toBe(true);
    // cos βL = −sech βL: at this βL the root is (n − ½)π to all digits.
    expectRelative([2 * PI * summary.modes[60]!.frequencyHz], [(60.5 * PI) ** 2], CLOSED_FORM);
  });

  it.each([0.1, 0.25, 0.5, 1, 2, 5, 10])('a tip mass of %s of the beam', (ratio) => {
    const frame = aLine({ start: clamped });
    frame.masses.push({ id: 'tip', name: 'Tip', node: 'b', mass: ratio });
    // 1 + cosh x cos x = x (M/mL)(sin x cosh x − cos x sinh x): Thomson, section 7.4 [form from memory].
    const equation = (x: number) => 1 / cosh(x) + cos(x) - x * ratio * (sin(x) - cos(x) * tanh(x));
    const betas = roots(equation, 4);
    expectRelative(
      omegas(frame, { modes: 4 }),
      betas.map((x) => x * x),
      CLOSED_FORM,
    );
    if (ratio === 1) expectRelative(betas, [1.247917, 4.031139], 1e-6);
  });

  it.each([
    [1, 3.3988],
    [10, 4.1557],
    [100, 4.6413],
  ])('rotational springs kθL/EI = %s at both ends: βL₁ = %s', (k, beta) => {
    const frame = aLine();
    frame.supports = ['a', 'b'].map((node) => ({ node, fixed: ['w'], stiffness: { ry: k } }));
    // Table of computed values, five digits.
    expectRelative([Math.sqrt(omegas(frame, { modes: 1 })[0]!)], [beta], 2e-5);
  });

  it.each([
    [1, [1.18428, 1.56415, 4.74889]],
    [10, [2.03234, 2.76661, 4.91338]],
    [1000, [3.11106, 6.03706, 8.56559]],
  ])('a free beam on end springs kL³/EI = %s', (k, betas) => {
    const frame = aLine();
    frame.supports = ['a', 'b'].map((node) => ({ node, stiffness: { w: k } }));
    expectRelative(omegas(frame, { modes: 3 }).map(Math.sqrt), betas, 5e-6);
  });
});

describe('stretching and twisting, mesh-free', () => {
  it('a fixed-free bar: (2n − 1)πc/2L', () => {
    const omega = omegas(aLine({ unknowns: ['u'], start: ['u'] }), { modes: 6 });
    expectRelative(
      omega,
      omega.map((_, n) => (n + 0.5) * PI),
      CLOSED_FORM,
    );
  });

  it.each(['beam', 'bar'] as const)('a fixed-free %s with a tip mass: x tan x = mL/M', (kind) => {
    const frame = aLine({ unknowns: ['u'], start: ['u'] });
    frame.members[0]!.kind = kind;
    if (kind === 'bar') frame.members[0]!.divisions = 1;
    frame.masses.push({ id: 'tip', name: 'Tip', node: 'b', mass: 1 });
    const x = [0, 1, 2, 3, 4].map((n) =>
      root((y) => y * tan(y) - 1, n * PI + 1e-9, (n + 0.5) * PI - 1e-9),
    );
    expectRelative(x, [0.860334, 3.425618, 6.437298], 1e-6);
    expectRelative(omegas(frame, { modes: 5 }), x, CLOSED_FORM);
  });

  it('mass carried besides the member’s own slows the wave', () => {
    const frame = aLine({ unknowns: ['u'], start: ['u'] });
    frame.members[0]!.massPerLength = 3;
    expectRelative(omegas(frame, { modes: 2 }), [0.25 * PI, 0.75 * PI], CLOSED_FORM);
  });
});

describe('Timoshenko beams, mesh-free', () => {
  // Check values [computed independently], six digits; theory: Huang 1961, Han, Benaroya and Wei 1999. Those with
  // clamped ends stand up to 3e-5 above the theory (as a fine mesh does): the determinant below holds the digits.
  const rows = [
    [0.05, [9.82874, 38.8393], [3.50913, 21.739], [22.002, 59.3825], [22.1738, 60.1419]],
    [0.1, [9.70982, 37.1283], [3.48876, 20.9225], [20.9955, 53.8602], [21.6146, 56.2608]],
    [0.2, [9.28207, 32.2471], [3.41129, 18.4059], [18.0535, 41.394], [19.8161, 46.3879]],
  ] as const;
  const TABLE = 4e-5;
  const beam = (depth: number, start: Displacement[], end: Displacement[]) =>
    aLine({
      theory: 'timoshenko',
      start,
      end,
      section: { A: 1, Iy: (depth * depth) / 12, kz: 0.85 },
    });

  it.each(rows)('h/L = %s', (depth, pinnedBoth, clampedFree, clampedBoth, free) => {
    const unit = Math.sqrt(12) / depth;
    const of = (start: Displacement[], end: Displacement[], modes: number) =>
      omegas(beam(depth, start, end), { modes }).map((omega) => omega * unit);
    expectRelative(of(pinned, pinned, 2), pinnedBoth, TABLE);
    expectRelative(of(clamped, [], 2), clampedFree, TABLE);
    expectRelative(of(clamped, clamped, 2), clampedBoth, TABLE);
    expectRelative(of([], [], 4).slice(2), free, TABLE);
  });

  it.each(rows)('h/L = %s against the determinant of the general solution', (depth) => {
    // ψ of w = e^(μx) is (μ² + ρλ/κG)/μ e^(μx), from κGA(w″ − ψ′) + ρAλw = 0 (Huang 1961).
    const I = depth ** 2 / 12;
    const S = 0.85 / 2.6;
    const determinant = (omega: number, free: boolean): number => {
      const lambda = omega * omega;
      // I μ⁴ + λI(1 + 1/S) μ² − λ(1 − λI/S) = 0
      const p = lambda * (1 + 1 / S);
      const q = (lambda / I) * (1 - (lambda * I) / S);
      const shared = Math.sqrt((p * p) / 4 + q);
      const alpha = Math.sqrt(shared - p / 2);
      const beta = Math.sqrt(shared + p / 2);
      const g = (alpha * alpha + lambda / S) / alpha;
      const h = (beta * beta - lambda / S) / beta;
      // w = ch − cos and w = sh/g − sin/h … start clamped.
      const at = (x: number) => {
        const [C, H, c, s] = [cosh(alpha * x), sinh(alpha * x), cos(beta * x), sin(beta * x)];
        return {
          w: [C - c, H / g - s / h],
          psi: [g * H + h * s, C - c],
          M: [g * alpha * C + h * beta * c, alpha * H + beta * s],
          Q: [alpha * H + beta * s - g * H - h * s, (alpha * C) / g - (beta * c) / h - C + c],
        };
      };
      const { w, psi, M, Q } = at(1);
      const [top, bottom] = free ? [M, Q] : [w, psi];
      return top[0]! * bottom[1]! - top[1]! * bottom[0]!;
    };
    for (const free of [true, false]) {
      const omega = omegas(beam(depth, clamped, free ? [] : clamped), { modes: 3 });
      const exact = omega.map((w) => root((x) => determinant(x, free), w * 0.99, w * 1.01));
      expectRelative(omega, exact, CLOSED_FORM);
    }
  });

  it('pinned, both spectra, against the closed form', () => {
    // w = sin nπx: ρI/(κG) λ² − (ρA…)λ + … quadratic in λ = ω² (Huang 1961); n = 0 is pure shear, κGA/ρI.
    const depth = 0.5;
    const I = depth ** 2 / 12;
    const S = 0.85 / 2.6;
    const expected = [S / I];
    for (let n = 1; n <= 12; n += 1) {
      const k2 = (n * PI) ** 2;
      const half = 0.5 * (S / I + k2 + k2 * S);
      const product = k2 * k2 * S;
      const upper = half + Math.sqrt(half * half - product);
      expected.push(upper, product / upper);
    }
    expected.sort((a, b) => a - b);
    const omega = omegas(beam(depth, pinned, pinned), { modes: 12 });
    expectRelative(omega, expected.map(Math.sqrt).slice(0, 12), CLOSED_FORM);
  });

  it('tends to Bernoulli-Euler as shear and rotary inertia vanish', () => {
    const slender = aLine({ theory: 'timoshenko', start: clamped, section: { Iy: 1e-14, A: 1 } });
    const plain = aLine({ theory: 'bernoulli', start: clamped, section: { Iy: 1e-14, A: 1 } });
    expectRelative(omegas(slender, { modes: 3 }), omegas(plain, { modes: 3 }), 1e-11);
  });
});

describe('a short member beside a long one', () => {
  it('loses nothing at small βL', () => {
    // A stub of 1e-2 that carries on a beam: βL of the stub is some 1e-2, where the raw formulas cancel. The
    // stub is 1e6 times stiffer than the beam, so that rounding of K_D alone is near 1e-10.
    const length = 1.01;
    const frame = aLine({ start: clamped });
    frame.nodes.push({ id: 'c', x: length, z: 0 });
    frame.members.push({ ...frame.members[0]!, id: 'stub', start: 'b', end: 'c' });
    const betas = roots((x) => 1 / cosh(x) + cos(x), 3);
    expectRelative(
      omegas(frame, { modes: 3 }),
      betas.map((x) => (x / length) ** 2),
      CLOSED_FORM,
    );
  });

  it('refuses stiffnesses that the arithmetic cannot hold together', () => {
    const frame = aLine({ start: clamped });
    frame.nodes.push({ id: 'c', x: 1 + 1e-4, z: 0 });
    frame.members.push({ ...frame.members[0]!, id: 'stub', start: 'b', end: 'c' });
    expect(() => solved(frame)).toThrow(/too far apart/);
  });
});
