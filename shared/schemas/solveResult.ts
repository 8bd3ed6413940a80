import { z } from 'zod';

/**
 * What one solve returns (the frame document page, "What a solve returns"). Frequencies in Hz, masses in
 * kg, energies as shares of the mode's total (0…1). The shapes travel apart as compact binary
 * (`shared/analysis/shapesFile.ts`).
 */

/** Methods the document page names. */
export const METHODS = ['consistent', 'lumped', 'mesh-free'] as const;
export const method = z.enum(METHODS);
export type Method = z.infer<typeof method>;

/** Settings of a solve, apart from method and state; part of the key under which a result is stored. */
export const solveSettings = z.strictObject({
  /** How many modes are wanted, or all up to a frequency in Hz. */
  modes: z.int().min(1).max(200).optional(),
  upToHz: z.number().positive().max(1e6).optional(),
  /** Overrides the divisions of every beam. */
  divisions: z.int().min(1).max(200).optional(),
  /** Supports for this solve, over what the state says. */
  supports: z.enum(['soft', 'expected', 'stiff']).optional(),
});
export type SolveSettings = z.infer<typeof solveSettings>;
export const DEFAULT_SOLVE_SETTINGS: SolveSettings = { modes: 12 };

/** One thing a person should know about the model; `path` points into the document where there is a place. */
export const modelWarning = z.object({ path: z.string(), message: z.string() });
export type ModelWarning = z.infer<typeof modelWarning>;

/** The solver's count check, or none-missed count: `below` from the inertia of K − σM. */
export const countCheck = z.object({
  shiftHz: z.number(),
  below: z.int(),
  found: z.int(),
  returned: z.int(),
  complete: z.boolean(),
});
export type CountCheck = z.infer<typeof countCheck>;

/** Six numbers: along X, Y, Z [kg] and about X, Y, Z through the centre of mass [kg·m²]. */
const sixByDirection = z.tuple([
  z.number(),
  z.number(),
  z.number(),
  z.number(),
  z.number(),
  z.number(),
]);

const share = z.object({ id: z.string(), share: z.number() });
export type EnergyShare = z.infer<typeof share>;

export const modeSummary = z.object({
  /** 1-based, rigid-body modes first. */
  number: z.int(),
  frequencyHz: z.number(),
  /** How many significant digits the accuracy supports. */
  digits: z.int(),
  backwardError: z.number(),
  /** A plain name: "sways along X", "twists about Z", "local: rail 3", "rigid: moves along X". */
  name: z.string(),
  kind: z.enum(['rigid', 'global', 'local']),
  participation: sixByDirection,
  effectiveMass: sixByDirection,
  strainShares: z.object({
    members: z.array(share),
    joints: z.array(share),
    supports: z.array(share),
    springs: z.array(share),
  }),
  kineticShares: z.object({ members: z.array(share), masses: z.array(share) }),
});
export type ModeSummary = z.infer<typeof modeSummary>;

/** What a person can work out by hand for one axis, held against the mode with the most effective mass along it. */
export const handCheck = z.object({
  axis: z.enum(['X', 'Y', 'Z']),
  /** Number of that mode; null where no mode found moves along the axis. */
  mode: z.int().nullable(),
  /** Its share of the effective mass that all modes reach along the axis, 0…1. */
  share: z.number(),
  /** Largest deflection along the axis under 1 g: at nodes and stations, and with the masses' centres [m]. */
  deflectionAtNodes: z.number(),
  deflectionAtMasses: z.number(),
  /** √(g/δ)/2π of each [Hz]; reads low where the mass is spread. Null where masses alone move. */
  fromDeflectionAtNodes: z.number().nullable(),
  fromDeflectionAtMasses: z.number(),
  /** The lowest frequency is never above it [Hz]. */
  rayleigh: z.number(),
  /** From below if all moved along this axis alone [Hz]: coupled motions may lie below it. Null with very many masses. */
  dunkerley: z.number().nullable(),
});
export type HandCheck = z.infer<typeof handCheck>;

export const handChecks = z.object({
  /** Why there is none, in words. */
  none: z.string().nullable(),
  axes: z.array(handCheck),
});
export type HandChecks = z.infer<typeof handChecks>;

export const solveSummary = z.object({
  method,
  stateId: z.string().nullable(),
  settings: solveSettings,
  solverVersion: z.string(),
  freeDof: z.int(),
  totalMassKg: z.number(),
  centreOfMass: z.tuple([z.number(), z.number(), z.number()]),
  rigidBodyModes: z.int(),
  count: countCheck,
  /** False where a mode did not converge or the count is missing modes. */
  complete: z.boolean(),
  modes: z.array(modeSummary),
  effectiveMass: z.object({
    /** Sum over the modes returned. */
    sum: sixByDirection,
    /** What all modes of the model would reach together: bᵀ M_ff⁺ b. */
    attainable: sixByDirection,
    /** Rigid mass of the whole model: total mass along, moments of inertia about the centre of mass. */
    total: sixByDirection,
    /** Mass standing on fixed supports, which no mode moves [kg] by direction X, Y, Z. */
    onFixed: z.tuple([z.number(), z.number(), z.number()]),
  }),
  /** Absent in mesh-free results and in those stored before there were hand checks. */
  handChecks: handChecks.optional(),
  warnings: z.array(modelWarning),
  timing: z.object({
    read: z.number(),
    assemble: z.number(),
    order: z.number(),
    symbolic: z.number(),
    factor: z.number(),
    iterate: z.number(),
    finish: z.number(),
    certify: z.number(),
    total: z.number(),
  }),
});
export type SolveSummary = z.infer<typeof solveSummary>;
