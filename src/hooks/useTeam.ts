import { useQuery } from '@tanstack/react-query';
import { readTeam } from '#shared/schemas/team.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

/** The team, its people and settings. */
export const useTeam = () =>
  useQuery({ queryKey: queryKeys.team, queryFn: ({ signal }) => call(readTeam, { signal }) });
