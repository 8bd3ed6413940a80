import { useAcceptRevision } from '../api/useRevisionActions.ts';
import type { RevisionDialogProps } from '../state/revisionDialog.ts';
import { TextDialog } from './TextDialog.tsx';

export function AcceptDialog({ projectId, revision, open, onOpenChange }: RevisionDialogProps) {
  const accept = useAcceptRevision(projectId, revision.id);
  return (
    <TextDialog
      open={open}
      onOpenChange={onOpenChange}
      title={`Accept R${revision.number}`}
      description="You say that model, supports and results are fit to be released. A lead decides next."
      label="Comment"
      action="Accept"
      error={accept.error}
      busy={accept.isPending}
      onConfirm={(comment) => accept.mutate({ comment }, { onSuccess: () => onOpenChange(false) })}
    />
  );
}
