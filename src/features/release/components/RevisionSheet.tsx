import { Link } from 'react-router-dom';
import type { RevisionResponse } from '#shared/schemas/revision.ts';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { Notice } from '#src/components/Notice.tsx';
import { useRevision } from '#src/hooks/useRevision.ts';
import { formatDateTime } from '#src/lib/formatTime.ts';
import { CAUTIONS, REVISION_WORDS } from '../state/revisionWords.ts';
import { LockRecordTable } from './LockRecordTable.tsx';
import { RevisionActions } from './RevisionActions.tsx';
import { RevisionComments } from './RevisionComments.tsx';
import { RevisionResults } from './RevisionResults.tsx';

interface RevisionSheetProps {
  readonly projectId: string;
  readonly revisionId: string;
}

/** One revision: its state, what it rests on, its reviews and what can be done with it now. */
export function RevisionSheet({ projectId, revisionId }: RevisionSheetProps) {
  const { data: revision, error } = useRevision(revisionId);
  if (error) return <ErrorNote error={error} />;
  if (!revision) return <Loading what="the revision" lines={8} />;

  return (
    <article aria-labelledby="revision-heading" className="flex flex-col gap-8">
      <RevisionHead projectId={projectId} revision={revision} />
      <RevisionActions projectId={projectId} revision={revision} />
      <RevisionResults revision={revision} />
      <Reviews revision={revision} />
      <RevisionComments revision={revision} />
      {revision.lock && <LockRecordTable lock={revision.lock} revision={revision} />}
      <section aria-labelledby="cautions-heading">
        <h3 id="cautions-heading">Cautions</h3>
        <ul className="mt-1 list-disc pl-5 text-sm text-ink-soft">
          {CAUTIONS.map((caution) => (
            <li key={caution}>{caution}</li>
          ))}
        </ul>
      </section>
    </article>
  );
}

function RevisionHead({ projectId, revision }: { projectId: string; revision: RevisionResponse }) {
  const { word, meaning, kind } = REVISION_WORDS[revision.state];
  const at = `?revision=${revision.number}`;
  return (
    <header>
      <h2 id="revision-heading" className="text-xl">
        R{revision.number}
      </h2>
      <div className="mt-2" aria-live="polite">
        <Notice kind={kind} word={word}>
          {meaning}
          {revision.withdrawal && (
            <p className="mt-1 break-words whitespace-pre-wrap">
              {revision.withdrawal.by.name}, {formatDateTime(revision.withdrawal.at)}:{' '}
              {revision.withdrawal.reason}
            </p>
          )}
        </Notice>
      </div>
      <p className="mt-4 max-w-prose break-words whitespace-pre-wrap">{revision.changeNote}</p>
      <dl className="mt-3 grid grid-cols-[auto_1fr] gap-x-4 gap-y-1 text-sm">
        <dt className="text-ink-soft">Submitted</dt>
        <dd>
          {revision.submittedBy.name}, {formatDateTime(revision.submittedAt)}
        </dd>
        <dt className="text-ink-soft">Authors</dt>
        <dd>{revision.authors.map((author) => author.name).join(', ')}</dd>
        <dt className="text-ink-soft">Reviews</dt>
        <dd>
          {revision.acceptedReviews} of {revision.requiredReviews} accepted
        </dd>
        {revision.approvedBy && revision.approvedAt && (
          <>
            <dt className="text-ink-soft">Approved</dt>
            <dd>
              {revision.approvedBy.name}, {formatDateTime(revision.approvedAt)}
            </dd>
          </>
        )}
      </dl>
      <p className="mt-3 flex flex-wrap gap-4">
        <Link className="link" to={`/projects/${projectId}/frame${at}`}>
          See its frame
        </Link>
        <Link className="link" to={`/projects/${projectId}/modes${at}`}>
          See its modes
        </Link>
      </p>
    </header>
  );
}

function Reviews({ revision }: { revision: RevisionResponse }) {
  if (revision.reviews.length === 0) return null;
  return (
    <section aria-labelledby="reviews-heading">
      <h3 id="reviews-heading">Reviews</h3>
      <ul className="mt-1 border-t border-rule">
        {revision.reviews.map((review) => (
          <li key={review.id} className="border-b border-rule py-2">
            <p>
              <strong className="font-medium">{review.reviewer.name}</strong>{' '}
              {review.verdict === 'accept' ? 'accepted' : 'returned it'}
              <span className="text-sm text-ink-soft">, {formatDateTime(review.at)}</span>
            </p>
            {review.comment !== '' && (
              <p className="mt-1 max-w-prose break-words whitespace-pre-wrap">{review.comment}</p>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}
