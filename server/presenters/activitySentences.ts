import type { AuditAction, AuditDetails } from '#server/models/auditActions.ts';

type NameOf = (personId: string) => string;

/** What each entry says after the name of who did it; written today from what was recorded then. */
const sentences: {
  readonly [A in AuditAction]: (details: AuditDetails[A], nameOf: NameOf) => string;
} = {
  'team-created': ({ name }) => `the team ${name} was made`,
  'team-renamed': ({ from, to }) => `renamed the team from ${from} to ${to}`,
  'team-settings-changed': ({ requiredReviews, soleReviewerMayApprove }) =>
    `set the team’s rules: ${counted(requiredReviews, 'review')} needed, a sole reviewer ${
      soleReviewerMayApprove ? 'may' : 'may not'
    } approve`,
  'person-invited': ({ role, isAdministrator }) =>
    `invited somebody as ${role}${isAdministrator ? ' and administrator' : ''}`,
  'invitation-withdrawn': () => 'took an invitation back',
  'person-joined': ({ role, isAdministrator }) =>
    `joined the team as ${role}${isAdministrator ? ' and administrator' : ''}`,
  'role-changed': ({ personId, from, to }, nameOf) =>
    `changed the role of ${nameOf(personId)} from ${from} to ${to}`,
  'administrator-switched': ({ personId, on }, nameOf) =>
    on
      ? `made ${nameOf(personId)} administrator`
      : `took the administrator switch from ${nameOf(personId)}`,
  'person-deactivated': ({ personId }, nameOf) => `deactivated ${nameOf(personId)}`,
  'person-reactivated': ({ personId }, nameOf) => `reactivated ${nameOf(personId)}`,
  'password-changed': () => 'changed their password',
  'password-reset': () => 'set a new password by a reset link',
  'project-created': ({ name }) => `made the project ${name}`,
  'project-changed': ({ name, machine }) =>
    `named the project ${name}${machine === '' ? '' : `, machine ${machine}`}`,
  'project-shared': ({ personId }, nameOf) => `shared the project with ${nameOf(personId)}`,
  'project-unshared': ({ personId }, nameOf) =>
    `stopped sharing the project with ${nameOf(personId)}`,
  'draft-changed': ({ version }) => `changed the draft (version ${version})`,
  'solves-requested': ({ methods }) => `asked for a solve: ${methods.join(', ')}`,
  'solve-cancelled': ({ method }) => `cancelled a ${method} solve`,
  'revision-submitted': ({ number, changeNote }) => `submitted R${number}: ${changeNote}`,
  'revision-recalled': ({ number }) => `recalled R${number}`,
  'revision-accepted': ({ number, comment }) => withComment(`accepted R${number}`, comment),
  'revision-returned': ({ number, comment }) => withComment(`returned R${number}`, comment),
  'revision-approved': ({ number }) => `approved R${number}`,
  'revision-superseded': ({ number, by }) => `superseded R${number} by R${by}`,
  'revision-locked': ({ number, fingerprint }) =>
    `locked R${number}, fingerprint ${fingerprint.slice(0, 12)}…`,
  'revision-withdrawn': ({ number, reason }) => withComment(`withdrew R${number}`, reason),
  'revision-commented': ({ number }) => `commented on R${number}`,
};

/**
 * One plain sentence, without its subject.
 *
 * @param details as recorded with the action
 */
export function sentenceOf(
  action: AuditAction,
  details: Readonly<Record<string, unknown>>,
  nameOf: NameOf,
): string {
  // The record was written by `recordAudit` from AuditDetails[action]; the pairing is lost in the text column.
  const sentence = sentences[action] as (details: unknown, nameOf: NameOf) => string;
  return sentence(details, nameOf);
}

const counted = (count: number, noun: string): string =>
  `${count} ${noun}${count === 1 ? '' : 's'}`;

const withComment = (what: string, comment: string): string =>
  comment === '' ? what : `${what}: ${comment}`;
