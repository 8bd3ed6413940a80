import { useEffect, useMemo, useRef } from 'react';
import type { DocumentList } from '#shared/frame/documentDiff.ts';
import { useCommands } from '#src/components/commands/useCommands.ts';
import type { AddingWhat } from './useAdding.ts';

interface Actions {
  readonly start: (what: AddingWhat) => void;
  readonly add: (list: DocumentList) => void;
  readonly undo: () => void;
  readonly redo: () => void;
}

/** Everything the Frame screen can do, for the command palette; each acts on the document of that moment. */
export function useFrameCommands(actions: Actions): void {
  const latest = useRef(actions);
  useEffect(() => {
    latest.current = actions;
  });
  const commands = useMemo(() => {
    const command = (id: string, title: string, act: (actions: Actions) => void) => ({
      id,
      title,
      group: 'Frame',
      run: () => act(latest.current),
    });
    return [
      command('add-node', 'Add node', ({ start }) => start('node')),
      command('add-member', 'Add member', ({ start }) => start('member')),
      command('add-support', 'Add support', ({ start }) => start('support')),
      command('add-mass', 'Add mass', ({ start }) => start('mass')),
      command('add-section', 'Add section', ({ add }) => add('sections')),
      command('add-material', 'Add material', ({ add }) => add('materials')),
      command('add-spring', 'Add spring', ({ add }) => add('springs')),
      command('add-link', 'Add rigid link', ({ add }) => add('rigidLinks')),
      command('add-state', 'Add operating state', ({ add }) => add('states')),
      { ...command('undo', 'Undo', ({ undo }) => undo()), keys: 'Ctrl+Z' },
      { ...command('redo', 'Redo', ({ redo }) => redo()), keys: 'Ctrl+Shift+Z' },
    ];
  }, []);
  useCommands(commands);
}
