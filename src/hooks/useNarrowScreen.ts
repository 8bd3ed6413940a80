import { useSyncExternalStore } from 'react';

/** Below Tailwind's `sm`. */
const narrow = () => window.matchMedia('(max-width: 639px)');

const watch = (changed: () => void) => {
  const query = narrow();
  query.addEventListener('change', changed);
  return () => query.removeEventListener('change', changed);
};

/** Whether only the most telling columns of a table fit. Where style alone will do, use `sm:`. */
export const useNarrowScreen = (): boolean => useSyncExternalStore(watch, () => narrow().matches);
