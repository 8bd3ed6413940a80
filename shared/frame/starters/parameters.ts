import { z } from 'zod';

import { standardMaterials } from '../materials.ts';
import { sectionShelf } from '../shelf.ts';

/** What every starter asks for, in SI; each starter adds its own defaults for the dimensions. */

const dimension = z
  .number({ error: 'Enter a length.' })
  .min(0.05, 'At least 50 mm.')
  .max(50, 'At most 50 m.');

const standardIds = standardMaterials().map((material) => material.id);
const shelfIds = sectionShelf().map((section) => section.id);

/** Bolted to a foundation that does not give, or standing on something with a stiffness per foot. */
export const feet = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('fixed') }),
  z.strictObject({
    kind: z.literal('stiffness'),
    /** N/m, along Z. */
    vertical: z.number().positive('Must be greater than zero.').max(1e12),
    /** N/m, along X and along Y. */
    horizontal: z.number().positive('Must be greater than zero.').max(1e12),
    /** N·m/rad about X and about Y; 0 for a foot that does not resist tilting. */
    tilting: z.number().nonnegative('Must not be negative.').max(1e12).default(0),
  }),
]);
export type Feet = z.infer<typeof feet>;

/** What stands on the frame: a box of even density, such as a motor. */
export const machine = z.strictObject({
  name: z.string().min(1, 'Give it a name.').max(200).default('Motor'),
  /** kg */
  mass: z.number().positive('Must be greater than zero.').max(1e6).default(120),
  /** m, of its centre of gravity above the frame's centre-line. */
  centreHeight: z.number().min(0, 'Must not be negative.').max(20).default(0.3),
  /** m, along X, Y and Z: gives its moments of inertia. */
  length: dimension.default(0.5),
  width: dimension.default(0.35),
  height: dimension.default(0.35),
});
export type Machine = z.infer<typeof machine>;

export interface Dimensions {
  readonly length: number;
  readonly width: number;
  readonly height: number;
}

/** The parameters of one starter with its own default dimensions [m] and section. */
export function starterParameters(dimensions: Dimensions, sectionId: string) {
  return z.strictObject({
    name: z.string().min(1, 'Give the frame a name.').max(200),
    length: dimension.default(dimensions.length),
    width: dimension.default(dimensions.width),
    height: dimension.default(dimensions.height),
    section: z.enum(shelfIds, 'Choose a section of the shelf.').default(sectionId),
    material: z.enum(standardIds, 'Choose one of the standard materials.').default('steel'),
    feet: feet.default({ kind: 'fixed' }),
    machine: machine.prefault({}),
  });
}

export type StarterParameters = z.infer<ReturnType<typeof starterParameters>>;
