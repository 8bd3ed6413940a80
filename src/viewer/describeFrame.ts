import type { FrameDocument } from '#shared/schemas/frameDocument.ts';

/** The view in one sentence, for those who do not see it; the parts table says the same in full. */
export function describeFrame(document: FrameDocument): string {
  const parts = [
    counted(document.nodes.length, 'node', 'nodes'),
    counted(document.members.length, 'member', 'members'),
    counted(document.supports.length, 'support', 'supports'),
    counted(document.masses.length, 'mass', 'masses'),
    counted(document.springs.length, 'spring', 'springs'),
    counted(document.rigidLinks.length, 'rigid link', 'rigid links'),
  ].filter((part) => part !== null);
  const name = document.name === '' ? 'Frame' : document.name;
  return parts.length === 0 ? `${name}: an empty sheet.` : `${name}: ${parts.join(', ')}.`;
}

function counted(count: number, one: string, many: string): string | null {
  return count === 0 ? null : `${count} ${count === 1 ? one : many}`;
}
