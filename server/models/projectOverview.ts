import { QueryTypes } from 'sequelize';
import type { RevisionState } from '#shared/schemas/project.ts';
import { database } from './database.ts';

/** The revision of a project with the highest number. */
export interface LatestRevision {
  readonly number: number;
  readonly state: RevisionState;
  readonly authorIds: readonly string[];
  readonly acceptedByIds: readonly string[];
  readonly soleReviewerMayApprove: boolean;
}

/** A project with all that a row of the Projects table says of it. */
export interface ProjectOverview {
  readonly id: string;
  readonly teamId: string;
  readonly name: string;
  readonly machine: string;
  readonly updatedAt: Date;
  readonly memberIds: readonly string[];
  readonly draftVersion: number;
  readonly draftFingerprint: string;
  /** Lowest elastic natural frequency of the draft over the states solved so far, expected supports. */
  readonly firstFrequencyHz: number | null;
  /** False where one of those solves is incomplete, so that a lower one may be missing. */
  readonly firstFrequencyComplete: boolean | null;
  readonly latest: LatestRevision | null;
  readonly approved: {
    readonly number: number;
    readonly approvedAt: string;
    readonly documentFingerprint: string;
  } | null;
}

const SELECT = `
  SELECT p.id, p.team_id AS "teamId", p.name, p.machine, p.updated_at AS "updatedAt",
    ARRAY(SELECT m.person_id::text FROM project_members m WHERE m.project_id = p.id) AS "memberIds",
    d.version AS "draftVersion", d.fingerprint::text AS "draftFingerprint",
    first.hz AS "firstFrequencyHz", first.complete AS "firstFrequencyComplete",
    latest.said AS latest, approved.said AS approved
  FROM projects p
  JOIN drafts d ON d.project_id = p.id
  LEFT JOIN LATERAL (
    SELECT min(one.first_frequency_hz) AS hz, bool_and(one.complete) AS complete
      FROM (SELECT DISTINCT ON (r.state_id) r.first_frequency_hz, r.complete
              FROM solve_results r
             WHERE r.team_id = p.team_id AND r.document_fingerprint = d.fingerprint
               AND r.method = 'consistent'
               AND coalesce(r.settings ->> 'supports', 'expected') = 'expected'
             ORDER BY r.state_id, r.complete DESC, r.first_frequency_hz) AS one
  ) first ON true
  LEFT JOIN LATERAL (
    SELECT jsonb_build_object(
        'number', r.number, 'state', r.state,
        'soleReviewerMayApprove', r.sole_reviewer_may_approve,
        'authorIds', ARRAY(SELECT a.person_id FROM revision_authors a WHERE a.revision_id = r.id),
        'acceptedByIds', ARRAY(SELECT v.reviewer_id FROM reviews v
                                WHERE v.revision_id = r.id AND v.verdict = 'accept')) AS said
      FROM revisions r WHERE r.project_id = p.id ORDER BY r.number DESC LIMIT 1
  ) latest ON true
  LEFT JOIN LATERAL (
    SELECT jsonb_build_object('number', r.number, 'approvedAt', r.approved_at,
        'documentFingerprint', r.document_fingerprint) AS said
      FROM revisions r WHERE r.project_id = p.id AND r.state = 'approved'
  ) approved ON true
  WHERE p.team_id = :teamId`;

/** All projects of a team, latest change first, in one query. @param search part of name or machine */
export function listProjectOverviews(teamId: string, search = ''): Promise<ProjectOverview[]> {
  return database().query<ProjectOverview>(
    `${SELECT}
       AND (position(lower(:search) in lower(p.name)) > 0
         OR position(lower(:search) in lower(p.machine)) > 0)
     ORDER BY p.updated_at DESC, p.id`,
    { type: QueryTypes.SELECT, replacements: { teamId, search } },
  );
}

export async function findProjectOverview(
  teamId: string,
  id: string,
): Promise<ProjectOverview | null> {
  const [found] = await database().query<ProjectOverview>(`${SELECT} AND p.id = :id`, {
    type: QueryTypes.SELECT,
    replacements: { teamId, id },
  });
  return found ?? null;
}
