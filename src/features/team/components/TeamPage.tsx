import { Link } from 'react-router-dom';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { useTeam } from '#src/hooks/useTeam.ts';
import { Invitations } from './Invitations.tsx';
import { PeopleTable } from './PeopleTable.tsx';
import { ReleaseSettings } from './ReleaseSettings.tsx';

export default function TeamPage() {
  const team = useTeam();
  return (
    <div className="space-y-10">
      <div className="flex flex-wrap items-end justify-between gap-4">
        <div>
          <PageHeading title="Team" />
          {team.data && <p className="mt-1 text-ink-soft">{team.data.name}</p>}
        </div>
        {team.data?.abilities.readSentMail && (
          <Button asChild>
            <Link to="/team/mail">Sent mail</Link>
          </Button>
        )}
      </div>
      {team.isPending && <Loading what="the team" lines={6} />}
      {team.isError && (
        <ErrorNote error={team.error}>
          <Button onClick={() => void team.refetch()}>Try again</Button>
        </ErrorNote>
      )}
      {team.data && (
        <>
          <PeopleTable people={team.data.people} administer={team.data.abilities.administer} />
          {team.data.abilities.administer && <Invitations invitations={team.data.invitations} />}
          <ReleaseSettings
            settings={team.data.settings}
            administer={team.data.abilities.administer}
          />
        </>
      )}
    </div>
  );
}
