import { useWithdrawRevision } from '../api/useRevisionActions.ts';
import type { RevisionDialogProps } from '../state/revisionDialog.ts';
import { TextDialog } from './TextDialog.tsx';

export function WithdrawDialog({ projectId, revision, open, onOpenChange }: RevisionDialogProps) {
  const withdraw = useWithdrawRevision(projectId, revision.id);
  return (
    <TextDialog
      open={open}
      onOpenChange={onOpenChange}
      title={`Withdraw the approval of R${revision.number}`}
      description="The record of the approval stays; the revision is marked as not to be built from. This is final."
      label="Reason"
      required="Give the reason: the workshop and the customer will read it."
      action="Withdraw approval"
      look="signal"
      error={withdraw.error}
      busy={withdraw.isPending}
      onConfirm={(reason) => withdraw.mutate({ reason }, { onSuccess: () => onOpenChange(false) })}
    />
  );
}
