import { useSyncExternalStore } from 'react';

const query = () => window.matchMedia('(prefers-reduced-motion: reduce)');

const watch = (changed: () => void) => {
  const list = query();
  list.addEventListener('change', changed);
  return () => list.removeEventListener('change', changed);
};

/** Whether the person asked their system for less motion: then nothing moves by itself. */
export const useReducedMotion = (): boolean => useSyncExternalStore(watch, () => query().matches);
