import type { FrameDocument } from '#shared/schemas/frameDocument.ts';

/** How a part of the frame is called on screen: its name, or its id where it has none. */
export function partName(
  document: FrameDocument,
  list: 'members' | 'nodes' | 'springs' | 'masses',
  id: string,
): string {
  const part = document[list].find((one) => one.id === id);
  return part?.name !== undefined && part.name !== '' ? part.name : id;
}
