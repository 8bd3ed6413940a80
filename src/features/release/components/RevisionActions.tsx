import { useState } from 'react';
import type { RevisionResponse } from '#shared/schemas/revision.ts';
import { Button } from '#src/components/Button.tsx';
import { ConfirmDialog } from '#src/components/ConfirmDialog.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { useRecallRevision } from '../api/useRevisionActions.ts';
import { AcceptDialog } from './AcceptDialog.tsx';
import { ApproveDialog } from './ApproveDialog.tsx';
import { ReturnDialog } from './ReturnDialog.tsx';
import { WithdrawDialog } from './WithdrawDialog.tsx';

interface RevisionActionsProps {
  readonly projectId: string;
  readonly revision: RevisionResponse;
}

type OpenDialog = 'accept' | 'return' | 'approve' | 'withdraw' | 'recall' | null;

/** What this person can do with the revision now; what their role would have but this case withholds, with why. */
export function RevisionActions({ projectId, revision }: RevisionActionsProps) {
  const [open, setOpen] = useState<OpenDialog>(null);
  const recall = useRecallRevision(projectId, revision.id);
  const { abilities, withheld } = revision;
  const reasons = [...new Set([withheld.review, withheld.approve])].filter(
    (reason) => reason !== null,
  );
  const nothingToDo = !(
    abilities.recall ||
    abilities.review ||
    abilities.return ||
    abilities.approve ||
    abilities.withdraw
  );
  if (nothingToDo && reasons.length === 0) return null;

  const dialog = (name: Exclude<OpenDialog, null>) => ({
    projectId,
    revision,
    open: open === name,
    onOpenChange: (isOpen: boolean) => setOpen(isOpen ? name : null),
  });

  return (
    <section aria-label="What you can do" className="border-y border-rule py-4">
      <div className="flex flex-wrap gap-2">
        {abilities.review && (
          <Button look="primary" onClick={() => setOpen('accept')}>
            Accept …
          </Button>
        )}
        {abilities.approve && (
          <Button look="primary" onClick={() => setOpen('approve')}>
            Approve and lock …
          </Button>
        )}
        {abilities.return && <Button onClick={() => setOpen('return')}>Return …</Button>}
        {abilities.recall && <Button onClick={() => setOpen('recall')}>Recall …</Button>}
        {abilities.withdraw && (
          <Button look="signal" onClick={() => setOpen('withdraw')}>
            Withdraw approval …
          </Button>
        )}
      </div>
      {reasons.map((reason) => (
        <p key={reason} className="mt-1 max-w-prose text-ink-soft">
          {reason}
        </p>
      ))}
      <AcceptDialog {...dialog('accept')} />
      <ReturnDialog {...dialog('return')} />
      <ApproveDialog {...dialog('approve')} />
      <WithdrawDialog {...dialog('withdraw')} />
      <ConfirmDialog
        open={open === 'recall'}
        onOpenChange={(isOpen) => setOpen(isOpen ? 'recall' : null)}
        title={`Recall R${revision.number}?`}
        action="Recall"
        look="primary"
        busy={recall.isPending}
        onConfirm={() => recall.mutate(undefined, { onSuccess: () => setOpen(null) })}
      >
        It stays on record as recalled, for good. Work goes on in the draft, and the next submission
        gets the next number.
        {recall.error && <ErrorNote error={recall.error} />}
      </ConfirmDialog>
    </section>
  );
}
