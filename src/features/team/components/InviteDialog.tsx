import { zodResolver } from '@hookform/resolvers/zod';
import { Controller, useForm } from 'react-hook-form';
import { toast } from '#src/lib/toast.ts';
import { z } from 'zod';
import { emailAddress, role, ROLES } from '#shared/schemas/common.ts';
import { Button } from '#src/components/Button.tsx';
import { Checkbox } from '#src/components/Checkbox.tsx';
import { Dialog, DialogButtons } from '#src/components/Dialog.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Select } from '#src/components/Select.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { ROLE_DESCRIPTIONS } from '#src/lib/roles.ts';
import { useCreateInvitation } from '../api/team.ts';

const form = z.object({ email: emailAddress, role, isAdministrator: z.boolean() });

const ROLE_OPTIONS = ROLES.map((one) => ({
  value: one,
  label: `${one}: ${ROLE_DESCRIPTIONS[one]}`,
}));

export function InviteDialog({ onClose }: { onClose: () => void }) {
  const invite = useCreateInvitation();
  const { register, control, handleSubmit, formState } = useForm<
    z.input<typeof form>,
    unknown,
    z.output<typeof form>
  >({
    resolver: zodResolver(form),
    defaultValues: { email: '', role: 'designer', isAdministrator: false },
  });
  const submit = handleSubmit((values) =>
    invite.mutate(values, {
      onSuccess: (invitation) => {
        toast(`Invitation sent to ${invitation.email}`);
        onClose();
      },
    }),
  );
  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      title="Invite somebody"
      description="A link to join goes out by e-mail. It works once and expires."
    >
      <form noValidate className="space-y-4" onSubmit={(event) => void submit(event)}>
        {invite.isError && <ErrorNote error={invite.error} />}
        <TextInput
          label="E-mail"
          type="email"
          autoComplete="off"
          error={formState.errors.email?.message}
          {...register('email')}
        />
        <Controller
          control={control}
          name="role"
          render={({ field }) => (
            <Select
              label="Role"
              value={field.value}
              options={ROLE_OPTIONS}
              onValueChange={field.onChange}
            />
          )}
        />
        <Controller
          control={control}
          name="isAdministrator"
          render={({ field }) => (
            <Checkbox
              label="Administrator"
              hint="Team settings, invitations and roles."
              checked={field.value}
              onCheckedChange={field.onChange}
            />
          )}
        />
        <DialogButtons>
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" look="primary" busy={invite.isPending}>
            Send the invitation
          </Button>
        </DialogButtons>
      </form>
    </Dialog>
  );
}
