/** Keys of the query cache, all in one place: an invalidation names exactly what it makes stale. */
export const queryKeys = {
  session: ['session'] as const,
  team: ['team'] as const,
  sentMail: ['team', 'mail'] as const,
  projects: ['projects'] as const,
  projectList: (search: string) => ['projects', 'list', search] as const,
  project: (projectId: string) => ['project', projectId] as const,
  draft: (projectId: string) => ['project', projectId, 'draft'] as const,
  solves: (projectId: string) => ['project', projectId, 'solves'] as const,
  solvesOf: (projectId: string, of: { fingerprint?: string; revisionId?: string }) =>
    ['project', projectId, 'solves', of] as const,
  revisions: (projectId: string) => ['project', projectId, 'revisions'] as const,
  revision: (revisionId: string) => ['revision', revisionId] as const,
  solve: (solveId: string) => ['solve', solveId] as const,
  solveShapes: (solveId: string) => ['solve', solveId, 'shapes'] as const,
  activity: (projectId: string | null) => ['activity', projectId] as const,
};
