import { useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { ProjectResponse } from '#shared/schemas/project.ts';
import { SolvePanel } from '#src/components/SolvePanel.tsx';
import type { ShownFrame } from '#src/hooks/useShownFrame.ts';
import { FrameEditingContext } from '../state/FrameEditing.ts';
import { entryAt } from '../state/problems.ts';
import { useEditing } from '../state/useEditing.ts';
import { useProblems } from '../state/useProblems.ts';
import { FrameSheet } from './FrameSheet.tsx';
import { FrameTitleBlock } from './FrameTitleBlock.tsx';
import type { PartsTab } from './parts/PartsDrawer.tsx';

interface FrameReaderProps {
  readonly project: ProjectResponse;
  readonly shown: ShownFrame;
  readonly by: { readonly name: string; readonly at: string };
}

const NO_STEP = { label: null, run: () => {} };

/** A revision, or the draft for those who may not change it: the same sheet, to read. */
export function FrameReader({ project, shown, by }: FrameReaderProps) {
  const [search] = useSearchParams();
  const { document } = shown;
  const editing = useEditing(document, null, useProblems(document));
  const [parts, setParts] = useState<{ tab: PartsTab; open: boolean }>({
    tab: 'members',
    open: false,
  });
  return (
    <FrameEditingContext value={editing}>
      <FrameSheet
        adding={null}
        undo={NO_STEP}
        redo={NO_STEP}
        parts={parts}
        onParts={setParts}
        titleBlock={
          <FrameTitleBlock
            project={project}
            shown={shown}
            frame={document}
            by={by}
            saved={shown.revision ? 'frozen with the revision' : 'read only'}
          >
            <SolvePanel
              shown={shown}
              maySolve={project.abilities.solve}
              changed={false}
              beforeSolve={() => Promise.resolve(true)}
              onShow={(path) => {
                const entry = entryAt(document, path);
                if (entry) editing.choose([entry]);
              }}
              modesHref={`../modes?${search.toString()}`}
            />
          </FrameTitleBlock>
        }
      />
    </FrameEditingContext>
  );
}
