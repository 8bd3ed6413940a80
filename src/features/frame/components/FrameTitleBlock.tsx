import { useMemo, type ReactNode } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { ProjectResponse } from '#shared/schemas/project.ts';
import { Quantity } from '#src/components/Quantity.tsx';
import { TitleBlock } from '#src/components/TitleBlock.tsx';
import type { ShownFrame } from '#src/hooks/useShownFrame.ts';
import { formatDateTime } from '#src/lib/formatTime.ts';
import { totalMass } from '../state/totalMass.ts';

interface FrameTitleBlockProps {
  readonly project: ProjectResponse;
  readonly shown: ShownFrame;
  /** The document on screen, with what is not saved yet. */
  readonly frame: FrameDocument;
  readonly by: { readonly name: string; readonly at: string };
  readonly saved: ReactNode;
  readonly children: ReactNode;
}

/** The title block of the Frame sheet. */
export function FrameTitleBlock({
  project,
  shown,
  frame,
  by,
  saved,
  children,
}: FrameTitleBlockProps) {
  const stateId = frame.states.find(({ id }) => id === shown.state?.id)?.id ?? null;
  const mass = useMemo(() => totalMass(frame, stateId), [frame, stateId]);
  return (
    <TitleBlock
      rows={[
        ['Machine', project.machine === '' ? project.name : project.machine],
        ['Revision', shown.label],
        ['State', <StateChoice key="state" frame={frame} stateId={stateId} />],
        ['Mass', <Quantity key="mass" value={mass} kind="mass" />],
        ['Changed', `${by.name}, ${formatDateTime(by.at)}`],
        ['Saved', saved],
      ]}
    >
      {children}
    </TitleBlock>
  );
}

/** The operating state is part of the address, so that links and the other places keep it. */
function StateChoice({ frame, stateId }: { frame: FrameDocument; stateId: string | null }) {
  const [, setSearch] = useSearchParams();
  if (frame.states.length === 0) return 'as drawn';
  return (
    <select
      aria-label="Operating state"
      className="control"
      value={stateId ?? ''}
      onChange={(event) =>
        setSearch(
          (before) => {
            const next = new URLSearchParams(before);
            next.set('state', event.target.value);
            return next;
          },
          { replace: true },
        )
      }
    >
      {frame.states.map(({ id, name }) => (
        <option key={id} value={id}>
          {name || id}
        </option>
      ))}
    </select>
  );
}
