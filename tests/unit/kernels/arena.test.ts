import { describe, expect, it } from 'vitest';
import { newArena, withArena } from '#shared/numerics/kernels/Arena.ts';
import { AppError } from '#shared/errors/AppError.ts';

describe.each(['auto', 'script'] as const)('an arena (%s)', (choice) => {
  it('keeps what it holds when it grows', () => {
    const arena = newArena(choice);
    const small = arena.place(Float64Array.of(1, 2, 3));
    arena.numbers(1_000_000);
    expect(Array.from(arena.view(small, 3))).toEqual([1, 2, 3]);
    expect(arena.f64.byteLength).toBeGreaterThan(8_000_000);
  });

  it('gives tiles their alignment', () => {
    const arena = newArena(choice);
    for (const count of [1, 2, 3, 5]) {
      expect(arena.numbers(count) % 16).toBe(0);
      expect(arena.indices(count) % 16).toBe(0);
    }
  });

  it('refuses more than 2 GiB in words, without asking for it', () => {
    const arena = newArena(choice);
    const ask = () => arena.numbers(2 ** 28);
    expect(ask).toThrow(AppError);
    expect(ask).toThrow(/too large.*fewer divisions/s);
    expect(arena.f64.byteLength).toBeLessThan(10_000_000);
  });

  it('is empty again for the next one who takes it, also after an error', () => {
    const first = withArena((arena) => arena.numbers(10), choice);
    expect(withArena((arena) => arena.numbers(10), choice)).toBe(first);
    expect(() =>
      withArena((arena) => {
        arena.numbers(1000);
        throw new Error('stopped');
      }, choice),
    ).toThrow('stopped');
    expect(withArena((arena) => arena.numbers(10), choice)).toBe(first);
  });
});
