import { describe, expect, it } from 'vitest';
import { aStand } from '#tests/builders/aFrame.ts';
import { frequencies, solved, worstError } from '#tests/builders/aLine.ts';

/** SHS 100×100×5 with the figures the check values were computed from. */
const TUBE = {
  kind: 'custom',
  A: 18.356e-4,
  Iy: 271.1e-8,
  Iz: 271.1e-8,
  J: 440.52e-8,
  ky: 0.436,
  kz: 0.436,
} as const;
const stand = (divisions: number, changes: Parameters<typeof aStand>[0] = {}) =>
  aStand({ divisions, theory: 'bernoulli', shape: TUBE, ...changes });

describe('the machine frame, end to end', () => {
  // Own scenario, computed independently with general-purpose numerical libraries; five digits given.
  it.each<[number, readonly number[], readonly number[]]>([
    [1, [47.213, 54.2, 83.715, 121.365, 139.653], [47.001, 53.804, 83.74, 115.871, 120.859]],
    [2, [47.212, 54.198, 83.713, 121.178, 139.466], [47.18, 54.149, 83.762, 120.171, 135.175]],
    [8, [47.212, 54.198, 83.712, 121.161, 139.439], [47.21, 54.195, 83.716, 121.103, 139.173]],
  ])('%i elements per segment', (divisions, consistent, lumped) => {
    const settings = { modes: 5 };
    expect(
      worstError(frequencies(stand(divisions), 'consistent', settings), consistent),
    ).toBeLessThan(1.2e-5);
    expect(worstError(frequencies(stand(divisions), 'lumped', settings), lumped)).toBeLessThan(
      1.2e-5,
    );
  });

  it('rises to 60.676 and 61.220 Hz with the mass at rail level', () => {
    const found = frequencies(stand(8, { massHeight: 0 }), 'consistent', { modes: 2 });
    expect(worstError(found, [60.676, 61.22])).toBeLessThan(1.2e-5);
  });

  it('falls to 44.7 Hz in Timoshenko theory, 36.2 Hz on springs of 10⁶ N·m/rad, 28.0 Hz on pinned feet', () => {
    const timoshenko = stand(8, { theory: 'timoshenko' });
    const sprung = stand(8, { theory: 'timoshenko' });
    sprung.supports = sprung.supports.map(({ node }) => ({
      node,
      fixed: ['u', 'v', 'w'],
      stiffness: { rx: 1e6, ry: 1e6, rz: 1e6 },
    }));
    const pinned = stand(8, { theory: 'timoshenko' });
    pinned.supports = pinned.supports.map(({ node }) => ({ node, fixed: ['u', 'v', 'w'] }));
    const first = [timoshenko, sprung, pinned].map(
      (frame) => frequencies(frame, 'consistent', { modes: 1 })[0],
    );
    expect(first.map((hz) => hz!.toFixed(1))).toEqual(['44.7', '36.2', '28.0']);
  });

  it('weighs 115.28 kg without its motor, and names its modes in plain words', () => {
    const { summary } = solved(stand(2), 'consistent', { modes: 5 });
    expect(summary.totalMassKg - 120).toBeCloseTo(115.28, 2);
    // 3.2 m of legs about z 0.4, 4.8 m of rails at 0.8, the motor at 1.1, all symmetric about (0.6, 0.4).
    const perMetre = 18.356e-4 * 7850;
    const height = (perMetre * (3.2 * 0.4 + 4.8 * 0.8) + 120 * 1.1) / summary.totalMassKg;
    expect(worstError(summary.centreOfMass, [0.6, 0.4, height])).toBeLessThan(1e-12);
    expect(summary.modes.map((mode) => mode.name)).toEqual([
      'sways along X',
      'sways along Y',
      'bounces along Z',
      'sways along X, 2nd',
      'twists about Z',
    ]);
  });

  it('finds every mode up to a frequency', () => {
    const { summary } = solved(stand(2), 'consistent', { upToHz: 130 });
    expect(summary.modes).toHaveLength(4);
    expect(summary.count).toMatchObject({ below: 4, found: 4, returned: 4, complete: true });
  });

  it('reaches with all its modes the mass that does not stand on its feet', () => {
    const { summary } = solved(stand(1), 'consistent', { modes: 60 });
    expect(summary.modes).toHaveLength(summary.freeDof);
    const { sum, attainable, total, onFixed } = summary.effectiveMass;
    for (let k = 0; k < 6; k++) expect(sum[k]! / attainable[k]!).toBeCloseTo(1, 9);
    for (let k = 0; k < 3; k++) {
      expect(total[k]).toBeCloseTo(summary.totalMassKg, 9);
      expect(attainable[k]! + onFixed[k]!).toBeCloseTo(total[k]!, 9);
    }
  });
});
