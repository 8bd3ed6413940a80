import { describe, expect, it } from 'vitest';
import { DynamicSystem } from '#shared/analysis/meshFree/DynamicSystem.ts';
import { memberPieces } from '#shared/analysis/meshFree/memberPieces.ts';
import { modesAtRest } from '#shared/analysis/meshFree/modesAtRest.ts';
import { newtonModes } from '#shared/analysis/meshFree/newtonModes.ts';
import type { ModeEstimate } from '#shared/analysis/meshFree/newtonModes.ts';
import { checkDocument } from '#shared/frame/checkDocument.ts';
import { buildModel } from '#shared/frame/assembly/buildModel.ts';
import { aLine } from '#tests/builders/aLine.ts';

/** A cantilever in four pieces, EI = ρA = L = 1. */
function cantilever(): DynamicSystem {
  const { document } = checkDocument(aLine({ ends: ['clamped', 'free'], divisions: 4 }));
  if (document === null) throw new Error('The line is refused.');
  const model = buildModel(document, { massKind: 'consistent', divisionsOf: () => 4 });
  return new DynamicSystem(
    model,
    memberPieces(model, () => 1),
    () => 0,
  );
}

const refined = (system: DynamicSystem, estimates: readonly ModeEstimate[]) =>
  newtonModes(
    system,
    (omega) => system.evaluate(omega),
    estimates,
    () => undefined,
  );

describe('modes refined by Newton’s method', () => {
  it('go from estimates at rest to the closed form, within the half-width they state', () => {
    const system = cantilever();
    const modes = refined(
      system,
      modesAtRest(system, [], 3, () => false),
    );
    // Clamped-free roots: Thomson, Theory of Vibration, App. D, with the digits of its equation [computed].
    const roots = [1.8751040687119611, 4.694091132974174, 7.854757438237613];
    expect(modes.length).toBe(3);
    modes.forEach(({ omega, halfWidth }, i) => {
      expect(halfWidth).toBeLessThanOrEqual(1e-9);
      // 1e-13: rounding.
      expect(Math.abs(omega / roots[i]! ** 2 - 1)).toBeLessThan(halfWidth + 1e-13);
    });
  });

  it('never count one mode twice, whichever two estimates lead to it', () => {
    const system = cantilever();
    const [first, second] = modesAtRest(system, [], 2, () => false);
    // Estimates 4 % and 8 % off, with the very shape of the first mode.
    const twice = [0.96, 1.08].map((factor) => ({ omega: factor * first!.omega, x: first!.x }));
    // Both are left out: only bisection can tell which of them to keep.
    const modes = refined(system, [...twice, second!]);
    expect(modes.length).toBe(1);
    expect(modes[0]!.omega).toBeCloseTo(4.694091132974174 ** 2, 7);
  });
});
