import { expect, it } from 'vitest';

import { checkDocument } from '#shared/frame/checkDocument.ts';
import {
  balancingRig,
  coolantPumpStand,
  coolantPumpStandFixed,
  exhaustFanSkid,
  feederStand,
  fillingStation,
} from '#seeders/demo/frames.ts';

it.each([
  balancingRig(),
  coolantPumpStand(),
  coolantPumpStandFixed(),
  feederStand(),
  fillingStation('SHS 100x5'),
  fillingStation('SHS 120x6'),
])('the demo frame $name passes without a word', (frame) => {
  expect(checkDocument(frame)).toMatchObject({ errors: [], warnings: [] });
});

it('the exhaust fan skid is warned of its belt guard without inertia alone', () => {
  const { errors, warnings } = checkDocument(exhaustFanSkid());
  expect(errors).toEqual([]);
  expect(warnings.map(({ path }) => path)).toEqual(['masses.2.inertia']);
});
