import { QueryClient } from '@tanstack/react-query';
import { ApiError } from './api.ts';

/** A refusal stays a refusal: only a lost connection or a failing server is tried again. */
const retry = (failures: number, error: Error): boolean =>
  failures < 2 && error instanceof ApiError && (error.status === 0 || error.status >= 500);

export const makeQueryClient = (): QueryClient =>
  new QueryClient({
    defaultOptions: {
      queries: { retry, staleTime: 15_000, refetchOnWindowFocus: true },
      mutations: { retry: false },
    },
  });
