import type { FrameDocument } from '../../schemas/frameDocument.ts';
import type { StarterParameters, starterParameters } from './parameters.ts';
import { buildPortal, portalParameters } from './portal.ts';
import { buildSkid, skidParameters } from './skid.ts';
import { buildStand, standParameters } from './stand.ts';

/** A frame to start from: what it is, what it asks, and how it is built. */
export interface Starter {
  readonly id: 'portal' | 'skid' | 'stand';
  readonly name: string;
  readonly description: string;
  /** What `height` is the height of. */
  readonly heightMeans: string;
  /** Everything but the name has a default: `parameters.parse({ name })` gives a whole set. */
  readonly parameters: ReturnType<typeof starterParameters>;
  /** A document that `checkDocument` accepts. */
  readonly build: (parameters: StarterParameters) => FrameDocument;
}

export const STARTERS: readonly Starter[] = [
  {
    id: 'stand',
    name: 'Machine stand',
    description: 'Four legs, a top of rails and a cross-rail that carries the machine.',
    heightMeans: 'Height of the legs',
    parameters: standParameters,
    build: buildStand,
  },
  {
    id: 'portal',
    name: 'Portal base frame',
    description: 'Two portals joined by a spine; the machine stands on the spine.',
    heightMeans: 'Height of the portals',
    parameters: portalParameters,
    build: buildPortal,
  },
  {
    id: 'skid',
    name: 'Skid on feet',
    description: 'Two rails and three cross-members on six feet.',
    heightMeans: 'Height of the feet',
    parameters: skidParameters,
    build: buildSkid,
  },
];
