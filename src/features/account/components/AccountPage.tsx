import { PageHeading } from '#src/components/PageHeading.tsx';
import { usePerson } from '#src/hooks/useSession.ts';
import { NameForm } from './NameForm.tsx';
import { PasswordForm } from './PasswordForm.tsx';
import { Preferences } from './Preferences.tsx';
import { SignOutEverywhere } from './SignOutEverywhere.tsx';

export default function AccountPage() {
  const person = usePerson();
  return (
    <div className="max-w-xl space-y-10">
      <div>
        <PageHeading title="Account" />
        <p className="mt-1 text-ink-soft">
          {person.email} · {person.role}
          {person.isAdministrator && ', administrator'} in {person.team.name}
        </p>
      </div>
      <Preferences person={person} />
      <NameForm person={person} />
      <PasswordForm email={person.email} />
      <SignOutEverywhere />
    </div>
  );
}
