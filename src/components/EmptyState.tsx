import type { ReactNode } from 'react';

interface EmptyStateProps {
  title: string;
  /** What to do next, or who can. */
  children: ReactNode;
  /** A button or link that does it. */
  action?: ReactNode;
}

export function EmptyState({ title, children, action }: EmptyStateProps) {
  return (
    <div className="max-w-prose border-l-2 border-pencil py-2 pl-5">
      <h2>{title}</h2>
      <p className="mt-1 text-ink-soft">{children}</p>
      {action !== undefined && <div className="mt-4 flex flex-wrap gap-2">{action}</div>}
    </div>
  );
}
