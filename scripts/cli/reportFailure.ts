import { AppError } from '#shared/errors/AppError.ts';
import type { Issue } from '#shared/errors/AppError.ts';
import type { Streams } from './Streams.ts';

/** Exit code for a request or a document that cannot be solved. */
const CANNOT = 1;

/**
 * Says why a command failed and returns its exit code: every reason on standard error, or with `--json` as
 * `{"errors":[{"path","message"}]}` on standard output. Never a stack trace.
 */
export function reportFailure(error: unknown, json: boolean, { out, err }: Streams): number {
  const issues = issuesOf(error);
  if (json) {
    out(`${JSON.stringify({ errors: issues })}\n`);
  } else {
    for (const { path, message } of issues)
      err(path === '' ? `${message}\n` : `${path}: ${message}\n`);
  }
  return CANNOT;
}

function issuesOf(error: unknown): readonly Issue[] {
  if (!(error instanceof AppError)) {
    const reason = error instanceof Error ? error.message : String(error);
    return [{ path: '', message: `The solver failed unexpectedly: ${reason}` }];
  }
  const issues = error.details.issues ?? [];
  return issues.length > 0
    ? issues.map(({ path, message }) => ({ path, message }))
    : [{ path: '', message: error.message }];
}
