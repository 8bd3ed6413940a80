import { useSolves } from '#src/hooks/useSolves.ts';

/** The solves of exactly this draft; waits until its fingerprint is known. */
export const useDraftSolves = (projectId: string, fingerprint: string | undefined) =>
  useSolves(projectId, fingerprint === undefined ? {} : { fingerprint }, {
    enabled: fingerprint !== undefined,
  });
