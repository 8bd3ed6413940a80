import { useQuery } from '@tanstack/react-query';
import { readSession, type SessionResponse, type SignedInPerson } from '#shared/schemas/session.ts';
import { call, rememberCsrfToken } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

/** Fetches the session and keeps its token for the requests that follow. */
export async function fetchSession(): Promise<SessionResponse> {
  const session = await call(readSession, {});
  rememberCsrfToken(session.csrfToken);
  return session;
}

export const useSession = () =>
  useQuery({ queryKey: queryKeys.session, queryFn: fetchSession, staleTime: 60_000 });

/** The person signed in. Only for screens behind RequireSession, which has seen to it that there is one. */
export function usePerson(): SignedInPerson {
  const person = useSession().data?.person;
  if (!person) throw new Error('usePerson is for screens behind RequireSession.');
  return person;
}
