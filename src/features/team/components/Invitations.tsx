import { useState } from 'react';
import { toast } from '#src/lib/toast.ts';
import type { Invitation } from '#shared/schemas/team.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { formatDateTime } from '#src/lib/formatTime.ts';
import { useDeleteInvitation } from '../api/team.ts';
import { InviteDialog } from './InviteDialog.tsx';

/** Invitations that wait to be taken up. */
export function Invitations({ invitations }: { invitations: readonly Invitation[] }) {
  const [inviting, setInviting] = useState(false);
  const takeBack = useDeleteInvitation();
  return (
    <section className="space-y-3">
      <div className="flex flex-wrap items-center justify-between gap-4">
        <h2>Invitations</h2>
        <Button onClick={() => setInviting(true)}>Invite somebody</Button>
      </div>
      {takeBack.isError && <ErrorNote error={takeBack.error} />}
      {invitations.length === 0 ? (
        <p className="text-ink-soft">No invitation is open.</p>
      ) : (
        <ul className="border-t border-rule">
          {invitations.map((invitation) => (
            <li
              key={invitation.id}
              className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2 border-b border-rule py-2"
            >
              <span className="min-w-0">
                <span className="font-medium break-all">{invitation.email}</span> as{' '}
                {invitation.role}
                {invitation.isAdministrator && ', administrator'}
                <span className="block text-sm text-ink-soft">
                  by {invitation.invitedBy}, open until {formatDateTime(invitation.expiresAt)}
                </span>
              </span>
              <Button
                aria-label={`Take back the invitation of ${invitation.email}`}
                onClick={() =>
                  takeBack.mutate(invitation.id, {
                    onSuccess: () => toast('Invitation taken back'),
                  })
                }
              >
                Take back
              </Button>
            </li>
          ))}
        </ul>
      )}
      {inviting && <InviteDialog onClose={() => setInviting(false)} />}
    </section>
  );
}
