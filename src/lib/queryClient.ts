import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { ApiError } from './api.ts';
import { queryKeys } from './queryKeys.ts';

/** A refusal stays a refusal: only a lost connection or a failing server is tried again. */
const retry = (failures: number, error: Error): boolean =>
  failures < 2 && error instanceof ApiError && (error.status === 0 || error.status >= 500);

export function makeQueryClient(): QueryClient {
  // A session that has ended elsewhere shows in whatever is asked next: look again who is signed in.
  const onError = (error: Error) => {
    if (error instanceof ApiError && error.problem.code === 'not-signed-in') {
      void client.invalidateQueries({ queryKey: queryKeys.session });
    }
  };
  const client = new QueryClient({
    queryCache: new QueryCache({ onError }),
    mutationCache: new MutationCache({ onError }),
    defaultOptions: {
      queries: { retry, staleTime: 15_000 },
      mutations: { retry: false },
    },
  });
  return client;
}
