import type { DocumentList } from '#shared/frame/documentDiff.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';

export type EntryOf<List extends DocumentList> = FrameDocument[List][number];

/** What tells entries of a list apart: their id; for a support the node it stands under. */
export function idOf(list: DocumentList, entry: EntryOf<DocumentList>): string {
  if (list === 'supports') return (entry as EntryOf<'supports'>).node;
  return (entry as EntryOf<'nodes'>).id;
}

const NOUNS: Record<DocumentList, string> = {
  nodes: 'node',
  members: 'member',
  sections: 'section',
  materials: 'material',
  supports: 'support',
  springs: 'spring',
  rigidLinks: 'rigid link',
  masses: 'mass',
  states: 'operating state',
};

export function nounOf(list: DocumentList): string {
  return NOUNS[list];
}

export function pluralOf(list: DocumentList): string {
  return list === 'masses' ? 'masses' : `${NOUNS[list]}s`;
}

/** The words of the parts table's tabs, in the order of the work. */
export const LIST_TITLES: readonly { list: DocumentList; title: string }[] = [
  { list: 'nodes', title: 'Nodes' },
  { list: 'members', title: 'Members' },
  { list: 'sections', title: 'Sections' },
  { list: 'materials', title: 'Materials' },
  { list: 'supports', title: 'Supports' },
  { list: 'springs', title: 'Springs' },
  { list: 'rigidLinks', title: 'Rigid links' },
  { list: 'masses', title: 'Masses' },
  { list: 'states', title: 'Operating states' },
];

export function findEntry<List extends DocumentList>(
  frame: FrameDocument,
  list: List,
  id: string,
): EntryOf<List> | undefined {
  const entries: readonly EntryOf<List>[] = frame[list];
  return entries.find((entry) => idOf(list, entry) === id);
}

/** How people call the entry: its name where it has one, else its id; a support by its node. */
export function labelOf(frame: FrameDocument, list: DocumentList, id: string): string {
  const key = list === 'supports' ? 'nodes' : list;
  const entry = findEntry(frame, key, id);
  const name = entry && 'name' in entry && entry.name ? entry.name : id;
  return list === 'supports' ? `support at ${name}` : name;
}

/** The first id of the form `stem` + whole number that the list does not hold yet. */
export function freeId(frame: FrameDocument, list: DocumentList, stem: string): string {
  const entries: readonly EntryOf<DocumentList>[] = frame[list];
  const taken = new Set(entries.map((entry) => idOf(list, entry)));
  let number = entries.length + 1;
  while (taken.has(`${stem}${number}`)) number += 1;
  return `${stem}${number}`;
}
