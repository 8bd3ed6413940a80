/** A standing view, called by a word. */
export interface NamedView {
  readonly name: string;
  readonly azimuth: number;
  readonly elevation: number;
}

const QUARTER = Math.PI / 2;
/** Height over the horizon of the corner views: equal foreshortening of the three axes (isometric). */
const CORNER_HEIGHT = Math.atan(Math.SQRT1_2);

export const STRAIGHT_VIEWS: readonly NamedView[] = [
  { name: 'Front', azimuth: 0, elevation: 0 },
  { name: 'Right', azimuth: QUARTER, elevation: 0 },
  { name: 'Back', azimuth: 2 * QUARTER, elevation: 0 },
  { name: 'Left', azimuth: -QUARTER, elevation: 0 },
  { name: 'Top', azimuth: 0, elevation: QUARTER },
  { name: 'Underneath', azimuth: 0, elevation: -QUARTER },
];

export const CORNER_VIEWS: readonly NamedView[] = [
  { name: 'From front left', azimuth: -QUARTER / 2, elevation: CORNER_HEIGHT },
  { name: 'From front right', azimuth: QUARTER / 2, elevation: CORNER_HEIGHT },
  { name: 'From back right', azimuth: 1.5 * QUARTER, elevation: CORNER_HEIGHT },
  { name: 'From back left', azimuth: -1.5 * QUARTER, elevation: CORNER_HEIGHT },
];

export const NAMED_VIEWS: readonly NamedView[] = [...STRAIGHT_VIEWS, ...CORNER_VIEWS];
