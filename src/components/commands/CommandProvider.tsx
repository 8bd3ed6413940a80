import { useState, type ReactNode } from 'react';
import { CommandContext, CommandStore } from './commandStore.ts';

/** Holds the commands of the screens under it. */
export function CommandProvider({ children }: { children: ReactNode }) {
  const [store] = useState(() => new CommandStore());
  return <CommandContext value={store}>{children}</CommandContext>;
}
