import type { DocumentList } from '#shared/frame/documentDiff.ts';
import type { FrameDocument, OperatingState } from '#shared/schemas/frameDocument.ts';

/** The document with every reference to the entry `from` of `list` pointing to `to` instead. */
export function renameReferences(
  frame: FrameDocument,
  list: DocumentList,
  from: string,
  to: string,
): FrameDocument {
  const renamed = (id: string) => (id === from ? to : id);
  switch (list) {
    case 'materials':
      return {
        ...frame,
        members: frame.members.map((member) => ({ ...member, material: renamed(member.material) })),
      };
    case 'sections':
      return {
        ...frame,
        members: frame.members.map((member) => ({ ...member, section: renamed(member.section) })),
      };
    case 'nodes':
      return renameNode(frame, from, renamed);
    case 'masses':
      return {
        ...frame,
        states: frame.states.map((state) => ({
          ...state,
          masses: renameKey(state.masses, from, to),
        })),
      };
    case 'supports':
      return { ...frame, states: frame.states.map((state) => moveSupport(state, from, to)) };
    case 'members':
    case 'springs':
    case 'rigidLinks':
    case 'states':
      return frame;
  }
}

function renameNode(
  frame: FrameDocument,
  from: string,
  renamed: (id: string) => string,
): FrameDocument {
  const ends = <T extends { start: string; end: string }>(entry: T): T => ({
    ...entry,
    start: renamed(entry.start),
    end: renamed(entry.end),
  });
  return {
    ...frame,
    members: frame.members.map(ends),
    springs: frame.springs.map(ends),
    supports: frame.supports.map((support) => ({ ...support, node: renamed(support.node) })),
    masses: frame.masses.map((mass) => ({ ...mass, node: renamed(mass.node) })),
    rigidLinks: frame.rigidLinks.map((link) => ({
      ...link,
      main: renamed(link.main),
      others: link.others.map(renamed),
    })),
    states: frame.states.map((state) => ({
      ...moveSupport(state, from, renamed(from)),
      masses: Object.fromEntries(
        Object.entries(state.masses).map(([mass, change]) => [
          mass,
          change.node === undefined ? change : { ...change, node: renamed(change.node) },
        ]),
      ),
    })),
  };
}

function moveSupport(state: OperatingState, from: string, to: string): OperatingState {
  if (typeof state.supports === 'string') return state;
  return { ...state, supports: renameKey(state.supports, from, to) };
}

function renameKey<T>(record: Record<string, T>, from: string, to: string): Record<string, T> {
  return Object.fromEntries(
    Object.entries(record).map(([key, value]) => [key === from ? to : key, value]),
  );
}
