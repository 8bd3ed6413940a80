import { useEffect } from 'react';
import { useBlocker } from 'react-router-dom';
import { useStore } from 'zustand';
import { ConfirmDialog } from '#src/components/ConfirmDialog.tsx';
import type { Autosave } from '../state/autosave.ts';

/** Saves before the screen is left; where that fails, asks before the changes are lost. */
export function LeaveGuard({ autosave }: { autosave: Autosave }) {
  const unsaved = useStore(autosave.status, ({ kind }) => kind !== 'saved');
  const blocker = useBlocker(
    ({ currentLocation, nextLocation }) =>
      unsaved && currentLocation.pathname !== nextLocation.pathname,
  );
  const blocked = blocker.state === 'blocked';

  useEffect(() => {
    if (blocker.state !== 'blocked') return;
    void autosave.flush().then((saved) => {
      if (saved) blocker.proceed();
    });
  }, [autosave, blocker]);
  useEffect(() => {
    if (!unsaved) return undefined;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [unsaved]);

  const failing = useStore(
    autosave.status,
    ({ kind }) => kind !== 'saved' && kind !== 'saving' && kind !== 'changed',
  );
  return (
    <ConfirmDialog
      open={blocked && failing}
      onOpenChange={(open) => {
        if (!open && blocker.state === 'blocked') blocker.reset();
      }}
      title="Leave without saving?"
      action="Leave and lose the changes"
      onConfirm={() => {
        if (blocker.state === 'blocked') blocker.proceed();
      }}
    >
      Your last changes to the frame could not be saved. The title block says why.
    </ConfirmDialog>
  );
}
