import { useMemo, type ReactNode } from 'react';
import type { ModeShapes } from '#shared/analysis/shapesFile.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { ModeSummary } from '#shared/schemas/solveResult.ts';
import { IncompleteMark } from '#src/components/IncompleteMark.tsx';
import type { CameraStore } from '#src/viewer/camera/cameraStore.ts';
import { FrameView } from '#src/viewer/FrameView.tsx';
import { boundsOf, sizeOf } from '#src/viewer/model/bounds.ts';
import { formatModeFrequency } from '../state/formatMode.ts';
import type { Playback } from '../state/playback.ts';

interface MovingFrameProps {
  readonly document: FrameDocument;
  readonly shapes: ModeShapes;
  /** 0-based index of the mode into the shapes. */
  readonly index: number;
  readonly mode: ModeSummary;
  /** "consistent mass": also stands on the view. */
  readonly label: string;
  /** Of the solve: false where modes may be missing. */
  readonly complete: boolean;
  readonly camera: CameraStore;
  readonly playback: Playback;
  readonly exaggeration: number;
  /** More words for the strip above the view. */
  readonly tools?: ReactNode;
  /** Leaves that strip out: the view beside it has it. */
  readonly bare?: boolean;
}

/** Largest displacement on screen, as a share of the frame's size, at exaggeration 1. */
const USUAL_SWING = 0.08;

/** The frame moving in one mode, with the undeformed frame in pencil. */
export function MovingFrame(props: MovingFrameProps) {
  const { document, shapes, index, mode, label, camera, playback, exaggeration } = props;
  const size = useMemo(
    () => sizeOf(boundsOf(document.nodes.map(({ x, y, z }) => [x, y, z]))),
    [document],
  );
  const deformation = useMemo(
    () => ({
      shapes,
      mode: index,
      amplitude: USUAL_SWING * exaggeration * size,
      clock: playback,
    }),
    [shapes, index, exaggeration, size, playback],
  );
  const said = `Mode ${mode.number}, ${formatModeFrequency(mode)}, ${mode.name}`;
  return (
    <figure className="relative h-full min-h-0 min-w-0 max-md:h-[46dvh] max-md:shrink-0">
      <FrameView
        document={document}
        camera={camera}
        deformation={deformation}
        description={`${said}, by ${label}. The frame swings about the undeformed frame, which is drawn in pencil.`}
        tools={props.tools}
        bare={props.bare ?? false}
      />
      <figcaption className="pointer-events-none absolute right-3 bottom-2 bg-sheet px-1 text-sm">
        <span className="num">{formatModeFrequency(mode)}</span>
        <span className="text-ink-soft"> {label}</span> {!props.complete && <IncompleteMark />}
      </figcaption>
    </figure>
  );
}
