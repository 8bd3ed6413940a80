import type { ReactNode } from 'react';
import { Notice } from '#src/components/Notice.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';

/** A mailed link that arrived without its token. */
export function LinkIncomplete({ title, children }: { title: string; children: ReactNode }) {
  return (
    <div className="space-y-5">
      <PageHeading title={title} />
      <Notice kind="caution">
        This link is incomplete. Open it from the e-mail again, or copy the whole of it.
      </Notice>
      <p className="text-sm">{children}</p>
    </div>
  );
}
