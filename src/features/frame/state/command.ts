import { AppError } from '#shared/errors/AppError.ts';
import type { DocumentList } from '#shared/frame/documentDiff.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { idOf, nounOf, type EntryOf } from './lists.ts';
import { removeEntry } from './removeEntry.ts';
import { renameReferences } from './renameReferences.ts';

type AddCommand = {
  [List in DocumentList]: { kind: 'add'; list: List; entry: EntryOf<List> };
}[DocumentList];

type UpdateCommand = {
  [List in DocumentList]: { kind: 'update'; list: List; id: string; entry: EntryOf<List> };
}[DocumentList];

/** Every way the document can change. */
export type FrameCommand =
  | AddCommand
  | UpdateCommand
  | { kind: 'remove'; list: DocumentList; id: string }
  /** The document's own fields, or whole lists: what undoing any other command comes down to. */
  | { kind: 'set'; fields: Partial<FrameDocument> }
  | { kind: 'replace-document'; document: FrameDocument }
  /** Several commands that stand or fall together, such as a member with its new node. */
  | { kind: 'batch'; commands: readonly FrameCommand[] };

/** What applying a command gives: the new document, and the command that takes it back. */
export interface Applied {
  readonly frame: FrameDocument;
  readonly inverse: { kind: 'set'; fields: Partial<FrameDocument> };
}

/**
 * The only way the frame document changes. Pure: the argument is never altered, lists that do not
 * change are shared with it. Throws `conflict`, naming the thing, where the command cannot be carried
 * out: an id taken already, an entry that is not there, a material or section still in use.
 */
export function apply(frame: FrameDocument, command: FrameCommand): Applied {
  const next = changed(frame, command);
  return { frame: next, inverse: { kind: 'set', fields: fieldsThatDiffer(next, frame) } };
}

function changed(frame: FrameDocument, command: FrameCommand): FrameDocument {
  switch (command.kind) {
    case 'add':
      refuseTaken(frame, command.list, idOf(command.list, command.entry));
      return { ...frame, [command.list]: [...frame[command.list], command.entry] };
    case 'update':
      return updated(frame, command);
    case 'remove':
      return removeEntry(frame, command.list, command.id);
    case 'set':
      return { ...frame, ...command.fields };
    case 'replace-document':
      return command.document;
    case 'batch':
      return command.commands.reduce(changed, frame);
  }
}

function updated(frame: FrameDocument, { list, id, entry }: UpdateCommand): FrameDocument {
  const entries: readonly EntryOf<DocumentList>[] = frame[list];
  const at = entries.findIndex((candidate) => idOf(list, candidate) === id);
  if (at < 0) {
    throw new AppError('conflict', `There is no ${nounOf(list)} “${id}” to change any more.`);
  }
  const newId = idOf(list, entry);
  if (newId !== id) refuseTaken(frame, list, newId);
  const next = { ...frame, [list]: entries.with(at, entry) };
  return newId === id ? next : renameReferences(next, list, id, newId);
}

function refuseTaken(frame: FrameDocument, list: DocumentList, id: string): void {
  const entries: readonly EntryOf<DocumentList>[] = frame[list];
  if (entries.some((entry) => idOf(list, entry) === id)) {
    throw new AppError(
      'conflict',
      list === 'supports'
        ? `Node “${id}” carries a support already: change that one.`
        : `There is a ${nounOf(list)} “${id}” already: choose another id.`,
    );
  }
}

/** The fields of `wanted` that `from` holds differently (by identity: unchanged lists are shared). */
function fieldsThatDiffer(from: FrameDocument, wanted: FrameDocument): Partial<FrameDocument> {
  return Object.fromEntries(
    Object.entries(wanted).filter(([field, value]) => from[field as keyof FrameDocument] !== value),
  );
}
