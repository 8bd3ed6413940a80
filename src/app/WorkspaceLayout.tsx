import { NavLink, Outlet } from 'react-router-dom';
import { SheetHeader } from './SheetHeader.tsx';

/** Screens outside a project: the strip, and a page of text and tables under it. */
export function WorkspaceLayout() {
  return (
    <div className="flex min-h-full flex-col">
      <SheetHeader>
        <nav aria-label="Work" className="hidden sm:block">
          <NavLink
            to="/projects"
            className="inline-flex min-h-8 items-center border-b-2 border-transparent px-2 no-underline hover:border-rule aria-[current=page]:border-ink aria-[current=page]:font-medium"
          >
            Projects
          </NavLink>
        </nav>
      </SheetHeader>
      <main id="main" className="mx-auto w-full max-w-6xl flex-1 px-4 py-6 sm:px-6 sm:py-8">
        <Outlet />
      </main>
    </div>
  );
}
