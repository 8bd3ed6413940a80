import { useMemo } from 'react';
import type { DocumentList } from '#shared/frame/documentDiff.ts';
import { useCommands } from '#src/components/commands/useCommands.ts';
import type { AddingWhat } from './useAdding.ts';

interface Actions {
  readonly start: (what: AddingWhat) => void;
  readonly add: (list: DocumentList) => void;
  readonly undo: () => void;
  readonly redo: () => void;
}

/** Everything the Frame screen can do, for the command palette. */
export function useFrameCommands({ start, add, undo, redo }: Actions): void {
  const commands = useMemo(() => {
    const command = (id: string, title: string, run: () => void) => ({
      id,
      title,
      group: 'Frame',
      run,
    });
    return [
      command('add-node', 'Add node', () => start('node')),
      command('add-member', 'Add member', () => start('member')),
      command('add-support', 'Add support', () => start('support')),
      command('add-mass', 'Add mass', () => start('mass')),
      command('add-section', 'Add section', () => add('sections')),
      command('add-material', 'Add material', () => add('materials')),
      command('add-spring', 'Add spring', () => add('springs')),
      command('add-link', 'Add rigid link', () => add('rigidLinks')),
      command('add-state', 'Add operating state', () => add('states')),
      { ...command('undo', 'Undo', () => undo()), keys: 'Ctrl+Z' },
      { ...command('redo', 'Redo', () => redo()), keys: 'Ctrl+Shift+Z' },
    ];
  }, [start, add, undo, redo]);
  useCommands(commands);
}
