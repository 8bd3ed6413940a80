import type { RevisionResponse } from '#shared/schemas/revision.ts';

/** What every dialog about a revision is given. */
export interface RevisionDialogProps {
  readonly projectId: string;
  readonly revision: RevisionResponse;
  readonly open: boolean;
  readonly onOpenChange: (open: boolean) => void;
}
