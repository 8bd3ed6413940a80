import { useMemo, useState, type ReactNode } from 'react';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { ModeSummary } from '#shared/schemas/solveResult.ts';
import { methodName, theoryName } from '#src/lib/methodName.ts';
import type { CameraStore } from '#src/viewer/camera/cameraStore.ts';
import type { MethodSolve, Solved } from '../api/useMethodSolve.ts';
import { compareMethod, whyEmpty } from '../state/comparedMethod.ts';
import type { Playback } from '../state/playback.ts';
import { ComparisonNotes } from './ComparisonNotes.tsx';
import { MethodComparison } from './MethodComparison.tsx';
import { MovingFrame } from './MovingFrame.tsx';

interface MethodsBesideProps {
  readonly consistent: Solved;
  /** Lumped and mesh-free, as far as they are. */
  readonly others: readonly MethodSolve[];
  readonly mode: ModeSummary;
  /** What moving views need whichever method they show. */
  readonly moving: {
    readonly document: FrameDocument;
    readonly camera: CameraStore;
    readonly playback: Playback;
    readonly exaggeration: number;
  };
  readonly tools: ReactNode;
  readonly onChoose: (mode: number) => void;
}

/** One mode by consistent mass and by another method moving side by side, over the table of all three. */
export function MethodsBeside(props: MethodsBesideProps) {
  const { consistent, others, mode, moving, tools, onChoose } = props;
  const { document } = moving;
  const { summary, shapes } = consistent;
  const [chosen, setChosen] = useState(others[0]?.method);
  const compared = useMemo(
    () => others.map((other) => compareMethod(consistent, other)),
    [consistent, others],
  );
  const beside = compared.find(({ method }) => method === chosen);
  const index = summary.modes.indexOf(mode);
  const pair = beside?.pairing?.pairs.find(({ a }) => a === index);
  const partner = pair && beside?.solved?.summary.modes[pair.b];

  return (
    <div className="min-h-0 flex-1 overflow-y-auto">
      <div
        role="group"
        aria-label="Beside consistent mass"
        className="flex flex-wrap items-center gap-x-1 border-b border-rule px-3 text-sm"
      >
        <span className="mr-1 text-ink-soft">Beside consistent mass</span>
        {others.map(({ method }) => (
          <button
            key={method}
            type="button"
            aria-pressed={method === chosen}
            onClick={() => setChosen(method)}
            className="min-h-8 cursor-pointer border-b-2 border-transparent px-2 text-ink-soft hover:text-ink aria-pressed:border-ink aria-pressed:text-ink"
          >
            {methodName(method, document)}
          </button>
        ))}
      </div>
      <div className="grid h-[46%] min-h-72 divide-rule border-b border-rule max-md:h-auto max-md:divide-y md:grid-cols-2 md:divide-x">
        <MovingFrame
          {...moving}
          shapes={shapes}
          index={index}
          mode={mode}
          label={methodName('consistent', document)}
          complete={summary.complete}
          tools={tools}
        />
        {beside?.solved && pair && partner ? (
          <MovingFrame
            {...moving}
            shapes={beside.solved.shapes}
            index={pair.b}
            mode={partner}
            label={methodName(beside.method, document)}
            complete={beside.solved.summary.complete}
            bare
          />
        ) : (
          <p className="self-center p-6 text-ink-soft">
            {beside &&
              `${methodName(beside.method, document)}: ${
                whyEmpty(beside) ?? 'no mode has this shape within ±30 % of its frequency'
              }.`}
          </p>
        )}
      </div>
      <div className="flex flex-col gap-4 p-4 sm:px-6">
        <ComparisonNotes document={document} />
        <MethodComparison
          consistent={summary}
          others={compared}
          theory={theoryName(document)}
          selectedMode={mode.number}
          onChoose={onChoose}
        />
      </div>
    </div>
  );
}
