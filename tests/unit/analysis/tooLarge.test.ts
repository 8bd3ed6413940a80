import { expect, it } from 'vitest';
import { AppError } from '#shared/errors/AppError.ts';
import { solveFrame } from '#shared/analysis/solveFrame.ts';
import { METHODS } from '#shared/schemas/solveResult.ts';
import { aRack } from '#tests/builders/aFrame.ts';
import { accepted } from '#tests/builders/aLine.ts';

// 1,184 members of 200 elements: 1.4 million unknowns, far under what a document may ask for (24 million).
const document = accepted(aRack({ bays: 6, storeys: 9, divisions: 200 }));

it.each(METHODS)(
  'a frame of more unknowns than memory holds is refused in words (%s)',
  (method) => {
    const solve = () => solveFrame({ document, method, stateId: null, settings: { modes: 1 } });
    expect(solve).toThrow(AppError);
    expect(solve).toThrow(expect.objectContaining({ code: 'memory-limit' }));
    expect(solve).toThrow(/more than 2 GiB.*fewer divisions/);
  },
);
