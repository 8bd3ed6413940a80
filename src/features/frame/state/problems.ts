import { DOCUMENT_LISTS, type DocumentList } from '#shared/frame/documentDiff.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { idOf, type EntryOf } from './lists.ts';

/** One thing wrong, or worth knowing, with the entry it is about. */
export interface Problem {
  readonly path: string;
  readonly message: string;
  readonly weight: 'error' | 'warning';
  /** null: the document itself. */
  readonly entry: Chosen | null;
}

/** One entry of the document, wherever it is chosen: in the view, in a table, from a list of problems. */
export interface Chosen {
  readonly list: DocumentList;
  readonly id: string;
}

/** The entry that a path such as `members.3.section` points into; null for the document's own fields. */
export function entryAt(frame: FrameDocument, path: string): Chosen | null {
  const [name, index] = path.split('.');
  const list = DOCUMENT_LISTS.find((one) => one === name);
  if (!list) return null;
  const entries: readonly EntryOf<DocumentList>[] = frame[list];
  const entry = entries[Number(index)];
  return entry ? { list, id: idOf(list, entry) } : null;
}

/** Fields of one entry, each with the first thing wrong with it; '' holds what is about the whole entry. */
export type FieldProblems = (field: string) => string | undefined;

/** Looks up what is wrong with the fields of one entry. */
export function fieldProblems(
  problems: readonly Problem[],
  list: DocumentList,
  index: number,
): FieldProblems {
  const prefix = `${list}.${index}`;
  const own = problems.filter(
    ({ path, weight }) => weight === 'error' && (path === prefix || path.startsWith(`${prefix}.`)),
  );
  return (field) => {
    const path = field === '' ? prefix : `${prefix}.${field}`;
    return own.find(
      (problem) => problem.path === path || (field !== '' && problem.path.startsWith(`${path}.`)),
    )?.message;
  };
}
