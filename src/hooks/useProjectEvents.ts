import { useQueryClient, type QueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { projectEvent, projectEvents, type ProjectEvent } from '#shared/schemas/project.ts';
import { addressOf } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

const FIRST_WAIT_MS = 1_000;
const LONGEST_WAIT_MS = 30_000;

/**
 * Listens to a project's events and makes stale what they name. After a break everything of the project
 * is stale, since events were missed meanwhile; tries again after 1, 2, 4 … 30 s.
 */
export function useProjectEvents(projectId: string): void {
  const client = useQueryClient();
  useEffect(() => {
    let source: EventSource | null = null;
    let timer: ReturnType<typeof setTimeout> | undefined;
    let wait = FIRST_WAIT_MS;
    let broken = false;

    const open = () => {
      source = new EventSource(addressOf(projectEvents, { params: { projectId } }));
      source.onopen = () => {
        wait = FIRST_WAIT_MS;
        if (broken) void client.invalidateQueries({ queryKey: queryKeys.project(projectId) });
        broken = false;
      };
      source.onmessage = (message: MessageEvent<string>) => {
        const event = projectEvent.safeParse(parseJson(message.data));
        if (event.success) makeStale(client, projectId, event.data);
      };
      source.onerror = () => {
        broken = true;
        source?.close();
        timer = setTimeout(open, wait);
        wait = Math.min(wait * 2, LONGEST_WAIT_MS);
      };
    };
    open();
    return () => {
      clearTimeout(timer);
      source?.close();
    };
  }, [client, projectId]);
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}

function makeStale(client: QueryClient, projectId: string, event: ProjectEvent): void {
  const stale = (queryKey: readonly unknown[], exact = false) =>
    void client.invalidateQueries({ queryKey, exact });
  switch (event.kind) {
    case 'solve':
      stale(queryKeys.solve(event.solveId), true);
      stale(queryKeys.solves(projectId));
      if (event.status === 'done') stale(queryKeys.project(projectId), true);
      break;
    case 'draft':
      stale(queryKeys.draft(projectId));
      stale(queryKeys.project(projectId), true);
      break;
    case 'revision':
      stale(queryKeys.revision(event.revisionId));
      stale(queryKeys.revisions(projectId));
      stale(queryKeys.project(projectId), true);
      break;
    case 'project':
      stale(queryKeys.project(projectId), true);
      break;
  }
  stale(queryKeys.projects);
}
