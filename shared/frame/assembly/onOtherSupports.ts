import type { FrameDocument } from '../../schemas/frameDocument.ts';
import type { FrameModel } from './FrameModel.ts';

/** What a model is made of, apart from how stiff its supports are. */
const PARTS = [
  'unknowns',
  'materials',
  'sections',
  'nodes',
  'members',
  'springs',
  'rigidLinks',
  'masses',
] as const;

/**
 * The model of a frame that differs from another's in the stiffness of its supports alone, without building it again;
 * null where it differs in more.
 *   model     of the other frame        document  with an operating state applied
 */
export function onOtherSupports(model: FrameModel, document: FrameDocument): FrameModel | null {
  const before = model.document;
  if (!PARTS.every((part) => same(before[part], document[part]))) return null;
  if (!same(before.supports.map(apartFromSize), document.supports.map(apartFromSize))) return null;
  const supports = new Map(document.supports.map((support) => [support.node, support]));
  const ties = model.ties.map((tie) => {
    const stiffness = tie.owner === 'support' ? supports.get(tie.id)?.stiffness?.[tie.along] : null;
    return typeof stiffness === 'number' ? { ...tie, stiffness } : tie;
  });
  // A copy by descriptors: `segments` stays to be worked out when first asked for.
  return Object.defineProperties({} as FrameModel, {
    ...Object.getOwnPropertyDescriptors(model),
    document: { value: document, enumerable: true },
    ties: { value: ties, enumerable: true },
  });
}

const same = (a: unknown, b: unknown): boolean =>
  a === b || JSON.stringify(a) === JSON.stringify(b);

/** A support with its stiffnesses named but not told. */
function apartFromSize({ node, fixed, stiffness, axes }: FrameDocument['supports'][number]) {
  return { node, fixed, sprung: Object.keys(stiffness ?? {}), axes };
}
