import { Op } from 'sequelize';
import { AuditEntry } from '#server/models/AuditEntry.ts';
import { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { ProjectMember } from '#server/models/ProjectMember.ts';
import { Team } from '#server/models/Team.ts';
import { can } from '#server/policies/policy.ts';

export interface ActivityQuery {
  /** One that the person may read. */
  readonly projectId?: string | undefined;
  /** Only entries before this sequence number. */
  readonly before?: number | undefined;
  readonly limit: number;
}

export interface ActivityPage {
  /** Newest first. */
  readonly entries: readonly AuditEntry[];
  /** By id, of everybody in the team. */
  readonly peopleNames: ReadonlyMap<string, string>;
  readonly projectNames: ReadonlyMap<string, string>;
  /** Whether older entries follow. */
  readonly hasMore: boolean;
}

/** What happened in the projects the person may read, and in the team itself for those who may see that. */
export async function listActivity(person: Person, query: ActivityQuery): Promise<ActivityPage> {
  const { teamId } = person;
  const [team, people, projects] = await Promise.all([
    Team.findByPk(teamId, { rejectOnEmpty: true }),
    Person.findAll({ where: { teamId }, attributes: ['id', 'name'] }),
    Project.findAll({ where: { teamId }, include: { model: ProjectMember, as: 'memberships' } }),
  ]);
  const readable = projects.filter((project) => can(person, 'read-project', project));
  const found = await AuditEntry.findAll({
    where: {
      teamId,
      projectId:
        query.projectId ?? visibleProjects(readable, can(person, 'read-team-activity', team)),
      ...(query.before === undefined ? {} : { sequence: { [Op.lt]: query.before } }),
    },
    order: [['sequence', 'DESC']],
    limit: query.limit + 1,
  });
  return {
    entries: found.slice(0, query.limit),
    peopleNames: new Map(people.map(({ id, name }) => [id, name])),
    projectNames: new Map(readable.map(({ id, name }) => [id, name])),
    hasMore: found.length > query.limit,
  };
}

/** The condition on `projectId`; entries of the team itself have none. */
function visibleProjects(projects: readonly Project[], withTeam: boolean) {
  const inProjects = { [Op.in]: projects.map(({ id }) => id) };
  return withTeam ? { [Op.or]: [inProjects, { [Op.is]: null }] } : inProjects;
}
