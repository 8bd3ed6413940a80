import { useMemo, useState } from 'react';
import type { ModeShapes } from '#shared/analysis/shapesFile.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { ModeSummary } from '#shared/schemas/solveResult.ts';
import { useReducedMotion } from '#src/hooks/useReducedMotion.ts';
import { tiesOf } from '../state/modePicture.ts';
import type { Playback } from '../state/playback.ts';
import { formatModeFrequency } from '../state/formatMode.ts';
import { ModePictureCanvas } from './ModePictureCanvas.tsx';

interface ModeSheetProps {
  readonly document: FrameDocument;
  readonly modes: readonly ModeSummary[];
  readonly shapes: ModeShapes;
  readonly selectedMode: number;
  readonly playback: Playback;
  readonly onChoose: (mode: number) => void;
}

const PICTURE = { width: 148, height: 112 };
/** Above this many lines per frame only the picture pointed at moves; the rest stand at their extreme. */
const SEGMENTS_THAT_MOVE = 12_000;

/** All modes as small moving pictures. */
export function ModeSheet(props: ModeSheetProps) {
  const { document, modes, shapes, selectedMode, playback, onChoose } = props;
  const ties = useMemo(() => tiesOf(document, shapes), [document, shapes]);
  const [pointedAt, setPointedAt] = useState<number | null>(null);
  const still = useReducedMotion();
  const allMove = shapes.points * modes.length <= SEGMENTS_THAT_MOVE;
  return (
    <ul
      aria-label="Mode sheet"
      className="grid grid-cols-[repeat(auto-fill,minmax(150px,1fr))] border-t border-l border-rule"
    >
      {modes.map((mode, index) => (
        <li key={mode.number} className="border-r border-b border-rule bg-sheet">
          <button
            type="button"
            aria-pressed={mode.number === selectedMode}
            onClick={() => onChoose(mode.number)}
            onPointerEnter={() => setPointedAt(mode.number)}
            onPointerLeave={() => setPointedAt(null)}
            onFocus={() => setPointedAt(mode.number)}
            onBlur={() => setPointedAt(null)}
            className="flex h-full w-full cursor-pointer flex-col items-center border-t-2 border-transparent px-1.5 pt-1 pb-2 text-left hover:bg-ground aria-pressed:border-ink"
          >
            <ModePictureCanvas
              shapes={shapes}
              ties={ties}
              mode={index}
              playback={playback}
              moves={!still && (allMove || pointedAt === mode.number)}
              {...PICTURE}
            />
            <span className="w-full text-sm">
              <span className="flex items-baseline justify-between gap-2">
                <span className="text-ink-soft">Mode {mode.number}</span>
                <span className="num">{formatModeFrequency(mode)}</span>
              </span>
              <span className="block">{mode.name}</span>
            </span>
          </button>
        </li>
      ))}
    </ul>
  );
}
