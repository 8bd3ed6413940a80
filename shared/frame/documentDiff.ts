import type { FrameDocument } from '../schemas/frameDocument.ts';
import { canonicalJson } from './canonicalJson.ts';

/** The lists of a document whose entries are told apart by an id (supports by their node). */
export const DOCUMENT_LISTS = [
  'materials',
  'sections',
  'nodes',
  'members',
  'supports',
  'springs',
  'rigidLinks',
  'masses',
  'states',
] as const;
export type DocumentList = (typeof DOCUMENT_LISTS)[number];

/** One difference between two documents; `fields` names what changed (empty for added and removed). */
export interface DocumentChange {
  /** The list, or `frame` for the document's own fields (name, unknowns). */
  readonly list: DocumentList | 'frame';
  /** Id of the entry; the node's id for a support; empty for `frame`. */
  readonly id: string;
  readonly kind: 'added' | 'removed' | 'changed';
  readonly fields: readonly string[];
}

/**
 * What turns `before` into `after`, in document order: the document's own fields, then list by list the
 * entries of `after` (added or changed) and last those only `before` has (removed). Entries are matched by id;
 * a mere change of order is no difference.
 */
export function documentDiff(before: FrameDocument, after: FrameDocument): DocumentChange[] {
  const changes: DocumentChange[] = [];
  const own = changedFields(ownFields(before), ownFields(after));
  if (own.length > 0) changes.push({ list: 'frame', id: '', kind: 'changed', fields: own });
  for (const list of DOCUMENT_LISTS) {
    const earlier = entriesById(before, list);
    const later = entriesById(after, list);
    for (const [id, entry] of later) {
      const old = earlier.get(id);
      if (!old) {
        changes.push({ list, id, kind: 'added', fields: [] });
        continue;
      }
      const fields = changedFields(old, entry);
      if (fields.length > 0) changes.push({ list, id, kind: 'changed', fields });
    }
    for (const id of earlier.keys()) {
      if (!later.has(id)) changes.push({ list, id, kind: 'removed', fields: [] });
    }
  }
  return changes;
}

const SINGULAR: Record<DocumentList, string> = {
  materials: 'material',
  sections: 'section',
  nodes: 'node',
  members: 'member',
  supports: 'support at node',
  springs: 'spring',
  rigidLinks: 'rigid link',
  masses: 'mass',
  states: 'operating state',
};

/** How many changes a sentence names before it only counts the rest. */
const NAMED_CHANGES = 3;

/** One plain sentence: “Member leg 2 changed (section); node 9 added; and 4 more changes.” */
export function describeChanges(changes: readonly DocumentChange[]): string {
  if (changes.length === 0) return 'Nothing changed.';
  const named = changes.slice(0, NAMED_CHANGES).map(describeChange);
  const rest = changes.length - named.length;
  if (rest > 0) named.push(`and ${rest} more ${rest === 1 ? 'change' : 'changes'}`);
  const sentence = named.join('; ');
  return `${sentence.charAt(0).toUpperCase()}${sentence.slice(1)}.`;
}

function describeChange(change: DocumentChange): string {
  if (change.list === 'frame') return `frame changed (${change.fields.join(', ')})`;
  const fields = change.fields.length > 0 ? ` (${change.fields.join(', ')})` : '';
  return `${SINGULAR[change.list]} ${change.id} ${change.kind}${fields}`;
}

function ownFields(document: FrameDocument): object {
  return { name: document.name, unknowns: document.unknowns };
}

function entriesById(document: FrameDocument, list: DocumentList): Map<string, object> {
  if (list === 'supports') return new Map(document.supports.map((entry) => [entry.node, entry]));
  return new Map(document[list].map((entry) => [entry.id, entry]));
}

function changedFields(before: object, after: object): string[] {
  const earlier = new Map<string, unknown>(Object.entries(before));
  const later = new Map<string, unknown>(Object.entries(after));
  const names = new Set([...earlier.keys(), ...later.keys()]);
  return [...names].filter((field) => !sameJson(earlier.get(field), later.get(field)));
}

/** Equal as JSON values: the order of an object's keys and keys that hold undefined do not matter. */
function sameJson(a: unknown, b: unknown): boolean {
  if (a === undefined || b === undefined || a === b) return a === b;
  return canonicalJson(a) === canonicalJson(b);
}
