import { useEffect, useMemo, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { applyState } from '#shared/frame/applyState.ts';
import type { ProjectResponse } from '#shared/schemas/project.ts';
import { Notice } from '#src/components/Notice.tsx';
import { useReducedMotion } from '#src/hooks/useReducedMotion.ts';
import type { ShownFrame } from '#src/hooks/useShownFrame.ts';
import { methodName } from '#src/lib/methodName.ts';
import { createCameraStore } from '#src/viewer/camera/cameraStore.ts';
import type { MethodSolve, Solved } from '../api/useMethodSolve.ts';
import { createPlayback } from '../state/playback.ts';
import { LOOKS, type Look } from '../state/looks.ts';
import { HandCheckTable } from './HandCheckTable.tsx';
import { MethodsBeside } from './MethodsBeside.tsx';
import { ModeDetails } from './ModeDetails.tsx';
import { ModeSheet } from './ModeSheet.tsx';
import { ModeStrip } from './ModeStrip.tsx';
import { ModeTable } from './ModeTable.tsx';
import { ModeTitleBlock } from './ModeTitleBlock.tsx';
import { MovingFrame } from './MovingFrame.tsx';
import { PlaybackBar } from './PlaybackBar.tsx';
import { SolveWarnings } from './SolveWarnings.tsx';

interface ModesSheetProps {
  readonly project: ProjectResponse;
  readonly shown: ShownFrame;
  /** The result is of an older draft than the one there is now. */
  readonly stale: boolean;
  readonly consistent: Solved;
  /** Lumped and mesh-free, as far as they are. */
  readonly others: readonly MethodSolve[];
}

/** The sheet: the moving frame fills it, or two methods side by side, the small pictures, or the table. */
export function ModesSheet({ project, shown, stale, consistent, others }: ModesSheetProps) {
  const [search, setSearch] = useSearchParams();
  const [exaggeration, setExaggeration] = useState(1);
  const [playback] = useState(() => createPlayback());
  const [camera] = useState(() => createCameraStore());
  const still = useReducedMotion();
  const { summary, shapes } = consistent;

  const look: Look = LOOKS.find((one) => one.value === search.get('look'))?.value ?? 'one';
  const asked = Number(search.get('mode') ?? 1);
  const mode = summary.modes.find((one) => one.number === asked) ?? summary.modes[0];

  const set = (name: string, value: string): void =>
    setSearch(
      (before) => {
        const next = new URLSearchParams(before);
        next.set(name, value);
        return next;
      },
      { replace: true },
    );
  const choose = (number: number): void => set('mode', String(number));

  useEffect(() => {
    if (still) playback.pause();
    else playback.play();
    return () => playback.pause();
  }, [playback, still]);

  const stateId = shown.state?.id ?? null;
  const inState = useMemo(() => applyState(shown.document, stateId), [shown.document, stateId]);
  if (!mode) {
    return (
      <div className="p-6">
        <Notice kind="plain">
          This frame has no modes: nothing in it has both mass and freedom.
        </Notice>
      </div>
    );
  }
  const moving = { document: inState, camera, playback, exaggeration };
  const playbackBar = (
    <PlaybackBar playback={playback} exaggeration={exaggeration} onExaggeration={setExaggeration} />
  );

  return (
    <div className="relative flex h-full min-h-0 flex-col max-md:overflow-y-auto">
      <ModeStrip
        modes={summary.modes}
        mode={mode}
        look={look}
        states={shown.document.states}
        stateId={shown.state?.id ?? null}
        playbackBar={playbackBar}
        onMode={choose}
        onLook={(value) => set('look', value)}
        onState={(value) => set('state', value)}
      />
      {(stale || !summary.complete || summary.warnings.length > 0) && (
        <div className="px-4 py-1">
          {stale && (
            <Notice kind="caution" word="Stale">
              The draft has changed since this was solved. Solve again at Frame for its own modes.
            </Notice>
          )}
          {!summary.complete && (
            <Notice kind="signal" word="Incomplete">
              Modes may be missing: the none-missed count finds {summary.count.below}, the solver{' '}
              {summary.count.found}.
            </Notice>
          )}
          <SolveWarnings warnings={summary.warnings} />
        </div>
      )}
      {look === 'one' && (
        <div className="relative flex min-h-0 flex-1 flex-col max-md:min-h-max md:block">
          <MovingFrame
            {...moving}
            shapes={shapes}
            index={summary.modes.indexOf(mode)}
            mode={mode}
            label={methodName(summary.method, shown.document)}
            complete={summary.complete}
            tools={playbackBar}
          />
          <div
            className="border-rule bg-sheet p-4 max-md:border-t md:absolute md:top-14 md:left-3 md:max-h-[calc(100%-10rem)] md:w-72 md:overflow-y-auto md:border"
            tabIndex={0}
          >
            <ModeDetails mode={mode} summary={summary} document={shown.document} />
          </div>
        </div>
      )}
      {look === 'beside' && (
        <MethodsBeside
          consistent={consistent}
          others={others}
          mode={mode}
          moving={moving}
          tools={playbackBar}
          onChoose={choose}
        />
      )}
      {look === 'sheet' && (
        <div className="min-h-0 flex-1 overflow-y-auto p-4">
          <ModeSheet
            document={inState}
            modes={summary.modes}
            shapes={shapes}
            selectedMode={mode.number}
            playback={playback}
            onChoose={choose}
          />
          <p className="mt-2 text-sm text-ink-soft">A shape is not an amplitude.</p>
        </div>
      )}
      {look === 'table' && (
        <div className="min-h-0 flex-1 space-y-6 overflow-y-auto p-4">
          <ModeTable summary={summary} selectedMode={mode.number} onChoose={choose} />
          {summary.handChecks && (
            <HandCheckTable checks={summary.handChecks} modes={summary.modes} />
          )}
        </div>
      )}
      {look === 'one' && <ModeTitleBlock project={project} shown={shown} summary={summary} />}
    </div>
  );
}
