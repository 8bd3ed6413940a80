import { Link } from 'react-router-dom';
import { Button } from '#src/components/Button.tsx';
import { EmptyState } from '#src/components/EmptyState.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { usePerson } from '#src/hooks/useSession.ts';
import { useProjects } from '../api/projects.ts';
import { ProjectsTable } from './ProjectsTable.tsx';
import { SearchBox } from './SearchBox.tsx';
import { useSearchParam } from './useSearchParam.ts';

export default function ProjectsPage() {
  const person = usePerson();
  const [search, setSearch] = useSearchParam();
  const projects = useProjects(search);
  const create = person.abilities.createProject;
  const waiting = projects.data?.filter((project) => project.waitsForMe).length ?? 0;
  return (
    <div className="space-y-6">
      <div className="flex flex-wrap items-end justify-between gap-4">
        <div>
          <PageHeading title="Projects" />
          {projects.data && (
            <p className="mt-1 text-ink-soft">
              {waiting === 0 ? 'Nothing waits for you.' : waitingSentence(waiting)}
            </p>
          )}
        </div>
        {create && (
          <Button asChild look="primary">
            <Link to="/projects/new">New project</Link>
          </Button>
        )}
      </div>
      <SearchBox value={search} onChange={setSearch} />
      {projects.isPending && <Loading what="projects" lines={6} />}
      {projects.isError && (
        <ErrorNote error={projects.error}>
          <Button onClick={() => void projects.refetch()}>Try again</Button>
        </ErrorNote>
      )}
      {projects.data && projects.data.length > 0 && <ProjectsTable projects={projects.data} />}
      {projects.data?.length === 0 &&
        (search === '' ? (
          <NoProjects create={create} />
        ) : (
          <EmptyState
            title={`Nothing found for “${search}”`}
            action={<Button onClick={() => setSearch('')}>Show every project</Button>}
          >
            The search looks in the names of projects and machines.
          </EmptyState>
        ))}
    </div>
  );
}

const waitingSentence = (waiting: number): string =>
  waiting === 1 ? 'One project waits for you.' : `${waiting} projects wait for you.`;

function NoProjects({ create }: { create: boolean }) {
  if (!create) {
    return (
      <EmptyState title="No project is shared with you yet">
        A designer or lead of your team adds you to a project; it then stands here.
      </EmptyState>
    );
  }
  return (
    <EmptyState
      title="Begin with a frame"
      action={
        <Button asChild look="primary">
          <Link to="/projects/new">New project</Link>
        </Button>
      }
    >
      Start from a machine stand, a skid or a portal base with your dimensions, or bring a frame
      document along.
    </EmptyState>
  );
}
