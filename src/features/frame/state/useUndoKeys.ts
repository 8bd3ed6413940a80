import { useEffect } from 'react';
import type { FrameStore } from './frameStore.ts';

const isTypedInto = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement && target.matches('input, select, textarea');

/** Ctrl+Z takes the last step back, Ctrl+Shift+Z or Ctrl+Y does it again (⌘ likewise); text fields keep their own. */
export function useUndoKeys(store: FrameStore): void {
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (!(event.ctrlKey || event.metaKey) || event.altKey || isTypedInto(event.target)) return;
      const key = event.key.toLowerCase();
      if (key !== 'z' && key !== 'y') return;
      event.preventDefault();
      const { undo, redo } = store.getState();
      if (key === 'y' || event.shiftKey) redo();
      else undo();
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [store]);
}
