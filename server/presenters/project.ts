import type { DraftResponse, ProjectResponse, ProjectSummary } from '#shared/schemas/project.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { Draft } from '#server/models/Draft.ts';
import type { Person } from '#server/models/Person.ts';
import type { ProjectOverview } from '#server/models/projectOverview.ts';
import { can } from '#server/policies/policy.ts';
import { presentPerson } from './person.ts';

export function presentProjectSummary(person: Person, project: ProjectOverview): ProjectSummary {
  const { latest, approved } = project;
  const waitsFor = whoseMove(project);
  return {
    id: project.id,
    name: project.name,
    machine: project.machine,
    updatedAt: project.updatedAt.toISOString(),
    latestRevision: latest && { number: latest.number, state: latest.state },
    approvedRevision: approved && {
      number: approved.number,
      approvedAt: new Date(approved.approvedAt).toISOString(),
    },
    firstFrequencyHz: project.firstFrequencyHz,
    firstFrequencyComplete: project.firstFrequencyComplete,
    waitsFor,
    waitsForMe: isMyMove(person, project, waitsFor),
  };
}

type Mover = ProjectSummary['waitsFor'];

function whoseMove({ latest, approved, draftFingerprint }: ProjectOverview): Mover {
  if (latest?.state === 'submitted') return 'reviewer';
  if (latest?.state === 'accepted') return 'lead';
  return approved?.documentFingerprint === draftFingerprint ? 'nobody' : 'designer';
}

function isMyMove(person: Person, project: ProjectOverview, mover: Mover): boolean {
  if (mover === 'nobody') return false;
  if (mover === 'designer') return can(person, 'edit-project', project);
  if (project.latest === null) return false;
  const revision = { project, ...project.latest };
  if (mover === 'lead') return can(person, 'approve-revision', revision);
  return can(person, 'review-revision', revision) && !revision.acceptedByIds.includes(person.id);
}

export function presentProject(
  person: Person,
  project: ProjectOverview,
  members: readonly Person[],
): ProjectResponse {
  return {
    ...presentProjectSummary(person, project),
    members: members.map(presentPerson),
    draftVersion: project.draftVersion,
    draftFingerprint: project.draftFingerprint,
    abilities: {
      edit: can(person, 'edit-project', project),
      rename: can(person, 'edit-project', project),
      manageMembers: can(person, 'manage-members', project),
      solve: can(person, 'solve-project', project),
      submit: can(person, 'submit-revision', project),
    },
  };
}

/** @param draft with `updatedBy` loaded */
export function presentDraft(draft: Draft, document: FrameDocument): DraftResponse {
  if (draft.updatedBy === undefined) throw new Error('Who changed the draft is not loaded.');
  return {
    projectId: draft.projectId,
    version: draft.version,
    fingerprint: draft.fingerprint,
    document,
    updatedAt: draft.updatedAt.toISOString(),
    updatedBy: presentPerson(draft.updatedBy),
  };
}
