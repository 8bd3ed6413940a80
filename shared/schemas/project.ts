import { z } from 'zod';
import {
  fingerprintHex,
  noContent,
  nothing,
  personBrief,
  role,
  timestamp,
  uuid,
} from './common.ts';
import { endpoint } from './endpoint.ts';
import { frameDocument } from './frameDocument.ts';

export const REVISION_STATES = [
  'submitted',
  'recalled',
  'returned',
  'accepted',
  'approved',
  'superseded',
  'withdrawn',
] as const;
export const revisionState = z.enum(REVISION_STATES);
export type RevisionState = z.infer<typeof revisionState>;

/** A row of the Projects table: machine, latest approved revision, first natural frequency, who has it. */
export const projectSummary = z.object({
  id: uuid,
  name: z.string(),
  machine: z.string(),
  updatedAt: timestamp,
  latestRevision: z.object({ number: z.int(), state: revisionState }).nullable(),
  approvedRevision: z.object({ number: z.int(), approvedAt: timestamp }).nullable(),
  /** Lowest elastic natural frequency by the consistent method over all states, of the draft as it
   * stands; null while no solve of it is in. */
  firstFrequencyHz: z.number().nullable(),
  /** False where the solve of some state is incomplete, so that a lower one may be missing; null while no
   * solve of the draft is in. */
  firstFrequencyComplete: z.boolean().nullable(),
  /** Whose move it is: "draft with designers", "R2 waits for review", "R2 waits for a lead". */
  waitsFor: z.enum(['designer', 'reviewer', 'lead', 'nobody']),
  waitsForMe: z.boolean(),
});
export type ProjectSummary = z.infer<typeof projectSummary>;

export const projectMember = z.object({ id: uuid, name: z.string(), role });
export type ProjectMember = z.infer<typeof projectMember>;

export const projectResponse = projectSummary.extend({
  members: z.array(projectMember),
  draftVersion: z.int(),
  draftFingerprint: fingerprintHex,
  abilities: z.object({
    edit: z.boolean(),
    rename: z.boolean(),
    manageMembers: z.boolean(),
    solve: z.boolean(),
    submit: z.boolean(),
  }),
});
export type ProjectResponse = z.infer<typeof projectResponse>;

/** A frame of 10,000 nodes and members takes about 3 MB. */
const MAX_DOCUMENT_BYTES = 8 * 1024 * 1024;

const projectName = z.string().trim().min(1, 'Enter a name.').max(120, 'At most 120 characters.');
const projectParams = z.strictObject({ projectId: uuid });

export const listProjects = endpoint({
  method: 'get',
  path: '/api/projects',
  summary: 'Projects you may read, latest change first; `search` looks in name and machine.',
  status: 200,
  access: 'signed-in',
  params: nothing,
  query: z.strictObject({ search: z.string().max(120).optional() }),
  body: nothing,
  response: z.object({ projects: z.array(projectSummary) }),
});

export const createProject = endpoint({
  method: 'post',
  path: '/api/projects',
  summary:
    'Make a project from a whole document (a starter, an import or a blank sheet, built by the client). ' +
    'The client chooses the id, so that repeating the request makes one project.',
  status: 201,
  access: 'signed-in',
  maxBodyBytes: MAX_DOCUMENT_BYTES,
  params: nothing,
  query: nothing,
  body: z.strictObject({
    id: uuid,
    name: projectName,
    machine: z.string().trim().max(120).default(''),
    /** Checked by `checkDocument`; an unfinished frame (blank sheet) may be stored, a malformed one not. */
    document: z.unknown(),
  }),
  response: projectResponse,
});

export const readProject = endpoint({
  method: 'get',
  path: '/api/projects/:projectId',
  summary: 'One project.',
  status: 200,
  access: 'signed-in',
  params: projectParams,
  query: nothing,
  body: nothing,
  response: projectResponse,
});

export const updateProject = endpoint({
  method: 'patch',
  path: '/api/projects/:projectId',
  summary: 'Rename a project or its machine.',
  status: 200,
  access: 'signed-in',
  params: projectParams,
  query: nothing,
  body: z.strictObject({
    name: projectName.optional(),
    machine: z.string().trim().max(120).optional(),
  }),
  response: projectResponse,
});

export const addProjectMember = endpoint({
  method: 'put',
  path: '/api/projects/:projectId/members/:personId',
  summary: 'Share the project with a person of the team.',
  status: 200,
  access: 'signed-in',
  params: z.strictObject({ projectId: uuid, personId: uuid }),
  query: nothing,
  body: nothing,
  response: projectResponse,
});

export const removeProjectMember = endpoint({
  method: 'delete',
  path: '/api/projects/:projectId/members/:personId',
  summary: 'Stop sharing the project with a person.',
  status: 200,
  access: 'signed-in',
  params: z.strictObject({ projectId: uuid, personId: uuid }),
  query: nothing,
  body: nothing,
  response: projectResponse,
});

export const draftResponse = z.object({
  projectId: uuid,
  version: z.int(),
  fingerprint: fingerprintHex,
  document: frameDocument,
  updatedAt: timestamp,
  updatedBy: personBrief,
});
export type DraftResponse = z.infer<typeof draftResponse>;

export const readDraft = endpoint({
  method: 'get',
  path: '/api/projects/:projectId/draft',
  summary: 'The draft and its version (also sent as ETag).',
  status: 200,
  access: 'signed-in',
  params: projectParams,
  query: nothing,
  body: nothing,
  response: draftResponse,
});

/** What changed in the draft since the version a writer knew; `details` of the 412 answer. */
export const staleDraftDetails = z.object({
  currentVersion: z.int(),
  updatedBy: personBrief,
  updatedAt: timestamp,
  changes: z.array(
    z.object({
      list: z.string(),
      id: z.string(),
      kind: z.enum(['added', 'removed', 'changed']),
      fields: z.array(z.string()),
    }),
  ),
});
export type StaleDraftDetails = z.infer<typeof staleDraftDetails>;

export const writeDraft = endpoint({
  method: 'put',
  path: '/api/projects/:projectId/draft',
  summary:
    'Replace the draft. `version` is the one the change was made on; a stale one answers 412 with what changed. ' +
    'Writing the document that is already there answers 200 without a new version.',
  status: 200,
  access: 'signed-in',
  maxBodyBytes: MAX_DOCUMENT_BYTES,
  params: projectParams,
  query: nothing,
  body: z.strictObject({ version: z.int().min(1), document: z.unknown() }),
  response: z.object({ version: z.int(), fingerprint: fingerprintHex, updatedAt: timestamp }),
});

/** Kinds of server-sent events on a project's stream; the data is always JSON. */
export const projectEvent = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('solve'), solveId: uuid, status: z.string(), progress: z.number() }),
  z.object({ kind: z.literal('draft'), version: z.int() }),
  z.object({
    kind: z.literal('revision'),
    revisionId: uuid,
    number: z.int(),
    state: revisionState,
  }),
  z.object({ kind: z.literal('project') }),
]);
export type ProjectEvent = z.infer<typeof projectEvent>;

export const projectEvents = endpoint({
  method: 'get',
  path: '/api/projects/:projectId/events',
  summary: 'Server-sent events of a project: solves moving on, the draft or a revision changed.',
  status: 200,
  access: 'signed-in',
  params: projectParams,
  query: nothing,
  body: nothing,
  response: noContent,
  produces: 'event-stream',
});
