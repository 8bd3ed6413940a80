import type {
  Invitation as InvitationView,
  SentMail as SentMailView,
  TeamPerson,
  TeamResponse,
} from '#shared/schemas/team.ts';
import type { Invitation } from '#server/models/Invitation.ts';
import type { Person } from '#server/models/Person.ts';
import type { SentMail } from '#server/models/SentMail.ts';
import type { Team } from '#server/models/Team.ts';
import { can } from '#server/policies/policy.ts';

/** Addresses are for administrators; everybody else sees names and roles. */
export const presentTeamPerson = (viewer: Person, person: Person): TeamPerson => ({
  id: person.id,
  name: person.name,
  email: can(viewer, 'administer-person', person) ? person.email : '',
  role: person.role,
  isAdministrator: person.isAdministrator,
  active: person.active,
  lastSignInAt: person.lastSignInAt?.toISOString() ?? null,
});

/** @param invitation with `invitedBy` loaded */
export function presentInvitation(invitation: Invitation): InvitationView {
  return {
    id: invitation.id,
    email: invitation.email,
    role: invitation.role,
    isAdministrator: invitation.isAdministrator,
    invitedBy: invitation.invitedBy?.name ?? '',
    expiresAt: invitation.expiresAt.toISOString(),
  };
}

export const presentSentMail = (mail: SentMail): SentMailView => ({
  id: mail.id,
  to: mail.to,
  subject: mail.subject,
  text: mail.text,
  sentAt: mail.sentAt.toISOString(),
});

export interface TeamParts {
  readonly team: Team;
  readonly people: readonly Person[];
  /** Open ones; shown to administrators only. */
  readonly invitations: readonly Invitation[];
  readonly mailIsLocal: boolean;
}

export function presentTeam(
  viewer: Person,
  { team, people, invitations, mailIsLocal }: TeamParts,
): TeamResponse {
  const administer = can(viewer, 'administer-team', team);
  return {
    id: team.id,
    name: team.name,
    settings: {
      soleReviewerMayApprove: team.soleReviewerMayApprove,
      requiredReviews: team.requiredReviews,
    },
    people: people.map((person) => presentTeamPerson(viewer, person)),
    invitations: administer ? invitations.map(presentInvitation) : [],
    abilities: { administer, readSentMail: mailIsLocal && can(viewer, 'read-sent-mail', team) },
  };
}
