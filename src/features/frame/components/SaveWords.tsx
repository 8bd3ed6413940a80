import { useState } from 'react';
import { useStore } from 'zustand';
import { describeChanges } from '#shared/frame/documentDiff.ts';
import type { DocumentList } from '#shared/frame/documentDiff.ts';
import type { StaleDraftDetails } from '#shared/schemas/project.ts';
import { Button } from '#src/components/Button.tsx';
import { Dialog, DialogButtons } from '#src/components/Dialog.tsx';
import { formatDateTime } from '#src/lib/formatTime.ts';
import type { Autosave, SaveStatus } from '../state/autosave.ts';

/** Whether the draft is saved, in words; where somebody else changed it, the choice between both. */
export function SaveWords({
  autosave,
  onShowProblems,
}: {
  autosave: Autosave;
  onShowProblems: () => void;
}) {
  const status = useStore(autosave.status);
  const needsWork = status.kind === 'faulty' || status.kind === 'refused';
  return (
    <span aria-live="polite">
      {needsWork && (
        <span aria-hidden="true" className="mr-1 text-signal-text">
          ▲
        </span>
      )}
      {wordsOf(status)}{' '}
      {status.kind === 'faulty' && (
        <button type="button" className="link cursor-pointer" onClick={onShowProblems}>
          Show
        </button>
      )}
      {(status.kind === 'refused' || status.kind === 'offline') && (
        <button type="button" className="link cursor-pointer" onClick={() => void autosave.flush()}>
          Try again
        </button>
      )}
      {status.kind === 'conflict' && <Conflict autosave={autosave} theirs={status.theirs} />}
    </span>
  );
}

function wordsOf(status: SaveStatus): string {
  switch (status.kind) {
    case 'saved':
      return 'saved';
    case 'changed':
      return 'not saved yet';
    case 'saving':
      return 'saving …';
    case 'offline':
      return 'not saved: no connection';
    case 'faulty':
      return `not saved: ${status.faults} to mend`;
    case 'refused':
      return `not saved: ${status.message}`;
    case 'conflict':
      return 'not saved: changed by somebody else';
  }
}

function Conflict({ autosave, theirs }: { autosave: Autosave; theirs: StaleDraftDetails }) {
  const [open, setOpen] = useState(true);
  const [busy, setBusy] = useState(false);
  const decide = (how: () => Promise<unknown>) => {
    setBusy(true);
    void how().finally(() => setBusy(false));
  };
  const changes = theirs.changes.map((change) => ({
    ...change,
    list: change.list as DocumentList | 'frame',
  }));
  return (
    <>
      <button type="button" className="link cursor-pointer" onClick={() => setOpen(true)}>
        Decide
      </button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        title="The draft was changed by somebody else"
        description={`${theirs.updatedBy.name} saved it ${formatDateTime(theirs.updatedAt)}, while you were changing it too.`}
      >
        <p>Theirs: {describeChanges(changes)}</p>
        <p className="mt-2 text-ink-soft">
          Taking theirs drops what you changed since your last save. Keeping yours saves it as the
          newest version, without what they changed.
        </p>
        <DialogButtons>
          <Button busy={busy} onClick={() => decide(autosave.takeTheirs)}>
            Take theirs
          </Button>
          <Button look="primary" busy={busy} onClick={() => decide(autosave.keepMine)}>
            Keep mine as the newest version
          </Button>
        </DialogButtons>
      </Dialog>
    </>
  );
}
