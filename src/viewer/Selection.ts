/** Kinds of things a view shows and a person can point at. */
export type ThingList = 'nodes' | 'members' | 'supports' | 'springs' | 'rigidLinks' | 'masses';

/** One thing of the document: its list and id (the node's id for a support). */
export interface Thing {
  readonly list: ThingList;
  readonly id: string;
}

export function sameThing(a: Thing | null, b: Thing | null): boolean {
  return a?.list === b?.list && a?.id === b?.id;
}
