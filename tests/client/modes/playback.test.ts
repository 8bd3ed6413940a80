import { describe, expect, it } from 'vitest';
import { createPlayback } from '#src/features/modes/state/playback.ts';

/** A clock that is moved by hand. */
function handClock() {
  let draw: ((timeMs: number) => void) | null = null;
  return {
    request: (next: (timeMs: number) => void) => {
      draw = next;
      return 1;
    },
    cancel: () => {
      draw = null;
    },
    tick: (timeMs: number) => draw?.(timeMs),
  };
}

describe('playback of a mode', () => {
  it('turns the phase by speed and time, and tells everybody the same', () => {
    const clock = handClock();
    const playback = createPlayback(clock);
    const heard: number[][] = [[], []];
    playback.onPhase((phase) => heard[0]?.push(phase));
    playback.onPhase((phase) => heard[1]?.push(phase));
    playback.setSpeed(0.5);
    playback.play();
    clock.tick(1000);
    clock.tick(1050);
    // Half a turn a second: 50 ms are a fortieth of a turn.
    expect(playback.phase.current).toBeCloseTo((2 * Math.PI) / 40, 9);
    expect(heard[0]).toEqual(heard[1]);
  });

  it('goes on where it was after the browser slept', () => {
    const clock = handClock();
    const playback = createPlayback(clock);
    playback.setSpeed(0.5);
    playback.play();
    clock.tick(0);
    clock.tick(60_000);
    expect(playback.phase.current).toBeCloseTo((2 * Math.PI) / 20, 9);
  });

  it('stops when held, and says so', () => {
    const clock = handClock();
    const playback = createPlayback(clock);
    const said: boolean[] = [];
    playback.onPlaying(() => said.push(playback.isPlaying()));
    playback.play();
    playback.pause();
    clock.tick(0);
    clock.tick(50);
    expect(said).toEqual([true, false]);
    expect(playback.phase.current).toBe(0);
  });

  it('keeps any phase within one turn', () => {
    const playback = createPlayback(handClock());
    playback.setPhase(-Math.PI / 2);
    expect(playback.phase.current).toBeCloseTo((3 * Math.PI) / 2, 12);
  });
});
