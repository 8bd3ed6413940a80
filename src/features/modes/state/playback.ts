/**
 * The one clock of everything that moves on the Modes screen, so that views side by side and the mode sheet
 * keep the same phase. Not React state: it changes every frame and is read by whoever draws.
 */
export interface Playback {
  /** Phase of the motion in rad; a shape is drawn with the factor cos(phase). */
  readonly phase: { current: number };
  readonly isPlaying: () => boolean;
  readonly play: () => void;
  readonly pause: () => void;
  readonly setPhase: (phase: number) => void;
  /** Cycles per second on screen; has nothing to do with the mode's own frequency. */
  readonly setSpeed: (cyclesPerSecond: number) => void;
  /** Called after every change of phase; returns how to stop listening. */
  readonly onPhase: (listener: (phase: number) => void) => () => void;
  /** Called when playing starts or stops. */
  readonly onPlaying: (listener: () => void) => () => void;
}

export const SLOWEST = 0.1;
export const FASTEST = 2;
export const USUAL_SPEED = 0.6;

const TURN = 2 * Math.PI;
/** After a pause of the browser (another tab) the motion goes on where it was instead of jumping. */
const LONGEST_STEP_S = 0.1;

interface FrameClock {
  readonly request: (draw: (timeMs: number) => void) => number;
  readonly cancel: (handle: number) => void;
}

/** A playback on the browser's animation frames; tests hand in a clock of their own. */
export function createPlayback(
  clock: FrameClock = {
    request: (draw) => requestAnimationFrame(draw),
    cancel: (handle) => cancelAnimationFrame(handle),
  },
): Playback {
  const phase = { current: 0 };
  const phaseListeners = new Set<(phase: number) => void>();
  const playingListeners = new Set<() => void>();
  let speed = USUAL_SPEED;
  let handle: number | null = null;
  let lastMs: number | null = null;

  const setPhase = (next: number): void => {
    phase.current = ((next % TURN) + TURN) % TURN;
    for (const listener of phaseListeners) listener(phase.current);
  };

  const step = (timeMs: number): void => {
    handle = clock.request(step);
    if (lastMs !== null) {
      const seconds = Math.min((timeMs - lastMs) / 1000, LONGEST_STEP_S);
      setPhase(phase.current + TURN * speed * seconds);
    }
    lastMs = timeMs;
  };

  const announce = (): void => {
    for (const listener of playingListeners) listener();
  };

  return {
    phase,
    isPlaying: () => handle !== null,
    play: () => {
      if (handle !== null) return;
      lastMs = null;
      handle = clock.request(step);
      announce();
    },
    pause: () => {
      if (handle === null) return;
      clock.cancel(handle);
      handle = null;
      announce();
    },
    setPhase,
    setSpeed: (next) => {
      speed = Math.min(FASTEST, Math.max(SLOWEST, next));
    },
    onPhase: (listener) => {
      phaseListeners.add(listener);
      return () => phaseListeners.delete(listener);
    },
    onPlaying: (listener) => {
      playingListeners.add(listener);
      return () => playingListeners.delete(listener);
    },
  };
}
