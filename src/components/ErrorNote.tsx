import type { ReactNode } from 'react';
import { ApiError } from '#src/lib/api.ts';
import { messageOf } from '#src/lib/messageOf.ts';
import { Notice } from './Notice.tsx';

interface ErrorNoteProps {
  error: unknown;
  /** Offered beneath: try again, go back. */
  children?: ReactNode;
}

/** A failure in the server's words, with every issue it names. */
export function ErrorNote({ error, children }: ErrorNoteProps) {
  const account = error instanceof ApiError ? error.problem : null;
  return (
    <div role="alert">
      <Notice kind="signal" word="Error">
        {messageOf(error)}
        {account?.errors && account.errors.length > 0 && <IssueList issues={account.errors} />}
        {children !== undefined && <div className="mt-2 flex gap-2">{children}</div>}
      </Notice>
    </div>
  );
}

/** Where something is wrong, and what. */
export function IssueList({ issues }: { issues: readonly { path: string; message: string }[] }) {
  return (
    <ul className="mt-2 space-y-1">
      {issues.map((issue, index) => (
        <li key={`${issue.path}-${index}`}>
          {issue.path !== '' && <code className="num mr-2 text-ink-soft">{issue.path}</code>}
          {issue.message}
        </li>
      ))}
    </ul>
  );
}
