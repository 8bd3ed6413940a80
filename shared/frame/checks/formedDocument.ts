import type {
  Displacement,
  FrameDocument,
  FrameNode,
  Material,
  Member,
  OperatingState,
  PointMass,
  RigidLink,
  Section,
  Spring,
  Support,
} from '../../schemas/frameDocument.ts';

/**
 * One list of a document whose entries may be partly malformed: a malformed entry is `undefined`, its place
 * stays, and its id (where it has one) counts as existing, so that one slip does not raise ten complaints.
 */
export class FormedList<T> {
  readonly entries: readonly (T | undefined)[];
  /** Key of every entry in order, `undefined` where it has none. */
  readonly keys: readonly (string | undefined)[];
  private readonly places = new Map<string, number>();

  constructor(entries: readonly (T | undefined)[], keys: readonly (string | undefined)[]) {
    this.entries = entries;
    this.keys = keys;
    keys.forEach((key, place) => {
      if (key !== undefined && !this.places.has(key)) this.places.set(key, place);
    });
  }

  has(key: string): boolean {
    return this.places.has(key);
  }

  /** The first entry with this key; `undefined` where there is none or it is malformed. */
  find(key: string): T | undefined {
    const place = this.placeOf(key);
    return place === undefined ? undefined : this.entries[place];
  }

  /** Place of the first entry with this key. */
  placeOf(key: string): number | undefined {
    return this.places.get(key);
  }
}

/** A document as far as its form is right: what the rules of meaning are checked on. */
export interface FormedDocument {
  readonly unknowns: readonly Displacement[];
  readonly materials: FormedList<Material>;
  readonly sections: FormedList<Section>;
  readonly nodes: FormedList<FrameNode>;
  readonly members: FormedList<Member>;
  /** Keyed by node. */
  readonly supports: FormedList<Support>;
  readonly springs: FormedList<Spring>;
  readonly rigidLinks: FormedList<RigidLink>;
  readonly masses: FormedList<PointMass>;
  readonly states: FormedList<OperatingState>;
}

/** The lists of a document, in its own order. */
export type ListName = Exclude<keyof FormedDocument, 'unknowns'>;

/** A well-formed document as the rules of meaning see it. */
export function wholeDocument(document: FrameDocument): FormedDocument {
  const byId = <T extends { readonly id: string }>(entries: readonly T[]) =>
    new FormedList(
      entries,
      entries.map((entry) => entry.id),
    );
  return {
    unknowns: document.unknowns,
    materials: byId(document.materials),
    sections: byId(document.sections),
    nodes: byId(document.nodes),
    members: byId(document.members),
    supports: new FormedList(
      document.supports,
      document.supports.map((support) => support.node),
    ),
    springs: byId(document.springs),
    rigidLinks: byId(document.rigidLinks),
    masses: byId(document.masses),
    states: byId(document.states),
  };
}
