import type { Displacement } from '#shared/schemas/frameDocument.ts';

export const above0 = (value: number): string | null =>
  value > 0 ? null : 'Must be greater than zero.';

export const not0Below = (value: number): string | null =>
  value >= 0 ? null : 'Must not be negative.';

export const isRotation = (displacement: Displacement): boolean => displacement.startsWith('r');
