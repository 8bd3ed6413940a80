import { ChevronDown, ChevronUp } from 'lucide-react';
import { useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';
import type { DocumentList } from '#shared/frame/documentDiff.ts';
import { Tabs, TabPanel } from '#src/components/Tabs.tsx';
import { useFrameEditing } from '../../state/FrameEditing.ts';
import { LIST_TITLES } from '../../state/lists.ts';
import { FrameForm } from '../forms/FrameForm.tsx';
import { ProblemList } from '../ProblemList.tsx';
import { PartsTable } from './PartsTable.tsx';

export type PartsTab = DocumentList | 'frame' | 'problems';

interface PartsDrawerProps {
  readonly tab: PartsTab;
  readonly onTab: (tab: PartsTab) => void;
  readonly open: boolean;
  readonly onOpen: (open: boolean) => void;
}

const HEIGHT = { least: 140, first: 260, most: 700, step: 40 } as const;

/** The parts of the frame, list by list, opening from below. Its upper edge is dragged, or moved with the arrows. */
export function PartsDrawer({ tab, onTab, open, onOpen }: PartsDrawerProps) {
  const { frame, problems } = useFrameEditing();
  const [height, setHeight] = useState<number>(HEIGHT.first);
  const drag = useRef<{ y: number; height: number } | null>(null);
  const resize = (next: number) =>
    setHeight(Math.min(HEIGHT.most, Math.max(HEIGHT.least, Math.round(next))));

  const tabs = [
    ...LIST_TITLES.map(({ list, title }) => ({
      value: list,
      label: <Counted title={title} count={frame[list].length} />,
    })),
    { value: 'frame' as const, label: 'Frame' },
    { value: 'problems' as const, label: <Counted title="Problems" count={problems.length} /> },
  ];

  return (
    <section aria-label="Parts" className="shrink-0 border-t border-ink bg-ground">
      {open && (
        <div
          role="separator"
          tabIndex={0}
          aria-label="Height of the parts table"
          aria-orientation="horizontal"
          aria-valuenow={height}
          aria-valuemin={HEIGHT.least}
          aria-valuemax={HEIGHT.most}
          className="-mt-1 hidden h-2 cursor-row-resize touch-none hover:bg-rule md:block"
          onPointerDown={(event: PointerEvent<HTMLDivElement>) => {
            event.currentTarget.setPointerCapture(event.pointerId);
            drag.current = { y: event.clientY, height };
          }}
          onPointerMove={(event) => {
            if (drag.current) resize(drag.current.height + drag.current.y - event.clientY);
          }}
          onPointerUp={() => {
            drag.current = null;
          }}
          onKeyDown={(event: KeyboardEvent) => {
            if (event.key === 'Escape' && drag.current) {
              setHeight(drag.current.height);
              drag.current = null;
            }
            if (event.key === 'ArrowUp') resize(height + HEIGHT.step);
            if (event.key === 'ArrowDown') resize(height - HEIGHT.step);
          }}
        />
      )}
      <div
        className="relative"
        onClickCapture={(event) => {
          // Pressing the tab that is chosen already opens the drawer too.
          if (event.target instanceof Element && event.target.closest('[role=tab]')) onOpen(true);
        }}
      >
        <Tabs
          label="Parts of the frame"
          value={tab}
          onValueChange={onTab}
          tabs={tabs}
          className="[&>[role=tablist]]:pr-24"
        >
          <TabPanel
            value={tab}
            tabIndex={-1}
            hidden={!open}
            className="overflow-hidden px-3 max-md:h-[60dvh] md:h-[var(--parts)]"
            style={{ ['--parts' as string]: `${height}px` }}
          >
            {open && <TabContent tab={tab} />}
          </TabPanel>
        </Tabs>
        <button
          type="button"
          aria-expanded={open}
          className="absolute top-0 right-0 inline-flex min-h-8 cursor-pointer items-center gap-1 border-b border-rule bg-ground px-3 hover:underline"
          onClick={() => onOpen(!open)}
        >
          {open ? 'Close' : 'Open'}
          <span className="sr-only"> the parts table</span>
          {open ? (
            <ChevronDown aria-hidden="true" className="size-4" />
          ) : (
            <ChevronUp aria-hidden="true" className="size-4" />
          )}
        </button>
      </div>
    </section>
  );
}

function TabContent({ tab }: { tab: PartsTab }) {
  if (tab === 'problems') return <ProblemList />;
  if (tab !== 'frame') return <PartsTable key={tab} list={tab} />;
  return (
    <div className="h-full overflow-auto py-3">
      <FrameForm />
    </div>
  );
}

function Counted({ title, count }: { title: string; count: number }) {
  return (
    <>
      {title} <span className="num text-ink-soft">{count}</span>
    </>
  );
}
