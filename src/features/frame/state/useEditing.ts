import { useMemo, useState } from 'react';
import { toast } from '#src/lib/toast.ts';
import { AppError } from '#shared/errors/AppError.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { FrameEditing } from './FrameEditing.ts';
import type { FrameStore } from './frameStore.ts';
import { findEntry, nounOf } from './lists.ts';
import { newEntry } from './newEntry.ts';
import type { Chosen, Problem } from './problems.ts';

/** Choosing and changing, for the parts of the Frame screen. `store` is null where the frame is only read. */
export function useEditing(
  frame: FrameDocument,
  store: FrameStore | null,
  problems: readonly Problem[],
): FrameEditing {
  const [marked, choose] = useState<readonly Chosen[]>([]);
  return useMemo(() => {
    // What undoing or somebody else took away is chosen no more.
    const chosen = marked.filter(({ list, id }) => findEntry(frame, list, id) !== undefined);
    const run: FrameEditing['run'] = (command, label) => {
      if (!store) return false;
      try {
        store.getState().run(command, label);
        return true;
      } catch (error) {
        if (!(error instanceof AppError)) throw error;
        toast(error.message);
        return false;
      }
    };
    return {
      frame,
      readOnly: store === null,
      problems,
      chosen,
      choose,
      run,
      add: (list) => {
        const entry = newEntry(frame, list);
        if (typeof entry === 'string') toast(entry);
        else if (run(entry.command, `add ${nounOf(list)}`)) choose([{ list, id: entry.id }]);
      },
      remove: (entries) => {
        const first = entries[0];
        if (!first) return;
        const commands = removalOrder(entries).map(({ list, id }) => ({
          kind: 'remove' as const,
          list,
          id,
        }));
        const label =
          entries.length === 1
            ? `remove ${nounOf(first.list)} ${first.id}`
            : `remove ${entries.length} things`;
        if (run({ kind: 'batch', commands }, label)) choose([]);
      },
    };
  }, [frame, store, problems, marked]);
}

/** Nodes last: what hangs on them goes with them, and would be gone when its own turn comes. */
function removalOrder(entries: readonly Chosen[]): Chosen[] {
  return [
    ...entries.filter(({ list }) => list !== 'nodes'),
    ...entries.filter(({ list }) => list === 'nodes'),
  ];
}
