import { Link, useSearchParams } from 'react-router-dom';
import type { RevisionBrief } from '#shared/schemas/revision.ts';
import { formatFrequency } from '#shared/units/formatFrequency.ts';
import { IncompleteMark } from '#src/components/IncompleteMark.tsx';
import { NoticeMark } from '#src/components/Notice.tsx';
import { formatDate } from '#src/lib/formatTime.ts';
import { REVISION_WORDS } from '../state/revisionWords.ts';

/** A list compares revisions; the accuracy of each figure is stated where its results are. */
const LIST_DIGITS = 4;

interface RevisionListProps {
  readonly revisions: readonly RevisionBrief[];
  readonly openNumber: number | null;
}

/** The revisions, newest first; the open one is marked. */
export function RevisionList({ revisions, openNumber }: RevisionListProps) {
  const [search] = useSearchParams();
  const hrefFor = (number: number): string => {
    const next = new URLSearchParams(search);
    next.set('revision', String(number));
    return `?${next.toString()}`;
  };
  return (
    <nav aria-labelledby="revisions-heading">
      <h2 id="revisions-heading" className="mb-2">
        Revisions
      </h2>
      <ol className="border-t border-rule">
        {revisions.map((revision) => {
          const { word, kind } = REVISION_WORDS[revision.state];
          return (
            <li key={revision.id} className="border-b border-rule">
              <Link
                to={hrefFor(revision.number)}
                aria-current={revision.number === openNumber ? 'true' : undefined}
                className="grid grid-cols-[3rem_1fr_auto] items-baseline gap-x-2 border-l-2 border-transparent py-2 pl-2 hover:bg-sheet aria-[current=true]:border-ink aria-[current=true]:bg-sheet"
              >
                <span className="num font-medium">R{revision.number}</span>
                <span className="flex items-center gap-1.5">
                  <NoticeMark kind={kind} />
                  {word}
                </span>
                <span className="text-sm text-ink-soft">{formatDate(revision.submittedAt)}</span>
                <span className="col-span-2 col-start-2 line-clamp-2 text-sm break-words text-ink-soft">
                  {revision.changeNote}
                </span>
                {revision.firstFrequencyHz !== null && (
                  <span className="col-span-2 col-start-2 flex flex-wrap gap-x-2 text-sm text-ink-soft">
                    <span>
                      first{' '}
                      <span className="num">
                        {formatFrequency(revision.firstFrequencyHz, LIST_DIGITS)}
                      </span>
                    </span>
                    {revision.firstFrequencyComplete === false && <IncompleteMark />}
                  </span>
                )}
              </Link>
            </li>
          );
        })}
      </ol>
    </nav>
  );
}
