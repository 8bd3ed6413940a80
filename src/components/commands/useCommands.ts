import { useContext, useEffect, useState, useSyncExternalStore } from 'react';
import { CommandContext, type Command, type CommandStore } from './commandStore.ts';

function useCommandStore(): CommandStore {
  const store = useContext(CommandContext);
  if (!store) throw new Error('Commands need a CommandProvider around them.');
  return store;
}

/**
 * Puts commands in the palette and on the keyboard sheet for as long as the component is on screen.
 * Keep the array stable (useMemo), or it is registered again at every drawing.
 */
export function useCommands(commands: readonly Command[]): void {
  const store = useCommandStore();
  const [owner] = useState(() => Symbol('commands'));
  useEffect(() => {
    store.put(owner, commands);
    return () => store.put(owner, []);
  }, [store, owner, commands]);
}

/** Every command on screen now. */
export function useAllCommands(): readonly Command[] {
  const store = useCommandStore();
  return useSyncExternalStore(store.watch, store.read);
}
