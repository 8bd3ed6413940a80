import { useReturnRevision } from '../api/useRevisionActions.ts';
import type { RevisionDialogProps } from '../state/revisionDialog.ts';
import { TextDialog } from './TextDialog.tsx';

export function ReturnDialog({ projectId, revision, open, onOpenChange }: RevisionDialogProps) {
  const giveBack = useReturnRevision(projectId, revision.id);
  return (
    <TextDialog
      open={open}
      onOpenChange={onOpenChange}
      title={`Return R${revision.number}`}
      description="The revision ends here; the designers go on in the draft and are told by e-mail."
      label="What has to change"
      required="Say what has to change: the designers work from it."
      action="Return"
      error={giveBack.error}
      busy={giveBack.isPending}
      onConfirm={(comment) =>
        giveBack.mutate({ comment }, { onSuccess: () => onOpenChange(false) })
      }
    />
  );
}
