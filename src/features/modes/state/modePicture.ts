import type { ModeShapes } from '#shared/analysis/shapesFile.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { VALUES_PER_POINT } from '#shared/analysis/shapesFile.ts';

/** Where the small pictures are looked at from: azimuth about Z and height over the horizon, rad. */
const FROM = { azimuth: -0.62, elevation: 0.42 };
/** Share of the picture's smaller side that the largest displacement takes up. */
const LARGEST_SWING = 0.14;
const MARGIN_PX = 14;
/** Steps from pale to full ink; lines of one step are drawn together. */
export const INK_STEPS = 5;

/** Two points of the shapes that are joined by something other than a member. */
export type Tie = readonly [number, number];

/** One mode, flattened to the paper: lines through every member’s stations, and ties, in px. */
export interface ModePicture {
  readonly points: number;
  /** points × 2, undeformed. */
  readonly still: Float32Array;
  /** points × 2, what is added at full amplitude. */
  readonly swing: Float32Array;
  /** Per segment: its two points and its step of ink 0 … INK_STEPS − 1. */
  readonly segments: Int32Array;
}

/**
 * Flattens one mode for a picture of the given size: parallel projection from the front, left and above
 * (straight from the front where the frame lies in the X–Z plane), fitted to the picture.
 *   mode  0-based index into the shapes
 *   ties  what is drawn besides the members
 */
export function modePicture(
  shapes: ModeShapes,
  mode: number,
  width: number,
  height: number,
  ties: readonly Tie[] = [],
): ModePicture {
  const { points, positions } = shapes;
  const flat = isFlat(positions);
  const [ca, sa] = flat ? [1, 0] : [Math.cos(FROM.azimuth), Math.sin(FROM.azimuth)];
  const [ce, se] = flat ? [1, 0] : [Math.cos(FROM.elevation), Math.sin(FROM.elevation)];
  const project = (x: number, y: number, z: number, into: Float32Array, at: number): void => {
    into[at] = ca * x + sa * y;
    into[at + 1] = -(ce * z + se * (-sa * x + ca * y));
  };

  const still = new Float32Array(points * 2);
  const swing = new Float32Array(points * 2);
  const amplitude = new Float32Array(points);
  const base = mode * points * VALUES_PER_POINT;
  let largest = 0;
  for (let p = 0; p < points; p += 1) {
    project(
      positions[3 * p] ?? 0,
      positions[3 * p + 1] ?? 0,
      positions[3 * p + 2] ?? 0,
      still,
      2 * p,
    );
    const at = base + VALUES_PER_POINT * p;
    const u = shapes.shapes[at] ?? 0;
    const v = shapes.shapes[at + 1] ?? 0;
    const w = shapes.shapes[at + 2] ?? 0;
    project(u, v, w, swing, 2 * p);
    amplitude[p] = Math.hypot(u, v, w);
    largest = Math.max(largest, amplitude[p] ?? 0);
  }
  fit(still, swing, width, height, largest);
  return { points, still, swing, segments: inkSegments(shapes, ties, amplitude, largest) };
}

function isFlat(positions: Float32Array): boolean {
  for (let i = 1; i < positions.length; i += 3) if (positions[i] !== positions[1]) return false;
  return true;
}

/** Scales `still` to the picture and `swing` so that the largest displacement is LARGEST_SWING of it; both overwritten. */
function fit(
  still: Float32Array,
  swing: Float32Array,
  width: number,
  height: number,
  largest: number,
): void {
  const box = { left: Infinity, right: -Infinity, top: Infinity, bottom: -Infinity };
  for (let i = 0; i < still.length; i += 2) {
    box.left = Math.min(box.left, still[i] ?? 0);
    box.right = Math.max(box.right, still[i] ?? 0);
    box.top = Math.min(box.top, still[i + 1] ?? 0);
    box.bottom = Math.max(box.bottom, still[i + 1] ?? 0);
  }
  const reach = LARGEST_SWING * Math.min(width, height);
  const across = Math.max(box.right - box.left, 1e-9);
  const up = Math.max(box.bottom - box.top, 1e-9);
  const inset = 2 * (MARGIN_PX + reach * 0.6);
  const scale = Math.min((width - inset) / across, (height - inset) / up);
  const swingScale = largest > 0 ? reach / largest : 0;
  const cx = (box.left + box.right) / 2;
  const cy = (box.top + box.bottom) / 2;
  for (let i = 0; i < still.length; i += 2) {
    still[i] = width / 2 + scale * ((still[i] ?? 0) - cx);
    still[i + 1] = height / 2 + scale * ((still[i + 1] ?? 0) - cy);
    swing[i] = (swing[i] ?? 0) * swingScale;
    swing[i + 1] = (swing[i + 1] ?? 0) * swingScale;
  }
}

function inkSegments(
  shapes: ModeShapes,
  ties: readonly Tie[],
  amplitude: Float32Array,
  largest: number,
): Int32Array {
  const pieces = shapes.members.reduce((sum, member) => sum + member.count - 1, 0);
  const segments = new Int32Array(3 * (pieces + ties.length));
  let at = 0;
  const add = (a: number, b: number): void => {
    const mean = ((amplitude[a] ?? 0) + (amplitude[b] ?? 0)) / 2;
    const share = largest > 0 ? mean / largest : 0;
    segments[at] = a;
    segments[at + 1] = b;
    segments[at + 2] = Math.min(INK_STEPS - 1, Math.floor(share * INK_STEPS));
    at += 3;
  };
  for (const { first, count } of shapes.members) {
    for (let i = first; i < first + count - 1; i += 1) add(i, i + 1);
  }
  for (const [a, b] of ties) add(a, b);
  return segments;
}

/** Rigid links and springs: what ties nodes together without being a member. */
export function tiesOf(document: FrameDocument, shapes: ModeShapes): Tie[] {
  const point = new Map(shapes.nodes.map((id, i) => [id, i]));
  const pairs = [
    ...document.springs.map(({ start, end }) => [start, end] as const),
    ...document.rigidLinks.flatMap(({ main, others }) =>
      others.map((other) => [main, other] as const),
    ),
  ];
  return pairs.flatMap(([a, b]): Tie[] => {
    const from = point.get(a);
    const to = point.get(b);
    return from === undefined || to === undefined ? [] : [[from, to]];
  });
}
