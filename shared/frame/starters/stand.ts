import type { FrameDocument } from '../../schemas/frameDocument.ts';
import { construct } from './construction.ts';
import { starterParameters, type StarterParameters } from './parameters.ts';

export const standParameters = starterParameters(
  { length: 1.2, width: 0.8, height: 0.8 },
  'SHS 100x5',
);

/**
 * Machine stand: four legs, a top of four rails, and a cross-rail between the middles of the long rails that
 * carries the machine on its own middle. Lengths m.
 */
export function buildStand(parameters: StarterParameters): FrameDocument {
  const { length, width, height } = parameters;
  return construct(parameters, {
    places: {
      'front left foot': [0, 0, 0],
      'front right foot': [length, 0, 0],
      'back right foot': [length, width, 0],
      'back left foot': [0, width, 0],
      'front left corner': [0, 0, height],
      'front right corner': [length, 0, height],
      'back right corner': [length, width, height],
      'back left corner': [0, width, height],
      'front middle': [length / 2, 0, height],
      'back middle': [length / 2, width, height],
      'cross-rail middle': [length / 2, width / 2, height],
    },
    members: [
      ['leg 1', 'front left foot', 'front left corner'],
      ['leg 2', 'front right foot', 'front right corner'],
      ['leg 3', 'back right foot', 'back right corner'],
      ['leg 4', 'back left foot', 'back left corner'],
      ['front rail left', 'front left corner', 'front middle'],
      ['front rail right', 'front middle', 'front right corner'],
      ['right rail', 'front right corner', 'back right corner'],
      ['back rail right', 'back right corner', 'back middle'],
      ['back rail left', 'back middle', 'back left corner'],
      ['left rail', 'back left corner', 'front left corner'],
      ['cross-rail front', 'front middle', 'cross-rail middle'],
      ['cross-rail back', 'cross-rail middle', 'back middle'],
    ],
    feet: ['front left foot', 'front right foot', 'back right foot', 'back left foot'],
    carrier: 'cross-rail middle',
  });
}
