import { describe, expect, it } from 'vitest';
import { SharedWork } from '#shared/analysis/SharedWork.ts';
import { BRACKETS, solveBrackets } from '#shared/analysis/solveBrackets.ts';
import { solveFrame } from '#shared/analysis/solveFrame.ts';
import type { SolveRequest } from '#shared/analysis/solveFrame.ts';
import { aRack } from '#tests/builders/aFrame.ts';
import { accepted } from '#tests/builders/aLine.ts';

/** A rack of unequal bays on feet that give way in every direction. */
function onFeet(change: (frame: ReturnType<typeof aRack>) => void = () => undefined) {
  const frame = aRack({ bays: 1, storeys: 2, bay: 0.9, storey: 1.1, divisions: 3 });
  frame.supports = frame.supports.map(({ node }) => ({
    node,
    fixed: [],
    stiffness: { u: 4e7, v: 3e7, w: 2e8, rx: 1e6, ry: 1e6, rz: 1e6 },
    bracket: { soft: 0.4, stiff: 3 },
  }));
  change(frame);
  return accepted(frame);
}

const request: SolveRequest = {
  document: onFeet(),
  method: 'consistent',
  stateId: null,
  settings: { modes: 5 },
};
const frequencies = ({ summary }: ReturnType<typeof solveFrame>) =>
  summary.modes.map(({ frequencyHz }) => frequencyHz);
const withoutTiming = ({
  summary: { timing: _, ...rest },
  shapes,
}: ReturnType<typeof solveFrame>) => ({
  rest,
  shapes,
});

describe('three brackets in one call', () => {
  const brackets = solveBrackets(request);

  it.each(BRACKETS)('give for %s supports what a solve alone gives, in every bit', (supports) => {
    const alone = solveFrame({ ...request, settings: { ...request.settings, supports } });
    expect(withoutTiming(brackets[supports])).toEqual(withoutTiming(alone));
  });

  it('rise with the stiffness of the feet (Rayleigh: no mode of a stiffer frame is lower)', () => {
    const [soft, expected, stiff] = [brackets.soft, brackets.expected, brackets.stiff].map(
      frequencies,
    );
    expected!.forEach((f, i) => {
      expect(soft![i]).toBeLessThan(f);
      expect(stiff![i]).toBeGreaterThan(f);
    });
  });

  it('report progress that never falls and ends at 1', () => {
    const seen: number[] = [];
    solveBrackets(request, { onProgress: (fraction) => seen.push(fraction) });
    expect(seen).toEqual(seen.toSorted((a, b) => a - b));
    expect(seen.at(-1)).toBe(1);
  });
});

describe('work shared between solves of an edited frame', () => {
  it.each([
    [
      'a foot made stiffer',
      onFeet(
        (frame) =>
          (frame.supports[0]!.stiffness = { w: 5e8, u: 4e7, v: 3e7, rx: 1e6, ry: 1e6, rz: 1e6 }),
      ),
    ],
    ['a node moved', onFeet((frame) => (frame.nodes[5]!.x += 0.05))],
    [
      'a mass put on',
      onFeet((frame) =>
        frame.masses.push({ id: 'm', name: 'Motor', node: frame.nodes[7]!.id, mass: 40 }),
      ),
    ],
    ['a member taken away', onFeet((frame) => frame.members.pop())],
    [
      'another section',
      onFeet((frame) => (frame.sections[0]!.shape = { kind: 'solid-round', diameter: 0.06 })),
    ],
  ])('leaves no trace of the frame before: %s', (_, document) => {
    const shared = new SharedWork();
    solveFrame(request, {}, shared);
    const edited = { ...request, document };
    expect(withoutTiming(solveFrame(edited, {}, shared))).toEqual(
      withoutTiming(solveFrame(edited)),
    );
  });

  it('orders and analyses once while the topology stays', () => {
    const shared = new SharedWork();
    let tick = 0;
    const now = () => tick++;
    const first = solveFrame(request, { now }, shared).summary.timing;
    const document = onFeet((frame) => (frame.materials[0]!.E = 70e9));
    const second = solveFrame({ ...request, document }, { now }, shared).summary.timing;
    expect(first.order).toBeGreaterThan(0);
    expect([second.order, second.symbolic]).toEqual([0, 0]);
  });
});
