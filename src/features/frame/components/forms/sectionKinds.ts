import { sectionProperties } from '#shared/frame/sectionProperties.ts';
import type { SectionKind, SectionShape } from '#shared/schemas/frameDocument.ts';

export const SECTION_KINDS = [
  { value: 'rectangular-tube', label: 'rectangular tube' },
  { value: 'round-tube', label: 'round tube' },
  { value: 'solid-rectangle', label: 'solid rectangle' },
  { value: 'solid-round', label: 'solid round' },
  { value: 'i-section', label: 'I-section' },
  { value: 'channel', label: 'channel' },
  { value: 'tee', label: 'tee' },
  { value: 'angle', label: 'angle' },
  { value: 'custom', label: 'stated figures' },
] as const satisfies readonly { value: SectionKind; label: string }[];

/**
 * A shape of another kind, about as large as the one before, so that the drawing does not jump; stated figures
 * begin with those computed of it.
 */
export function shapeOfKind(kind: SectionKind, before: SectionShape, nu: number): SectionShape {
  const { width, height } = sizeOf(before);
  const wall = Math.min(width, height) / 12;
  const open = { width, height, web: wall, flange: wall * 1.5, radius: 0 };
  switch (kind) {
    case 'solid-rectangle':
      return { kind, width, height };
    case 'solid-round':
      return { kind, diameter: height };
    case 'round-tube':
      return { kind, diameter: height, wall };
    case 'rectangular-tube':
      return { kind, width, height, wall, radius: 2 * wall };
    case 'i-section':
    case 'channel':
    case 'tee':
      return { kind, ...open };
    case 'angle':
      return { kind, width, height, wall, radius: 0 };
    case 'custom': {
      const { A, Iy, Iz, Iyz, J, ky, kz } = sectionProperties(before, nu);
      return { kind, A, Iy, Iz, Iyz, J, ky, kz };
    }
  }
}

function sizeOf(shape: SectionShape): { width: number; height: number } {
  if ('width' in shape) return { width: shape.width, height: shape.height };
  if ('diameter' in shape) return { width: shape.diameter, height: shape.diameter };
  const side = Math.sqrt(shape.A);
  return { width: side, height: side };
}
