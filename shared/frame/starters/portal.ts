import type { FrameDocument } from '../../schemas/frameDocument.ts';
import { construct } from './construction.ts';
import { starterParameters, type StarterParameters } from './parameters.ts';

export const portalParameters = starterParameters(
  { length: 1.5, width: 0.9, height: 0.7 },
  'SHS 120x6',
);

/**
 * Portal base frame: two portals across (legs and a beam each), joined by a spine along X between the middles
 * of their beams; the machine stands on the middle of the spine. Lengths m.
 */
export function buildPortal(parameters: StarterParameters): FrameDocument {
  const { length, width, height } = parameters;
  return construct(parameters, {
    places: {
      'front left foot': [0, 0, 0],
      'back left foot': [0, width, 0],
      'front right foot': [length, 0, 0],
      'back right foot': [length, width, 0],
      'front left corner': [0, 0, height],
      'left middle': [0, width / 2, height],
      'back left corner': [0, width, height],
      'front right corner': [length, 0, height],
      'right middle': [length, width / 2, height],
      'back right corner': [length, width, height],
      'spine middle': [length / 2, width / 2, height],
    },
    members: [
      ['leg 1', 'front left foot', 'front left corner'],
      ['leg 2', 'back left foot', 'back left corner'],
      ['leg 3', 'front right foot', 'front right corner'],
      ['leg 4', 'back right foot', 'back right corner'],
      ['left beam front', 'front left corner', 'left middle'],
      ['left beam back', 'left middle', 'back left corner'],
      ['right beam front', 'front right corner', 'right middle'],
      ['right beam back', 'right middle', 'back right corner'],
      ['spine left', 'left middle', 'spine middle'],
      ['spine right', 'spine middle', 'right middle'],
    ],
    feet: ['front left foot', 'back left foot', 'front right foot', 'back right foot'],
    carrier: 'spine middle',
  });
}
