import type { Role } from '#shared/schemas/common.ts';
import type { Method } from '#shared/schemas/solveResult.ts';

/** Which revision of its project. */
interface RevisionDetails {
  revisionId: string;
  number: number;
}

/**
 * Everything that is recorded, and the particulars recorded with it. People are written as ids, never as
 * names or addresses: the chain cannot be changed, so it must hold nothing that may have to be forgotten.
 */
export interface AuditDetails {
  'team-created': { name: string };
  'team-renamed': { from: string; to: string };
  'team-settings-changed': { soleReviewerMayApprove: boolean; requiredReviews: number };
  'person-invited': { invitationId: string; role: Role; isAdministrator: boolean };
  'invitation-withdrawn': { invitationId: string };
  'person-joined': { personId: string; role: Role; isAdministrator: boolean };
  'role-changed': { personId: string; from: Role; to: Role };
  'administrator-switched': { personId: string; on: boolean };
  'person-deactivated': { personId: string };
  'person-reactivated': { personId: string };
  'password-changed': { personId: string };
  'password-reset': { personId: string };
  'project-created': { name: string };
  'project-changed': { name: string; machine: string };
  'project-shared': { personId: string };
  'project-unshared': { personId: string };
  'draft-changed': { version: number; fingerprint: string };
  'solves-requested': { methods: Method[]; stateId: string | null; documentFingerprint: string };
  'solve-cancelled': { solveId: string; method: Method };
  'revision-submitted': RevisionDetails & { changeNote: string; documentFingerprint: string };
  'revision-recalled': RevisionDetails;
  'revision-accepted': RevisionDetails & { comment: string };
  'revision-returned': RevisionDetails & { comment: string };
  'revision-approved': RevisionDetails;
  'revision-superseded': RevisionDetails & { by: number };
  /** The lock record's fingerprint; the record holds the head of the chain before this entry. */
  'revision-locked': RevisionDetails & { fingerprint: string };
  'revision-withdrawn': RevisionDetails & { reason: string };
  'revision-commented': RevisionDetails & { commentId: string };
}

export type AuditAction = keyof AuditDetails;
