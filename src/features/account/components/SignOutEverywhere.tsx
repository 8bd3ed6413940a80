import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { Button } from '#src/components/Button.tsx';
import { ConfirmDialog } from '#src/components/ConfirmDialog.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { useSignOutEverywhere } from '../api/account.ts';

export function SignOutEverywhere() {
  const [asking, setAsking] = useState(false);
  const leave = useSignOutEverywhere();
  const client = useQueryClient();
  const navigate = useNavigate();
  const confirm = () =>
    leave.mutate(undefined, {
      onSuccess: () => void Promise.resolve(navigate('/sign-in')).then(() => client.clear()),
      onError: () => setAsking(false),
    });
  return (
    <section className="space-y-4">
      <h2>Sessions</h2>
      {leave.isError && <ErrorNote error={leave.error} />}
      <p className="text-ink-soft">
        A device lost, or a browser left open somewhere: end every session at once.
      </p>
      <Button onClick={() => setAsking(true)}>Sign out everywhere</Button>
      <ConfirmDialog
        open={asking}
        onOpenChange={setAsking}
        title="Sign out everywhere?"
        action="Sign out everywhere"
        look="primary"
        busy={leave.isPending}
        onConfirm={confirm}
      >
        Every session ends, this one included. You sign in again afterwards.
      </ConfirmDialog>
    </section>
  );
}
