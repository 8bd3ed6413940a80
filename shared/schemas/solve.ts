import { z } from 'zod';
import { fingerprintHex, noContent, nothing, personBrief, timestamp, uuid } from './common.ts';
import { endpoint } from './endpoint.ts';
import { DEFAULT_SOLVE_SETTINGS, method, solveSettings, solveSummary } from './solveResult.ts';

export const SOLVE_STATUSES = ['queued', 'running', 'done', 'failed', 'cancelled'] as const;
export const solveStatus = z.enum(SOLVE_STATUSES);
export type SolveStatus = z.infer<typeof solveStatus>;

/** One solve without its summary: what lists and event handlers need. */
export const solveBrief = z.object({
  id: uuid,
  projectId: uuid,
  revisionId: uuid.nullable(),
  documentFingerprint: fingerprintHex,
  stateId: z.string().nullable(),
  method,
  settings: solveSettings,
  solverVersion: z.string(),
  status: solveStatus,
  /** 0…1 */
  progress: z.number(),
  stage: z.string(),
  /** False when the result is there but incomplete; null until it is in. */
  complete: z.boolean().nullable(),
  firstFrequencyHz: z.number().nullable(),
  error: z
    .object({
      code: z.string(),
      message: z.string(),
      issues: z.array(z.object({ path: z.string(), message: z.string() })),
    })
    .nullable(),
  requestedBy: personBrief,
  requestedAt: timestamp,
  finishedAt: timestamp.nullable(),
  elapsedMs: z.number().nullable(),
  abilities: z.object({ cancel: z.boolean() }),
});
export type SolveBrief = z.infer<typeof solveBrief>;

export const solveResponse = solveBrief.extend({ summary: solveSummary.nullable() });
export type SolveResponse = z.infer<typeof solveResponse>;

const solveParams = z.strictObject({ solveId: uuid });

export const createSolves = endpoint({
  method: 'post',
  path: '/api/solves',
  summary:
    'Solve the draft (or a revision) in one operating state, one solve per method. A result already stored in ' +
    'the team for the same document, settings and solver version is given at once.',
  status: 202,
  access: 'signed-in',
  params: nothing,
  query: nothing,
  body: z.strictObject({
    projectId: uuid,
    revisionId: uuid.nullable().default(null),
    /** null: the frame as drawn, without an operating state. */
    stateId: z.string().max(64).nullable().default(null),
    methods: z.array(method).min(1).max(3).default(['consistent', 'lumped']),
    settings: solveSettings.default(DEFAULT_SOLVE_SETTINGS),
  }),
  response: z.object({ solves: z.array(solveBrief) }),
});

export const listSolves = endpoint({
  method: 'get',
  path: '/api/solves',
  summary:
    'The newest solve per document, state, method and settings of a project. Narrow it by `fingerprint` or `revisionId`.',
  status: 200,
  access: 'signed-in',
  params: nothing,
  query: z.strictObject({
    projectId: uuid,
    revisionId: uuid.optional(),
    fingerprint: fingerprintHex.optional(),
  }),
  body: nothing,
  response: z.object({ solves: z.array(solveBrief) }),
});

export const readSolve = endpoint({
  method: 'get',
  path: '/api/solves/:solveId',
  summary: 'One solve with its summary.',
  status: 200,
  access: 'signed-in',
  params: solveParams,
  query: nothing,
  body: nothing,
  response: solveResponse,
});

export const readSolveShapes = endpoint({
  method: 'get',
  path: '/api/solves/:solveId/shapes',
  summary: 'The mode shapes as compact binary (layout: shared/analysis/shapesFile.ts).',
  status: 200,
  access: 'signed-in',
  params: solveParams,
  query: nothing,
  body: nothing,
  response: noContent,
  produces: 'binary',
});

export const cancelSolve = endpoint({
  method: 'post',
  path: '/api/solves/:solveId/cancel',
  summary: 'Cancel a queued or running solve; one that has ended stays as it is.',
  status: 200,
  access: 'signed-in',
  params: solveParams,
  query: nothing,
  body: nothing,
  response: solveBrief,
});
