import { aRack } from '#tests/builders/aFrame.ts';

/** A frame of some 15,000 unknowns: its solve takes seconds, long enough to be interrupted. */
export const largeFrame = (name: string): object => ({
  ...aRack({ bays: 5, storeys: 5, divisions: 6 }),
  name,
});
