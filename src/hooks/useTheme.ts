import { useEffect, useSyncExternalStore } from 'react';
import type { Theme } from '#shared/schemas/session.ts';
import { useSession } from './useSession.ts';

export type DrawnTheme = 'paper' | 'chalk';

const darkQuery = () => window.matchMedia('(prefers-color-scheme: dark)');

const watchSystem = (changed: () => void) => {
  const query = darkQuery();
  query.addEventListener('change', changed);
  return () => query.removeEventListener('change', changed);
};

/** The theme on screen: the person's choice, or what their system prefers. */
export function useTheme(): DrawnTheme {
  const choice: Theme = useSession().data?.person?.theme ?? 'system';
  const systemIsDark = useSyncExternalStore(watchSystem, () => darkQuery().matches);
  if (choice === 'system') return systemIsDark ? 'chalk' : 'paper';
  return choice;
}

/** Writes the theme on <html>, where the style sheet reads it. Used once, by the application root. */
export function useThemeOnDocument(): void {
  const theme = useTheme();
  useEffect(() => {
    document.documentElement.dataset['theme'] = theme;
  }, [theme]);
}
