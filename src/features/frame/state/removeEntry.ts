import { AppError } from '#shared/errors/AppError.ts';
import type { DocumentList } from '#shared/frame/documentDiff.ts';
import type { FrameDocument, OperatingState } from '#shared/schemas/frameDocument.ts';
import { idOf, nounOf, pluralOf, type EntryOf } from './lists.ts';

/**
 * The document without one entry and without what cannot stand without it: a node takes its members,
 * supports, springs, masses and its place in rigid links along; a mass or support takes what the
 * operating states say about it. A material or section in use is not removed (`conflict`).
 */
export function removeEntry(frame: FrameDocument, list: DocumentList, id: string): FrameDocument {
  switch (list) {
    case 'nodes':
      return withoutNode(frame, id);
    case 'masses':
      return withoutMasses(frame, new Set([id]));
    case 'supports':
      return withoutSupport(frame, id);
    case 'materials':
      refuseUsed(frame, 'material', id);
      return without(frame, list, id);
    case 'sections':
      refuseUsed(frame, 'section', id);
      return without(frame, list, id);
    case 'members':
    case 'springs':
    case 'rigidLinks':
    case 'states':
      return without(frame, list, id);
  }
}

function without(frame: FrameDocument, list: DocumentList, id: string): FrameDocument {
  const entries: readonly EntryOf<DocumentList>[] = frame[list];
  return { ...frame, [list]: entries.filter((entry) => idOf(list, entry) !== id) };
}

function refuseUsed(frame: FrameDocument, field: 'material' | 'section', id: string): void {
  const users = frame.members.filter((member) => member[field] === id);
  if (users.length === 0) return;
  const count = users.length === 1 ? 'one member' : `${users.length} members`;
  throw new AppError(
    'conflict',
    `The ${field} “${id}” is used by ${count}: give them another ${field} first.`,
  );
}

function withoutNode(frame: FrameDocument, id: string): FrameDocument {
  const hanging = new Set(frame.masses.filter((mass) => mass.node === id).map((mass) => mass.id));
  const bare = withoutSupport(withoutMasses(without(frame, 'nodes', id), hanging), id);
  const touches = (entry: { start: string; end: string }) => entry.start === id || entry.end === id;
  return {
    ...bare,
    members: keepUnless(bare.members, touches),
    springs: keepUnless(bare.springs, touches),
    rigidLinks: withoutLinked(bare.rigidLinks, id),
    states: mapIfNeeded(bare.states, (state) => withoutMassPlace(state, id)),
  };
}

function withoutLinked(links: FrameDocument['rigidLinks'], id: string) {
  const touched = links.some((link) => link.main === id || link.others.includes(id));
  if (!touched) return links;
  return links
    .filter((link) => link.main !== id)
    .map((link) => ({ ...link, others: link.others.filter((other) => other !== id) }))
    .filter((link) => link.others.length > 0);
}

function withoutMasses(frame: FrameDocument, ids: ReadonlySet<string>): FrameDocument {
  return {
    ...frame,
    masses: keepUnless(frame.masses, (mass) => ids.has(mass.id)),
    states: mapIfNeeded(frame.states, (state) => {
      const kept = Object.entries(state.masses).filter(([mass]) => !ids.has(mass));
      return kept.length === Object.keys(state.masses).length
        ? state
        : { ...state, masses: Object.fromEntries(kept) };
    }),
  };
}

function withoutSupport(frame: FrameDocument, node: string): FrameDocument {
  return {
    ...frame,
    supports: keepUnless(frame.supports, (support) => support.node === node),
    states: mapIfNeeded(frame.states, (state) => {
      if (typeof state.supports === 'string' || !Object.hasOwn(state.supports, node)) return state;
      const kept = Object.entries(state.supports).filter(([key]) => key !== node);
      return { ...state, supports: kept.length > 0 ? Object.fromEntries(kept) : 'expected' };
    }),
  };
}

/** A mass that a state hangs on the removed node stays where the frame has it. */
function withoutMassPlace(state: OperatingState, node: string): OperatingState {
  if (!Object.values(state.masses).some((change) => change.node === node)) return state;
  const masses = Object.fromEntries(
    Object.entries(state.masses).map(([mass, change]) => {
      if (change.node !== node) return [mass, change];
      const kept = Object.entries(change).filter(([field]) => field !== 'node');
      return [mass, Object.fromEntries(kept)];
    }),
  );
  return { ...state, masses };
}

function keepUnless<T>(entries: T[], leaves: (entry: T) => boolean): T[] {
  return entries.some(leaves) ? entries.filter((entry) => !leaves(entry)) : entries;
}

function mapIfNeeded<T>(entries: T[], change: (entry: T) => T): T[] {
  const mapped = entries.map(change);
  return mapped.some((entry, index) => entry !== entries[index]) ? mapped : entries;
}

/** What goes along when an entry is removed, in words: “2 members, 1 support”; empty when alone. */
export function describeRemoval(frame: FrameDocument, list: DocumentList, id: string): string {
  const after = removeEntry(frame, list, id);
  const parts: string[] = [];
  for (const other of ['members', 'supports', 'springs', 'rigidLinks', 'masses'] as const) {
    const count = frame[other].length - after[other].length - (other === list ? 1 : 0);
    if (count > 0) parts.push(`${count} ${count === 1 ? nounOf(other) : pluralOf(other)}`);
  }
  return parts.join(', ');
}
