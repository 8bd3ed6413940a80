import { createContext, useContext } from 'react';
import type { DocumentList } from '#shared/frame/documentDiff.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { FrameCommand } from './command.ts';
import type { Chosen, Problem } from './problems.ts';

/** What every part of the Frame screen works with: the document, how to change it, what is chosen. */
export interface FrameEditing {
  readonly frame: FrameDocument;
  readonly readOnly: boolean;
  readonly problems: readonly Problem[];
  readonly chosen: readonly Chosen[];
  readonly choose: (entries: readonly Chosen[]) => void;
  /** Changes the document; a refusal is said in a message. Returns whether it was carried out. */
  readonly run: (command: FrameCommand, label: string) => boolean;
  /** Makes an entry of the list with plain first values and opens its details. */
  readonly add: (list: DocumentList) => void;
  readonly remove: (entries: readonly Chosen[]) => void;
}

export const FrameEditingContext = createContext<FrameEditing | null>(null);

export function useFrameEditing(): FrameEditing {
  const editing = useContext(FrameEditingContext);
  if (!editing)
    throw new Error('The parts of the Frame screen need a FrameEditingContext around them.');
  return editing;
}
