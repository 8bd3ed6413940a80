import { ApiError } from './api.ts';

/** What to tell a person about a failure. */
export function messageOf(error: unknown): string {
  if (error instanceof ApiError) return error.message;
  return 'Something went wrong in this window. Reload the page and try again.';
}
