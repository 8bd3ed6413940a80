import { randomUUID } from 'node:crypto';
import type { Express } from 'express';
import { SOLVER_VERSION } from '#shared/analysis/solverVersion.ts';
import { ROLES, type Role } from '#shared/schemas/common.ts';
import { DEFAULT_SOLVE_SETTINGS } from '#shared/schemas/solveResult.ts';
import { createProject } from '#server/commands/createProject.ts';
import { inTransaction } from '#server/models/database.ts';
import { Draft } from '#server/models/Draft.ts';
import { Invitation } from '#server/models/Invitation.ts';
import type { Person } from '#server/models/Person.ts';
import { ProjectMember } from '#server/models/ProjectMember.ts';
import { Revision } from '#server/models/Revision.ts';
import { RevisionAuthor } from '#server/models/RevisionAuthor.ts';
import type { Team } from '#server/models/Team.ts';
import { signedIn, visitor, type Client } from '#tests/api/setup/client.ts';
import { aPortal } from '#tests/builders/aFrame.ts';
import { anAdministrator, aPerson } from '#tests/builders/aPerson.ts';
import { aTeam } from '#tests/builders/aTeam.ts';

/**
 * Who asks. The project of the world is shared with its guest, technician and designer; reviewer and lead need
 * no share. `outsider` is a designer of the team it is not shared with; `administrator` is a technician with the
 * switch, whom it is not shared with either.
 */
export type Actor = 'visitor' | Role | 'outsider' | 'administrator';
export const ACTORS: readonly Actor[] = ['visitor', ...ROLES, 'outsider', 'administrator'];

/** Nobody signed in, and people of the team or of another one. */
export interface Asker {
  readonly person: Person | null;
  readonly client: Client;
}

export interface World {
  readonly express: Express;
  readonly team: Team;
  readonly projectId: string;
  readonly revisionId: string;
  readonly solveId: string;
  /** Somebody of the team whom things may be done to. */
  readonly subject: Person;
  readonly own: Readonly<Record<Actor, Asker>>;
  /** The five roles in another team, every one of them with the administrator switch. */
  readonly foreign: readonly Asker[];
  /** A new open invitation of the team; gives its id. */
  readonly invite: () => Promise<string>;
}

export async function aWorld(express: Express): Promise<World> {
  const team = await aTeam();
  const author = await aPerson(team, { name: 'Perrin Oake' });
  const subject = await aPerson(team, { name: 'Sable Wynn', role: 'guest' });
  await anAdministrator(team);
  const people = {
    ...(await everyRole(team, {})),
    outsider: await aPerson(team),
    administrator: await aPerson(team, { role: 'technician', isAdministrator: true }),
  };
  const projectId = randomUUID();
  await createProject(author, { id: projectId, name: 'Stand 4', machine: '', document: aPortal() });
  await ProjectMember.bulkCreate(
    [people.guest, people.technician, people.designer, subject].map(({ id }) => ({
      ...{ projectId, personId: id, addedById: author.id },
    })),
  );
  const asAuthor = await signedIn(express, author);
  const asked = await asAuthor.post('/api/solves', { projectId }).expect(202);
  const [solve] = (asked.body as { solves: { id: string }[] }).solves;
  const own = { visitor: { person: null, client: await visitor(express) } } as Record<Actor, Asker>;
  for (const [actor, person] of Object.entries(people)) {
    own[actor as Role] = { person, client: await signedIn(express, person) };
  }
  const elsewhere = await aTeam('Elsewhere');
  const foreign: Asker[] = [];
  for (const person of Object.values(await everyRole(elsewhere, { isAdministrator: true }))) {
    foreign.push({ person, client: await signedIn(express, person) });
  }
  return {
    ...{ express, team, projectId, subject, own, foreign },
    solveId: solve?.id ?? '',
    revisionId: await aRevision(team, projectId, author),
    invite: () => anInvitation(team, author),
  };
}

async function everyRole(
  team: Team,
  overrides: { readonly isAdministrator?: boolean },
): Promise<Record<Role, Person>> {
  const people: Partial<Record<Role, Person>> = {};
  for (const role of ROLES) people[role] = await aPerson(team, { role, ...overrides });
  return people as Record<Role, Person>;
}

/** Straight into the database: access does not depend on what a revision holds. */
function aRevision(team: Team, projectId: string, author: Person): Promise<string> {
  return inTransaction(async (transaction) => {
    const draft = await Draft.findByPk(projectId, { transaction, rejectOnEmpty: true });
    const { id } = await Revision.create(
      {
        id: randomUUID(),
        teamId: team.id,
        projectId,
        number: 1,
        state: 'submitted',
        changeNote: 'first',
        draftVersion: draft.version,
        documentFingerprint: draft.fingerprint,
        settings: DEFAULT_SOLVE_SETTINGS,
        solverVersion: SOLVER_VERSION,
        requiredReviews: 5,
        soleReviewerMayApprove: false,
        submittedById: author.id,
      },
      { transaction },
    );
    await RevisionAuthor.create({ revisionId: id, personId: author.id }, { transaction });
    return id;
  });
}

async function anInvitation(team: Team, by: Person): Promise<string> {
  const { id } = await Invitation.create({
    teamId: team.id,
    email: `${randomUUID()}@example.com`,
    role: 'guest',
    isAdministrator: false,
    invitedById: by.id,
    expiresAt: new Date(Date.now() + 86_400_000),
  });
  return id;
}
