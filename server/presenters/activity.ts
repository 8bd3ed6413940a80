import { z } from 'zod';
import type { ActivityEntry } from '#shared/schemas/activity.ts';
import type { AuditEntry } from '#server/models/AuditEntry.ts';
import { sentenceOf } from './activitySentences.ts';

interface ActivityPage {
  readonly entries: readonly AuditEntry[];
  readonly peopleNames: ReadonlyMap<string, string>;
  readonly projectNames: ReadonlyMap<string, string>;
  readonly hasMore: boolean;
}

/** A page of entries, and the sequence number to go on from. */
export function presentActivity(page: ActivityPage): {
  entries: ActivityEntry[];
  nextBefore: number | null;
} {
  return {
    entries: page.entries.map((entry) => presentEntry(entry, page)),
    nextBefore: page.hasMore ? (page.entries.at(-1)?.sequence ?? null) : null,
  };
}

const recorded = z.object({ details: z.record(z.string(), z.unknown()) });

function presentEntry(
  entry: AuditEntry,
  { peopleNames, projectNames }: ActivityPage,
): ActivityEntry {
  const nameOf = (personId: string): string => peopleNames.get(personId) ?? 'somebody';
  const { details } = recorded.parse(JSON.parse(entry.canonical));
  const { actorId, projectId } = entry;
  return {
    id: entry.id,
    sequence: entry.sequence,
    at: entry.at.toISOString(),
    actor: actorId === null ? null : { id: actorId, name: nameOf(actorId) },
    projectId,
    projectName: projectId === null ? null : (projectNames.get(projectId) ?? null),
    action: entry.action,
    sentence: sentenceOf(entry.action, details, nameOf),
    hash: entry.hash,
  };
}
