import { useMemo, useRef, useState, type ReactNode } from 'react';
import { useUnits } from '#src/hooks/useUnits.ts';
import { FrameView } from '#src/viewer/FrameView.tsx';
import { frameModel } from '#src/viewer/model/frameModel.ts';
import { anchorOf } from '#src/viewer/overlay/anchorOf.ts';
import type { Thing, ThingList } from '#src/viewer/Selection.ts';
import { useFrameEditing } from '../state/FrameEditing.ts';
import type { Chosen } from '../state/problems.ts';
import type { Adding } from '../state/useAdding.ts';
import { AddingBar } from './AddingBar.tsx';
import { DetailsPanel } from './DetailsPanel.tsx';
import { FrameTools, type ViewSwitches } from './FrameTools.tsx';
import { PartsDrawer, type PartsTab } from './parts/PartsDrawer.tsx';

interface FrameSheetProps {
  /** null: reading only. */
  readonly adding: Adding | null;
  readonly undo: { readonly label: string | null; readonly run: () => void };
  readonly redo: { readonly label: string | null; readonly run: () => void };
  readonly parts: { readonly tab: PartsTab; readonly open: boolean };
  readonly onParts: (parts: { tab: PartsTab; open: boolean }) => void;
  readonly titleBlock: ReactNode;
}

const IN_VIEW: readonly ThingList[] = [
  'nodes',
  'members',
  'supports',
  'springs',
  'rigidLinks',
  'masses',
];

const isThing = (entry: Chosen): entry is Thing => IN_VIEW.some((list) => list === entry.list);

/** The drawing sheet: the view fills it, details beside what is chosen, parts from below. */
export function FrameSheet({ adding, undo, redo, parts, onParts, titleBlock }: FrameSheetProps) {
  const { frame, chosen, choose, readOnly, remove } = useFrameEditing();
  const units = useUnits();
  const panel = useRef<HTMLElement>(null);
  const [switches, setSwitches] = useState<ViewSwitches>({ names: true, memberAxes: false });
  const selected = useMemo(() => chosen.filter(isThing), [chosen]);
  const [only] = selected;
  const at = useMemo(() => (only ? anchorOf(frameModel(frame), only) : null), [frame, only]);

  const select = (thing: Thing | null, add: boolean) => {
    if (!thing) choose([]);
    else if (!add) choose([thing]);
    else {
      const others = chosen.filter(({ list, id }) => list !== thing.list || id !== thing.id);
      choose(others.length === chosen.length ? [...chosen, thing] : others);
    }
  };

  return (
    <div className="flex min-h-full flex-col md:h-full">
      <div
        className="relative flex min-h-0 flex-col md:flex-1"
        onKeyDown={(event) => {
          if (event.key === 'Escape') {
            if (adding?.what) adding.stop();
            else choose([]);
          }
          const inView = event.target instanceof HTMLElement && event.target.role === 'img';
          if ((event.key === 'Delete' || event.key === 'Backspace') && inView && !readOnly) {
            event.preventDefault();
            remove(chosen);
          }
        }}
      >
        <div className="h-[56dvh] min-h-72 md:h-auto md:min-h-0 md:flex-1">
          <FrameView
            document={frame}
            selected={selected}
            onSelect={select}
            names={switches.names}
            memberAxes={switches.memberAxes}
            pointing={adding?.pointing ?? null}
            formatLength={(metres) => units.quantity(metres, 'length')}
            {...(adding ? { onPoint: adding.point } : {})}
            {...(at ? { anchored: { at, element: panel } } : {})}
            tools={
              <FrameTools
                adding={adding}
                undo={undo}
                redo={redo}
                switches={switches}
                onSwitch={setSwitches}
              />
            }
          >
            {adding && <AddingBar frame={frame} adding={adding} />}
            <DetailsPanel key={at ? 'beside' : 'corner'} panel={panel} beside={at !== null} />
          </FrameView>
        </div>
        {titleBlock}
      </div>
      <PartsDrawer
        tab={parts.tab}
        open={parts.open}
        onTab={(tab) => onParts({ tab, open: true })}
        onOpen={(open) => onParts({ ...parts, open })}
      />
    </div>
  );
}
