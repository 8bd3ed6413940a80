import { Outlet } from 'react-router-dom';
import { Mark } from '#src/components/Wordmark.tsx';

/** Screens before signing in: one form on an empty sheet, with the trade's own reminder beneath. */
export function GateLayout() {
  return (
    <div className="flex min-h-full flex-col items-center px-4 py-10 sm:py-16">
      <div className="mb-8 flex items-center gap-3">
        <Mark className="size-11" />
        <div>
          <p className="text-2xl leading-none font-semibold tracking-tight">Ringstead</p>
          <p className="mt-1 text-sm text-ink-soft">Checks machine frames for resonance</p>
        </div>
      </div>
      <main id="main" className="w-full max-w-sm border border-pencil bg-sheet p-6">
        <Outlet />
      </main>
    </div>
  );
}
