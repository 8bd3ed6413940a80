import { useEffect, useMemo, useRef } from 'react';
import type { ModeShapes } from '#shared/analysis/shapesFile.ts';
import { useTheme } from '#src/hooks/useTheme.ts';
import { drawModePicture } from '../state/drawModePicture.ts';
import { modePicture, type Tie } from '../state/modePicture.ts';
import type { Playback } from '../state/playback.ts';

interface ModePictureCanvasProps {
  readonly shapes: ModeShapes;
  readonly ties: readonly Tie[];
  /** 0-based index into the shapes. */
  readonly mode: number;
  readonly playback: Playback;
  /** False: stands at its extreme until it is pointed at. */
  readonly moves: boolean;
  readonly width: number;
  readonly height: number;
}

/** One small moving picture of the mode sheet. Decorative: the caption beside it says the same in words. */
export function ModePictureCanvas(props: ModePictureCanvasProps) {
  const { shapes, ties, mode, playback, moves, width, height } = props;
  const canvas = useRef<HTMLCanvasElement>(null);
  const theme = useTheme();
  const picture = useMemo(
    () => modePicture(shapes, mode, width, height, ties),
    [shapes, mode, width, height, ties],
  );

  useEffect(() => {
    const element = canvas.current;
    const context = element?.getContext('2d');
    if (!element || !context) return undefined;
    const density = Math.min(window.devicePixelRatio, 2);
    element.width = Math.round(width * density);
    element.height = Math.round(height * density);
    context.scale(density, density);
    const style = getComputedStyle(element);
    const inks = {
      ink: style.getPropertyValue('--ink').trim(),
      pencil: style.getPropertyValue('--pencil').trim(),
    };
    const draw = (factor: number): void =>
      drawModePicture(context, picture, factor, inks, width, height);
    if (!moves) {
      draw(1);
      return undefined;
    }
    draw(Math.cos(playback.phase.current));
    return playback.onPhase((phase) => draw(Math.cos(phase)));
  }, [picture, playback, moves, width, height, theme]);

  return <canvas ref={canvas} style={{ width, height }} aria-hidden="true" className="block" />;
}
