import { Link } from 'react-router-dom';
import type { ActivityEntry } from '#shared/schemas/activity.ts';
import { formatDay, formatTime } from '#src/lib/formatTime.ts';

interface ActivityListProps {
  entries: readonly ActivityEntry[];
  showProject: boolean;
}

/** Entries under the day they fall on. */
export function ActivityList({ entries, showProject }: ActivityListProps) {
  const days = new Map<string, ActivityEntry[]>();
  for (const entry of entries) {
    const day = formatDay(entry.at);
    days.set(day, [...(days.get(day) ?? []), entry]);
  }
  return (
    <div className="space-y-6">
      {[...days].map(([day, ofDay]) => (
        <section key={day}>
          <h2 className="border-b border-pencil pb-1">{day}</h2>
          <ol>
            {ofDay.map((entry) => (
              <li key={entry.id} className="flex gap-4 border-b border-rule py-2">
                <time dateTime={entry.at} className="num shrink-0 pt-0.5 text-ink-soft">
                  {formatTime(entry.at)}
                </time>
                <p className="min-w-0 flex-1 first-letter:uppercase">
                  {entry.actor && <span className="font-medium">{entry.actor.name} </span>}
                  {entry.sentence}
                  {showProject && entry.projectId !== null && (
                    <Link
                      to={`/projects/${entry.projectId}`}
                      className="link block text-sm text-ink-soft"
                    >
                      {entry.projectName}
                    </Link>
                  )}
                </p>
                <span
                  className="num hidden shrink-0 pt-0.5 text-ink-soft sm:inline"
                  title={`Entry ${entry.sequence}, fingerprint ${entry.hash}`}
                >
                  {entry.sequence} · {entry.hash.slice(0, 8)}
                </span>
              </li>
            ))}
          </ol>
        </section>
      ))}
    </div>
  );
}
