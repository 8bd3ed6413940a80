import type { FrameDocument } from '../../schemas/frameDocument.ts';
import { construct } from './construction.ts';
import { starterParameters, type StarterParameters } from './parameters.ts';

export const skidParameters = starterParameters({ length: 2.4, width: 1, height: 0.15 }, 'IPE 160');

/**
 * Skid on feet: two rails along X, three cross-members, six short feet under the rails; the machine stands on
 * the middle of the middle cross-member. `height` is that of the feet. Lengths m.
 */
export function buildSkid(parameters: StarterParameters): FrameDocument {
  const { length, width, height } = parameters;
  const middle = length / 2;
  return construct(parameters, {
    places: {
      'front left foot': [0, 0, 0],
      'front middle foot': [middle, 0, 0],
      'front right foot': [length, 0, 0],
      'back left foot': [0, width, 0],
      'back middle foot': [middle, width, 0],
      'back right foot': [length, width, 0],
      'front left': [0, 0, height],
      'front middle': [middle, 0, height],
      'front right': [length, 0, height],
      'back left': [0, width, height],
      'back middle': [middle, width, height],
      'back right': [length, width, height],
      centre: [middle, width / 2, height],
    },
    members: [
      ['foot 1', 'front left foot', 'front left'],
      ['foot 2', 'front middle foot', 'front middle'],
      ['foot 3', 'front right foot', 'front right'],
      ['foot 4', 'back left foot', 'back left'],
      ['foot 5', 'back middle foot', 'back middle'],
      ['foot 6', 'back right foot', 'back right'],
      ['front rail left', 'front left', 'front middle'],
      ['front rail right', 'front middle', 'front right'],
      ['back rail left', 'back left', 'back middle'],
      ['back rail right', 'back middle', 'back right'],
      ['left cross-member', 'front left', 'back left'],
      ['middle cross-member front', 'front middle', 'centre'],
      ['middle cross-member back', 'centre', 'back middle'],
      ['right cross-member', 'front right', 'back right'],
    ],
    feet: [
      'front left foot',
      'front middle foot',
      'front right foot',
      'back left foot',
      'back middle foot',
      'back right foot',
    ],
    carrier: 'centre',
  });
}
