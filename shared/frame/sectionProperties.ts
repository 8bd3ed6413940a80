import type { SectionShape } from '../schemas/frameDocument.ts';
import { angle, channel, iSection, tee } from './sections/openProfiles.ts';
import type { SectionProperties } from './sections/section.ts';
import { solidRectangle, solidRound } from './sections/solids.ts';
import { rectangularTube, roundTube } from './sections/tubes.ts';

export type { SectionProperties } from './sections/section.ts';

/**
 * Area, second moments, torsion constant and shear coefficients of a section about its centroid.
 *   shape  dimensions in m (a shape that `checkDocument` accepts; others give meaningless figures)
 *   nu     Poisson's ratio [–], on which Cowper's shear coefficients depend
 * Returns SI: A m², Iy Iz Iyz J m⁴, ky kz –. For angle, channel and tee the shear-centre offset and
 * warping are left out, which `notes` says.
 */
export function sectionProperties(shape: SectionShape, nu: number): SectionProperties {
  switch (shape.kind) {
    case 'solid-rectangle':
      return solidRectangle(shape, nu);
    case 'solid-round':
      return solidRound(shape, nu);
    case 'round-tube':
      return roundTube(shape, nu);
    case 'rectangular-tube':
      return rectangularTube(shape, nu);
    case 'i-section':
      return iSection(shape, nu);
    case 'channel':
      return channel(shape);
    case 'tee':
      return tee(shape);
    case 'angle':
      return angle(shape);
    case 'custom': {
      const { A, Iy, Iz, Iyz, J, ky, kz } = shape;
      return { A, Iy, Iz, Iyz, J, ky, kz, notes: ['All figures of this section were stated.'] };
    }
  }
}
