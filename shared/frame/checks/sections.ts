import type { SectionShape } from '../../schemas/frameDocument.ts';
import { innerRadiusOf } from '../sections/tubes.ts';
import type { EntryFindings, Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';

/** Relative slack for dimensions that only just fit, such as a radius of exactly half the width. */
const FIT_SLACK = 1e-9;

/** Walls, webs, flanges and radii fit into the outline; a stated tensor is positive definite. */
export function checkSections(document: FormedDocument, findings: Findings): void {
  document.sections.entries.forEach((section, place) => {
    if (section) checkShape(section.shape, findings.about('sections', place, section));
  });
}

function checkShape(shape: SectionShape, about: EntryFindings): void {
  switch (shape.kind) {
    case 'solid-rectangle':
    case 'solid-round':
      return;
    case 'round-tube':
      if (shape.wall >= shape.diameter / 2) {
        about.refuse(
          'shape.wall',
          `a wall of ${mm(shape.wall)} does not fit into a diameter of ${mm(shape.diameter)}. It has to be thinner than half of it; for a full bar choose solid round.`,
        );
      }
      return;
    case 'rectangular-tube':
      checkRectangularTube(shape, about);
      return;
    case 'i-section':
      checkFlangesAndWeb(shape, about, 2);
      checkRadius(shape, about, (shape.width - shape.web) / 2, shape.height / 2 - shape.flange);
      return;
    case 'channel':
      checkFlangesAndWeb(shape, about, 2);
      checkRadius(shape, about, shape.width - shape.web, shape.height / 2 - shape.flange);
      return;
    case 'tee':
      checkFlangesAndWeb(shape, about, 1);
      checkRadius(shape, about, (shape.width - shape.web) / 2, shape.height - shape.flange);
      return;
    case 'angle': {
      const leg = Math.min(shape.width, shape.height);
      if (shape.wall >= leg) {
        about.refuse(
          'shape.wall',
          `a wall of ${mm(shape.wall)} is not thinner than the shorter leg of ${mm(leg)}. Make it thinner.`,
        );
      } else {
        checkRadius(shape, about, leg - shape.wall, leg - shape.wall);
      }
      return;
    }
    case 'custom':
      if (shape.Iyz ** 2 >= shape.Iy * shape.Iz) {
        about.refuse(
          'shape.Iyz',
          'Iyz² has to be smaller than Iy·Iz: no real section has such second moments. Correct one of the three.',
        );
      }
  }
}

function checkRectangularTube(
  shape: Extract<SectionShape, { kind: 'rectangular-tube' }>,
  about: EntryFindings,
): void {
  const side = Math.min(shape.width, shape.height);
  if (shape.wall >= side / 2) {
    about.refuse(
      'shape.wall',
      `a wall of ${mm(shape.wall)} does not fit into a side of ${mm(side)}. It has to be thinner than half of it; for a full bar choose solid rectangle.`,
    );
    return;
  }
  if (exceeds(shape.radius, side / 2)) {
    about.refuse(
      'shape.radius',
      `an outer corner radius of ${mm(shape.radius)} does not fit: at most half the shorter side, ${mm(side / 2)}.`,
    );
  }
  const inner = innerRadiusOf(shape);
  const clear = side / 2 - shape.wall;
  if (exceeds(inner, clear)) {
    about.refuse(
      'shape.innerRadius',
      `an inner corner radius of ${mm(inner)} does not fit: at most half the shorter clear side, ${mm(clear)}.`,
    );
  }
  // Across the corner the wall is √2·t + (√2 − 1)(r_inner − r_outer).
  if (Math.SQRT2 * shape.wall + (Math.SQRT2 - 1) * (inner - shape.radius) <= 0) {
    about.refuse(
      'shape.radius',
      'the outer corner radius cuts through the wall at the corner. Make it smaller or the inner radius larger.',
    );
  }
}

interface OpenProfile {
  readonly width: number;
  readonly height: number;
  readonly web: number;
  readonly flange: number;
}

function checkFlangesAndWeb(shape: OpenProfile, about: EntryFindings, flanges: 1 | 2): void {
  if (flanges * shape.flange >= shape.height) {
    about.refuse(
      'shape.flange',
      `${flanges === 2 ? 'two flanges' : 'a flange'} of ${mm(shape.flange)} leave no web within a height of ${mm(shape.height)}. Make the flange thinner.`,
    );
  }
  if (shape.web >= shape.width) {
    about.refuse(
      'shape.web',
      `a web of ${mm(shape.web)} is not thinner than the width of ${mm(shape.width)}. Make it thinner.`,
    );
  }
}

function checkRadius(
  shape: { readonly radius: number },
  about: EntryFindings,
  ...room: readonly number[]
): void {
  const most = Math.min(...room);
  if (most > 0 && exceeds(shape.radius, most)) {
    about.refuse(
      'shape.radius',
      `a root radius of ${mm(shape.radius)} does not fit: at most ${mm(most)} beside web and flange.`,
    );
  }
}

function exceeds(value: number, most: number): boolean {
  return value > most * (1 + FIT_SLACK);
}

function mm(metres: number): string {
  return `${Number((metres * 1000).toPrecision(4))} mm`;
}
