import { AppError } from '#shared/errors/AppError.ts';
import {
  createInvitation,
  deleteInvitation,
  listSentMail,
  readTeam,
  updatePerson as updatePersonContract,
  updateTeam as updateTeamContract,
  type TeamResponse,
} from '#shared/schemas/team.ts';
import { invitePerson } from '#server/commands/invitePerson.ts';
import { updatePerson } from '#server/commands/updatePerson.ts';
import { updateTeam } from '#server/commands/updateTeam.ts';
import { withdrawInvitation } from '#server/commands/withdrawInvitation.ts';
import { handle, type Route } from '#server/middlewares/handle.ts';
import { Invitation } from '#server/models/Invitation.ts';
import { Person } from '#server/models/Person.ts';
import { SentMail } from '#server/models/SentMail.ts';
import { Team } from '#server/models/Team.ts';
import { authorize } from '#server/policies/policy.ts';
import {
  presentInvitation,
  presentSentMail,
  presentTeam,
  presentTeamPerson,
} from '#server/presenters/team.ts';
import type { Services } from './services.ts';

const MAX_MAILS = 200;

export function teamRoutes({ config, limits }: Services): readonly Route[] {
  const mailIsLocal = config.smtpUrl === undefined;
  return [
    handle(readTeam, async ({ person }) => {
      const team = await Team.findByPk(person.teamId);
      authorize(person, 'read-team', team);
      return wholeTeam(person, team, mailIsLocal);
    }),

    handle(updateTeamContract, async ({ person, input }) => {
      authorize(person, 'administer-team', await Team.findByPk(person.teamId));
      return wholeTeam(person, await updateTeam(person, input.body), mailIsLocal);
    }),

    handle(updatePersonContract, async ({ person, input }) => {
      const subject = await Person.findByPk(input.params.personId);
      authorize(person, 'administer-person', subject);
      return presentTeamPerson(person, await updatePerson(person, subject.id, input.body));
    }),

    handle(createInvitation, async ({ person, input }) => {
      authorize(person, 'administer-team', await Team.findByPk(person.teamId));
      await limits.spend('invitation-team', person.teamId);
      return presentInvitation(await invitePerson(person, input.body));
    }),

    handle(deleteInvitation, async ({ person, input }) => {
      const invitation = await Invitation.findOne({
        where: { id: input.params.invitationId, acceptedAt: null },
      });
      authorize(person, 'administer-invitation', invitation);
      await withdrawInvitation(person, invitation);
    }),

    handle(listSentMail, async ({ person }) => {
      authorize(person, 'read-sent-mail', await Team.findByPk(person.teamId));
      if (!mailIsLocal) {
        throw new AppError('not-found', 'Mail goes to a real mail server; nothing is kept here.');
      }
      const mails = await SentMail.findAll({
        where: { teamId: person.teamId },
        order: [['sentAt', 'DESC']],
        limit: MAX_MAILS,
      });
      return { mails: mails.map(presentSentMail) };
    }),
  ];
}

async function wholeTeam(viewer: Person, team: Team, mailIsLocal: boolean): Promise<TeamResponse> {
  const [people, invitations] = await Promise.all([
    Person.findAll({ where: { teamId: team.id }, order: [['name', 'ASC']] }),
    Invitation.findAll({
      where: { teamId: team.id, acceptedAt: null },
      include: { model: Person, as: 'invitedBy' },
      order: [['createdAt', 'DESC']],
    }),
  ]);
  return presentTeam(viewer, { team, people, invitations, mailIsLocal });
}
