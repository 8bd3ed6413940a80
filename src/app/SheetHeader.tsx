import type { ReactNode } from 'react';
import { Link, NavLink } from 'react-router-dom';
import { Wordmark } from '#src/components/Wordmark.tsx';
import { AccountMenu } from './AccountMenu.tsx';
import { useGoCommands } from './useGoCommands.ts';

const PLACE =
  'inline-flex min-h-8 items-center border-b-2 border-transparent px-2 no-underline hover:border-rule aria-[current=page]:border-ink aria-[current=page]:font-medium';

interface SheetHeaderProps {
  /** Stands between the wordmark and the team's places. */
  children?: ReactNode;
  /** `children` need the room on small screens. */
  short?: boolean;
}

/** The strip along the top of every sheet. */
export function SheetHeader({ children, short = false }: SheetHeaderProps) {
  useGoCommands();
  return (
    <header className="flex min-h-12 shrink-0 items-center gap-x-4 border-b border-pencil px-3 sm:px-4">
      <Link to="/projects" aria-label="Ringstead: Projects" className="shrink-0 no-underline">
        <Wordmark short={short} />
      </Link>
      <div className="flex min-w-0 flex-1 items-center gap-x-4">{children}</div>
      <nav aria-label="Team" className="hidden shrink-0 items-center sm:flex">
        <NavLink to="/activity" className={PLACE}>
          Activity
        </NavLink>
        <NavLink to="/team" className={PLACE}>
          Team
        </NavLink>
      </nav>
      <AccountMenu />
    </header>
  );
}
