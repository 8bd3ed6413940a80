import { useState } from 'react';
import { Link, NavLink, Outlet, useLocation, useParams, useSearchParams } from 'react-router-dom';
import type { ProjectResponse } from '#shared/schemas/project.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { FrequencyLineHost } from '#src/features/frequencyLine/components/FrequencyLineHost.tsx';
import { ProjectDialog } from '#src/features/projects/components/ProjectDialog.tsx';
import { useProject } from '#src/hooks/useProject.ts';
import { useProjectEvents } from '#src/hooks/useProjectEvents.ts';
import { SheetHeader } from './SheetHeader.tsx';

/** The places of a project, in the order of the work. */
const PLACES = [
  { to: 'frame', name: 'Frame' },
  { to: 'modes', name: 'Modes' },
  { to: 'release', name: 'Release' },
] as const;

/** A drawing sheet: a slim strip, the view filling everything, the frequency line along the foot. */
export function ProjectLayout() {
  const { projectId = '' } = useParams();
  const project = useProject(projectId);
  useProjectEvents(projectId);
  return (
    <div className="flex h-dvh flex-col">
      <SheetHeader short>
        {project.data && <ProjectName project={project.data} />}
        <Places className="hidden shrink-0 sm:flex" />
      </SheetHeader>
      <main id="main" className="relative min-h-0 flex-1 overflow-auto">
        {project.data && <Outlet />}
        {project.isPending && (
          <div className="p-6">
            <Loading what="the project" />
          </div>
        )}
        {project.isError && !project.data && (
          <div className="max-w-xl space-y-4 p-6">
            <PageHeading title="Project" />
            <ErrorNote error={project.error}>
              <Button onClick={() => void project.refetch()}>Try again</Button>
              <Button asChild>
                <Link to="/projects">Projects</Link>
              </Button>
            </ErrorNote>
          </div>
        )}
      </main>
      {project.data && <FrequencyLineHost />}
      <Places className="flex shrink-0 justify-around border-t border-pencil sm:hidden" />
    </div>
  );
}

/** The project's name opens what is known of the project itself: names, people. */
function ProjectName({ project }: { project: ProjectResponse }) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <button
        type="button"
        aria-haspopup="dialog"
        title="Names and people of the project"
        onClick={() => setOpen(true)}
        className="min-h-8 min-w-0 cursor-pointer truncate rounded border border-transparent px-1 text-left hover:border-rule"
      >
        <span className="font-medium">{project.name}</span>
        {project.machine !== '' && (
          <span className="ml-2 hidden text-ink-soft lg:inline">{project.machine}</span>
        )}
      </button>
      <ProjectDialog project={project} open={open} onOpenChange={setOpen} />
    </>
  );
}

/**
 * What stays in the address from place to place: the operating state, and the revision that is looked at. Release
 * opens a revision by itself, so leaving it leads back to the draft.
 */
function useKeptSearch(): string {
  const [search] = useSearchParams();
  const { pathname } = useLocation();
  const names = pathname.endsWith('/release') ? ['state'] : ['state', 'revision'];
  const kept = names.flatMap((name) => {
    const value = search.get(name);
    return value === null ? [] : [[name, value]];
  });
  return new URLSearchParams(kept).toString();
}

function Places({ className }: { className: string }) {
  const search = useKeptSearch();
  return (
    <nav aria-label="Project" className={className}>
      {PLACES.map((place) => (
        <NavLink
          key={place.to}
          to={{ pathname: place.to, search }}
          className="inline-flex min-h-10 items-center border-b-2 border-transparent px-3 no-underline hover:border-rule aria-[current=page]:border-ink aria-[current=page]:font-medium sm:min-h-8"
        >
          {place.name}
        </NavLink>
      ))}
    </nav>
  );
}
