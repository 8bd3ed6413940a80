import { Link } from 'react-router-dom';
import { Button } from '#src/components/Button.tsx';
import { EmptyState } from '#src/components/EmptyState.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { formatDateTime } from '#src/lib/formatTime.ts';
import { useSentMail } from '../api/team.ts';
import { MailText } from './MailText.tsx';

export default function SentMailPage() {
  const mails = useSentMail();
  return (
    <div className="max-w-3xl space-y-6">
      <div>
        <p className="text-sm">
          <Link to="/team" className="link">
            Team
          </Link>
        </p>
        <PageHeading title="Sent mail" />
        <p className="mt-1 text-ink-soft">
          No mail server is set, so nothing leaves this machine: what would have been sent is kept
          here.
        </p>
      </div>
      {mails.isPending && <Loading what="sent mail" lines={6} />}
      {mails.isError && (
        <ErrorNote error={mails.error}>
          <Button onClick={() => void mails.refetch()}>Try again</Button>
        </ErrorNote>
      )}
      {mails.data?.length === 0 && (
        <EmptyState title="Nothing has been sent yet">
          Invitations, reset links and word of revisions appear here.
        </EmptyState>
      )}
      {mails.data?.map((mail) => (
        <article key={mail.id} className="border-t border-pencil pt-3">
          <div className="flex flex-wrap items-baseline justify-between gap-x-4">
            <h2>{mail.subject}</h2>
            <time dateTime={mail.sentAt} className="text-sm text-ink-soft">
              {formatDateTime(mail.sentAt)}
            </time>
          </div>
          <p className="text-sm text-ink-soft">to {mail.to}</p>
          <MailText text={mail.text} />
        </article>
      ))}
    </div>
  );
}
