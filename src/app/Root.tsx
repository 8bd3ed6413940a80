import { Outlet, ScrollRestoration, useNavigation } from 'react-router-dom';
import { CommandPalette } from '#src/components/commands/CommandPalette.tsx';
import { useThemeOnDocument } from '#src/hooks/useTheme.ts';

/** What stands on every page: the skip link, the palette, and word that a page is on its way. */
export function Root() {
  useThemeOnDocument();
  const loading = useNavigation().state === 'loading';
  return (
    <>
      <a
        href="#main"
        className="sr-only focus:not-sr-only focus:fixed focus:top-2 focus:left-2 focus:z-50 focus:bg-ink focus:px-4 focus:py-2 focus:text-sheet"
      >
        Skip to the content
      </a>
      <div role="status" className="sr-only">
        {loading ? 'Loading the page …' : ''}
      </div>
      {loading && (
        <div
          aria-hidden="true"
          className="fixed inset-x-0 top-0 z-50 h-0.5 animate-pulse bg-signal"
        />
      )}
      <Outlet />
      <CommandPalette />
      <ScrollRestoration />
    </>
  );
}
