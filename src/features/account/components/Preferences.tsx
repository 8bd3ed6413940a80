import { toast } from '#src/lib/toast.ts';
import type { SignedInPerson, Theme } from '#shared/schemas/session.ts';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Select, type SelectOption } from '#src/components/Select.tsx';
import { useUpdateAccount } from '../api/account.ts';

const UNITS: readonly SelectOption<SignedInPerson['units']>[] = [
  { value: 'mm-kg-N', label: 'mm · kg · N' },
  { value: 'm-kg-N', label: 'm · kg · N' },
  { value: 'in-lbm-lbf', label: 'in · lbm · lbf' },
];

const THEMES: readonly SelectOption<Theme>[] = [
  { value: 'system', label: 'As this device is set' },
  { value: 'paper', label: 'Paper: graphite on white' },
  { value: 'chalk', label: 'Chalk: white on ink blue' },
];

/** Taken over at once; nothing to save. */
export function Preferences({ person }: { person: SignedInPerson }) {
  const update = useUpdateAccount();
  const change = (body: { units?: SignedInPerson['units']; theme?: Theme }, said: string) =>
    update.mutate(body, { onSuccess: () => toast(said) });
  return (
    <section className="space-y-4">
      <h2>How you see things</h2>
      {update.isError && <ErrorNote error={update.error} />}
      <Select
        label="Units"
        hint="What is shown and what a bare number means. Any unit may be typed; frames are stored in SI."
        value={person.units}
        options={UNITS}
        onValueChange={(units) => change({ units }, 'Units changed')}
      />
      <Select
        label="Theme"
        value={person.theme}
        options={THEMES}
        onValueChange={(theme) => change({ theme }, 'Theme changed')}
      />
    </section>
  );
}
