import { Pause, Play } from 'lucide-react';
import { useEffect, useRef, useState, useSyncExternalStore, type ReactNode } from 'react';
import { Button } from '#src/components/Button.tsx';
import { useReducedMotion } from '#src/hooks/useReducedMotion.ts';
import { FASTEST, SLOWEST, USUAL_SPEED, type Playback } from '../state/playback.ts';

interface PlaybackBarProps {
  readonly playback: Playback;
  readonly exaggeration: number;
  readonly onExaggeration: (value: number) => void;
}

const DEGREES = 360;
const toDegrees = (phase: number): number => (phase * DEGREES) / (2 * Math.PI);

/** Play and pause, phase, speed and exaggeration of the motion; with reduced motion the two extremes. */
export function PlaybackBar({ playback, exaggeration, onExaggeration }: PlaybackBarProps) {
  const playing = useSyncExternalStore(playback.onPlaying, playback.isPlaying);
  const still = useReducedMotion();
  const [speed, setSpeed] = useState(USUAL_SPEED);
  const slider = useRef<HTMLInputElement>(null);

  // The slider follows the motion without a render per frame.
  useEffect(
    () =>
      playback.onPhase((phase) => {
        if (slider.current) slider.current.value = toDegrees(phase).toFixed(0);
      }),
    [playback],
  );

  const chooseSpeed = (value: number): void => {
    setSpeed(value);
    playback.setSpeed(value);
  };

  return (
    <div className="flex shrink-0 items-center gap-x-4 text-sm">
      {still ? (
        <div role="group" aria-label="Extremes" className="flex gap-1">
          <Button look="quiet" onClick={() => playback.setPhase(0)}>
            One extreme
          </Button>
          <Button look="quiet" onClick={() => playback.setPhase(Math.PI)}>
            The other
          </Button>
        </div>
      ) : (
        <Button
          look="plain"
          onClick={() => (playing ? playback.pause() : playback.play())}
          aria-keyshortcuts="Space"
        >
          {playing ? (
            <Pause aria-hidden="true" className="size-4" />
          ) : (
            <Play aria-hidden="true" className="size-4" />
          )}
          {playing ? 'Hold' : 'Move'}
        </Button>
      )}
      <Slider label="Phase">
        <input
          ref={slider}
          type="range"
          min={0}
          max={DEGREES - 1}
          step={1}
          defaultValue={toDegrees(playback.phase.current)}
          aria-label="Phase in degrees"
          className="w-28 accent-ink"
          onChange={(event) => {
            playback.pause();
            playback.setPhase((Number(event.target.value) * 2 * Math.PI) / DEGREES);
          }}
        />
      </Slider>
      {!still && (
        <Slider label="Speed">
          <input
            type="range"
            min={SLOWEST}
            max={FASTEST}
            step={0.1}
            value={speed}
            aria-label="Speed on screen in cycles per second"
            className="w-20 accent-ink"
            onChange={(event) => chooseSpeed(Number(event.target.value))}
          />
        </Slider>
      )}
      <Slider label="Exaggeration">
        <input
          type="range"
          min={0.2}
          max={3}
          step={0.1}
          value={exaggeration}
          aria-label="Exaggeration of the motion"
          className="w-20 accent-ink"
          onChange={(event) => onExaggeration(Number(event.target.value))}
        />
      </Slider>
    </div>
  );
}

function Slider({ label, children }: { label: string; children: ReactNode }) {
  return (
    <label className="flex min-h-8 items-center gap-2 text-ink-soft">
      {label}
      {children}
    </label>
  );
}
