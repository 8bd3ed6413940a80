import { useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { useStore } from 'zustand';
import type { DraftResponse, ProjectResponse } from '#shared/schemas/project.ts';
import { SolvePanel } from '#src/components/SolvePanel.tsx';
import { usePreloadedQuantities } from '#src/hooks/useQuantityText.ts';
import type { ShownFrame } from '#src/hooks/useShownFrame.ts';
import { FrameEditingContext } from '../state/FrameEditing.ts';
import { createFrameStore } from '../state/frameStore.ts';
import { entryAt } from '../state/problems.ts';
import { useAdding } from '../state/useAdding.ts';
import { useAutosave } from '../state/useAutosave.ts';
import { useFrameCommands } from '../state/useFrameCommands.ts';
import { useEditing } from '../state/useEditing.ts';
import { useLivePreview } from '../state/useLivePreview.ts';
import { useProblems } from '../state/useProblems.ts';
import { useUndoKeys } from '../state/useUndoKeys.ts';
import { FrameSheet } from './FrameSheet.tsx';
import { FrameTitleBlock } from './FrameTitleBlock.tsx';
import { LeaveGuard } from './LeaveGuard.tsx';
import type { PartsTab } from './parts/PartsDrawer.tsx';
import { SaveWords } from './SaveWords.tsx';

interface FrameEditorProps {
  readonly project: ProjectResponse;
  readonly draft: DraftResponse;
  readonly shown: ShownFrame;
}

/** The draft, open for changing. */
export function FrameEditor({ project, draft, shown }: FrameEditorProps) {
  usePreloadedQuantities();
  const [search] = useSearchParams();
  const [store] = useState(() => createFrameStore(draft.document));
  const autosave = useAutosave(store, draft);
  const { frame, past, future, undo, redo } = useStore(store);
  const unsaved = useStore(autosave.status, ({ kind }) => kind !== 'saved');
  const problems = useProblems(frame);
  const editing = useEditing(frame, store, problems);
  const adding = useAdding(frame, editing.run, editing.choose);
  const [parts, setParts] = useState<{ tab: PartsTab; open: boolean }>({
    tab: 'members',
    open: false,
  });
  useUndoKeys(store);
  useLivePreview(project.id, frame, shown.state?.id ?? null);

  useFrameCommands({ start: adding.start, add: editing.add, undo, redo });

  const showPath = (path: string) => {
    const entry = entryAt(frame, path);
    if (entry) editing.choose([entry]);
    else setParts({ tab: 'frame', open: true });
  };

  return (
    <FrameEditingContext value={editing}>
      <LeaveGuard autosave={autosave} />
      <FrameSheet
        adding={adding}
        undo={{ label: past.at(-1)?.label ?? null, run: undo }}
        redo={{ label: future.at(-1)?.label ?? null, run: redo }}
        parts={parts}
        onParts={setParts}
        titleBlock={
          <FrameTitleBlock
            project={project}
            shown={shown}
            frame={frame}
            by={{ name: draft.updatedBy.name, at: draft.updatedAt }}
            saved={
              <SaveWords
                autosave={autosave}
                onShowProblems={() => setParts({ tab: 'problems', open: true })}
              />
            }
          >
            <SolvePanel
              shown={shown}
              maySolve={project.abilities.solve}
              changed={unsaved}
              beforeSolve={autosave.flush}
              onShow={showPath}
              modesHref={`../modes?${search.toString()}`}
            />
          </FrameTitleBlock>
        }
      />
    </FrameEditingContext>
  );
}
