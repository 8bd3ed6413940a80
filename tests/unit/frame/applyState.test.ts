import { describe, expect, it } from 'vitest';

import { applyState } from '#shared/frame/applyState.ts';
import { frameDocument } from '#shared/schemas/frameDocument.ts';
import { aStand } from '#tests/builders/aFrame.ts';

function sprungStand() {
  return frameDocument.parse({
    ...aStand(),
    supports: [
      { node: 'front left foot', fixed: ['u', 'v'], stiffness: { w: 1e7, rx: 2e5 } },
      { node: 'back left foot', stiffness: { w: 1e7 }, bracket: { soft: 0.2, stiff: 5 } },
    ],
    states: [
      { id: 'empty', name: 'Motor away', masses: { motor: { present: false } } },
      {
        id: 'left',
        name: 'Motor left',
        masses: { motor: { mass: 90, node: 'front middle', offset: [0, 0, 0.1] } },
        supports: { 'back left foot': 'soft' },
      },
      { id: 'stiff', name: 'Feet stiff', supports: 'stiff' },
    ],
  });
}

describe('applyState', () => {
  it('leaves the document as drawn without a state, and does not change its argument', () => {
    const document = sprungStand();
    const before = structuredClone(document);
    expect(applyState(document, null)).toEqual({ ...before, states: [] });
    applyState(document, 'left', 'stiff');
    expect(document).toEqual(before);
  });

  it('takes masses away, moves and changes them', () => {
    expect(applyState(sprungStand(), 'empty').masses).toEqual([]);
    expect(applyState(sprungStand(), 'left').masses).toMatchObject([
      { id: 'motor', mass: 90, node: 'front middle', offset: [0, 0, 0.1] },
    ]);
  });

  it('multiplies stiffnesses by the bracket, by node or for all; what is fixed stays fixed', () => {
    const left = applyState(sprungStand(), 'left').supports;
    expect(left.map((support) => support.stiffness?.w)).toEqual([1e7, 2e6]);
    const stiff = applyState(sprungStand(), 'stiff').supports;
    expect(stiff.map((support) => support.stiffness)).toEqual([{ w: 2e7, rx: 4e5 }, { w: 5e7 }]);
    expect(stiff[0]?.fixed).toEqual(['u', 'v']);
  });

  it('lets one word for all supports go over what the state says', () => {
    const soft = applyState(sprungStand(), 'stiff', 'soft').supports;
    expect(soft.map((support) => support.stiffness?.w)).toEqual([5e6, 2e6]);
  });

  it('refuses a state that does not exist and names those that do', () => {
    expect(() => applyState(sprungStand(), 'right')).toThrow(/“right” does not exist.*“empty”/);
  });
});
