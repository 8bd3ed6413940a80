import { useState } from 'react';
import { Button } from '#src/components/Button.tsx';
import { Dialog, DialogButtons } from '#src/components/Dialog.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { useApproveRevision } from '../api/useRevisionActions.ts';
import type { RevisionDialogProps } from '../state/revisionDialog.ts';
import { CAUTIONS } from '../state/revisionWords.ts';

/** Approval: what is being locked and what it means, then the password again. */
export function ApproveDialog({ projectId, revision, open, onOpenChange }: RevisionDialogProps) {
  const approve = useApproveRevision(projectId, revision.id);
  const [password, setPassword] = useState('');
  const [tried, setTried] = useState(false);
  const lacking = password === '';

  const close = (isOpen: boolean): void => {
    setPassword('');
    setTried(false);
    onOpenChange(isOpen);
  };

  return (
    <Dialog
      open={open}
      onOpenChange={close}
      title={`Approve and lock R${revision.number}`}
      description="Scope: calculation released for manufacture."
    >
      <p>
        Locked for good: the document, the settings, {revision.solves.length} results, the reviews
        and the state of the team’s audit chain. An earlier approved revision becomes superseded.
      </p>
      <p className="mt-2 text-sm text-ink-soft">
        Document <code className="num break-all">{revision.documentFingerprint}</code>
      </p>
      <ul className="mt-3 list-disc pl-5 text-sm text-ink-soft">
        {CAUTIONS.map((caution) => (
          <li key={caution}>{caution}</li>
        ))}
      </ul>
      <form
        noValidate
        className="mt-4"
        onSubmit={(event) => {
          event.preventDefault();
          setTried(true);
          if (!lacking) approve.mutate({ password }, { onSuccess: () => close(false) });
        }}
      >
        <TextInput
          label="Your password"
          type="password"
          autoComplete="current-password"
          error={
            tried && lacking ? 'Enter your password: an approval is signed with it.' : undefined
          }
          value={password}
          onChange={(event) => setPassword(event.target.value)}
        />
        {approve.error && (
          <div className="mt-3">
            <ErrorNote error={approve.error} />
          </div>
        )}
        <DialogButtons>
          <Button onClick={() => close(false)}>Cancel</Button>
          <Button type="submit" look="primary" busy={approve.isPending}>
            Approve and lock
          </Button>
        </DialogButtons>
      </form>
    </Dialog>
  );
}
