import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { ModeSummary } from '#shared/schemas/solveResult.ts';
import { frequencyScale } from '#src/features/frequencyLine/state/frequencyScale.ts';
import { layOutMarks, TARGET_PX } from '#src/features/frequencyLine/state/layOutMarks.ts';

const mode = (number: number, frequencyHz: number, kind: ModeSummary['kind'] = 'global') =>
  ({
    number,
    frequencyHz,
    kind,
    digits: 5,
    backwardError: 1e-15,
    name: 'sways along X',
    participation: [0, 0, 0, 0, 0, 0],
    effectiveMass: [0, 0, 0, 0, 0, 0],
    strainShares: { members: [], joints: [], supports: [], springs: [] },
    kineticShares: { members: [], masses: [] },
  }) satisfies ModeSummary;

const hz = (m: ModeSummary) => `${m.frequencyHz} Hz`;

describe('frequency scale', () => {
  it('puts equal ratios at equal distances on a log scale', () => {
    const scale = frequencyScale('log', [10, 1000], 900);
    expect(scale.toX(100) - scale.toX(10)).toBeCloseTo(scale.toX(1000) - scale.toX(100), 9);
  });

  it('starts at zero on a linear scale', () => {
    expect(frequencyScale('linear', [40, 120], 900).toX(0)).toBe(0);
  });

  it('leaves rigid-body modes at 0 Hz out of a log scale', () => {
    expect(frequencyScale('log', [0, 0, 20, 40], 900).lowHz).toBe(16);
  });

  it('keeps ticks inside and far enough apart to be read', () => {
    fc.assert(
      fc.property(
        fc.constantFrom('log' as const, 'linear' as const),
        fc.double({ min: 0.1, max: 500, noNaN: true }),
        fc.double({ min: 1, max: 300, noNaN: true }),
        fc.integer({ min: 260, max: 3000 }),
        (kind, low, ratio, width) => {
          const scale = frequencyScale(kind, [low, low * ratio], width);
          const xs = scale.ticksHz.map((hz) => scale.toX(hz));
          for (const [i, x] of xs.entries()) {
            expect(x).toBeGreaterThanOrEqual(-1e-6);
            expect(x).toBeLessThanOrEqual(width + 1e-6);
            if (i > 0) expect(x - (xs[i - 1] ?? 0)).toBeGreaterThan(40);
          }
        },
      ),
      { seed: 1852 },
    );
  });
});

describe('marks on the frequency line', () => {
  it('folds crowded local modes into one mark that counts them', () => {
    const modes = [
      mode(1, 47.2),
      ...Array.from({ length: 14 }, (_, i) => mode(i + 2, 200 + i * 0.1, 'local')),
    ];
    const marks = layOutMarks(modes, frequencyScale('log', [47.2, 201.4], 800), hz);
    expect(marks.map((m) => m.label)).toEqual(['47.2 Hz', '+14 local']);
  });

  it('names the global mode first where local ones share its place', () => {
    const marks = layOutMarks(
      [mode(1, 100, 'local'), mode(2, 100.2), mode(3, 100.3, 'local')],
      frequencyScale('log', [100, 100.3, 400], 800),
      hz,
    );
    expect(marks[0]?.label).toBe('100.2 Hz +2 local');
  });

  it('shows every elastic mode once and keeps marks a target apart', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 1, max: 900, noNaN: true }), { minLength: 1, maxLength: 60 }),
        fc.integer({ min: 280, max: 2400 }),
        (frequencies, width) => {
          const modes = frequencies.map((f, i) => mode(i + 1, f, i % 3 === 0 ? 'local' : 'global'));
          const marks = layOutMarks(modes, frequencyScale('log', frequencies, width), hz);
          const shown = marks.flatMap((m) => m.modes.map((one) => one.number));
          expect(shown.toSorted((a, b) => a - b)).toEqual(modes.map((m) => m.number));
          for (const [i, mark] of marks.entries()) {
            const before = marks[i - 1];
            if (before) expect(mark.x - before.x).toBeGreaterThanOrEqual(TARGET_PX);
          }
        },
      ),
      { seed: 1852 },
    );
  });
});
