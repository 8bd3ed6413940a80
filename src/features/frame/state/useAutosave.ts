import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { readDraft, writeDraft, type DraftResponse } from '#shared/schemas/project.ts';
import { useSession } from '#src/hooks/useSession.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';
import { createAutosave, type Autosave } from './autosave.ts';
import type { FrameStore } from './frameStore.ts';

/** Keeps the draft on the server in step with the store, and the query cache with both. */
export function useAutosave(store: FrameStore, draft: DraftResponse): Autosave {
  const client = useQueryClient();
  const person = useSession().data?.person;
  const { projectId } = draft;
  const [autosave] = useState(() => {
    const key = queryKeys.draft(projectId);
    return createAutosave({
      store,
      draft,
      write: (version, document) =>
        call(writeDraft, { params: { projectId }, body: { version, document } }),
      read: async () => {
        const fresh = await call(readDraft, { params: { projectId } });
        client.setQueryData(key, fresh);
        return fresh;
      },
      onSaved: ({ version, fingerprint, updatedAt }, document) => {
        client.setQueryData<DraftResponse>(
          key,
          (before) =>
            before && {
              ...before,
              version,
              fingerprint,
              updatedAt,
              document,
              updatedBy: person ?? before.updatedBy,
            },
        );
        void client.invalidateQueries({ queryKey: queryKeys.project(projectId), exact: true });
      },
    });
  });
  useEffect(() => autosave.start(), [autosave]);
  useEffect(() => autosave.offer(draft), [autosave, draft]);
  return autosave;
}
