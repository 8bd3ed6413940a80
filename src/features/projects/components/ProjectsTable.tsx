import { Link } from 'react-router-dom';
import type { ProjectSummary } from '#shared/schemas/project.ts';
import { formatFrequency } from '#shared/units/formatFrequency.ts';
import { IncompleteMark } from '#src/components/IncompleteMark.tsx';
import { DataTable, type DataColumn } from '#src/components/dataTable/DataTable.tsx';
import { useNarrowScreen } from '#src/hooks/useNarrowScreen.ts';
import { formatDate } from '#src/lib/formatTime.ts';
import { WaitsFor } from './WaitsFor.tsx';

/** A list compares frames; the accuracy of each figure is stated where its solve is. */
const LIST_DIGITS = 4;

const COLUMNS: readonly DataColumn<ProjectSummary>[] = [
  {
    id: 'machine',
    header: 'Machine',
    sortValue: (project) => project.machine,
    cell: (project) => project.machine || <span className="text-ink-soft">not named</span>,
  },
  {
    id: 'project',
    header: 'Project',
    rowHeader: true,
    sortValue: (project) => project.name,
    cell: (project) => (
      <>
        <Link to={`/projects/${project.id}`} className="link font-medium">
          {project.name}
        </Link>
        <span className="block text-ink-soft sm:hidden">{project.machine}</span>
      </>
    ),
  },
  {
    id: 'approved',
    header: 'Approved',
    sortValue: (project) => project.approvedRevision?.approvedAt ?? null,
    cell: (project) =>
      project.approvedRevision ? (
        <>
          <span className="num">R{project.approvedRevision.number}</span>{' '}
          <span className="whitespace-nowrap text-ink-soft">
            {formatDate(project.approvedRevision.approvedAt)}
          </span>
        </>
      ) : (
        <span className="text-ink-soft">none yet</span>
      ),
  },
  {
    id: 'first',
    header: 'First mode',
    numeric: true,
    sortValue: (project) => project.firstFrequencyHz,
    cell: (project) => (
      <>
        {project.firstFrequencyHz === null ? (
          <span className="font-sans text-ink-soft">
            {project.firstFrequencyComplete === null ? 'not solved' : 'none found'}
          </span>
        ) : (
          formatFrequency(project.firstFrequencyHz, LIST_DIGITS)
        )}
        {project.firstFrequencyComplete === false && (
          <span className="block text-sm">
            <IncompleteMark />
          </span>
        )}
      </>
    ),
  },
  {
    id: 'waits',
    header: 'With',
    sortValue: (project) => (project.waitsForMe ? 0 : 1),
    cell: (project) => <WaitsFor project={project} />,
  },
  {
    id: 'updated',
    header: 'Updated',
    sortValue: (project) => project.updatedAt,
    cell: (project) => (
      <time dateTime={project.updatedAt} className="whitespace-nowrap text-ink-soft">
        {formatDate(project.updatedAt)}
      </time>
    ),
  },
];

/** What fits a phone; the machine then stands under the project's name. */
const NARROW = new Set(['project', 'first', 'waits']);
const NARROW_COLUMNS = COLUMNS.filter((column) => NARROW.has(column.id));

/** Every project one may read: what it is, how far it is, and whose move it is. */
export function ProjectsTable({ projects }: { projects: readonly ProjectSummary[] }) {
  const narrow = useNarrowScreen();
  return (
    <DataTable
      caption="Projects"
      captionHidden
      rows={projects}
      columns={narrow ? NARROW_COLUMNS : COLUMNS}
      rowKey={(project) => project.id}
    />
  );
}
