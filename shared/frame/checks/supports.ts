import { DISPLACEMENTS, type Support, type Vector3 } from '../../schemas/frameDocument.ts';
import { cross, norm, scale, subtract, dot } from '../vector3.ts';
import type { EntryFindings, Findings } from './findings.ts';
import type { FormedDocument } from './formedDocument.ts';
import { checkNodeReference } from './nodes.ts';
import { directionInSet, FLAT_TOLERANCE, type UnknownSet } from './reducedSet.ts';

/** Under this sine between them, the two given axes count as parallel. */
const PARALLEL = 1e-6;

type Axes = readonly [Vector3, Vector3, Vector3];
const GLOBAL_AXES: Axes = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** Each support holds an existing node, by something, and no displacement twice. */
export function checkSupports(document: FormedDocument, set: UnknownSet, findings: Findings): void {
  document.supports.entries.forEach((support, place) => {
    if (!support) return;
    const about = findings.about('supports', place, support);
    checkNodeReference(document, support.node, 'node', 'node', about);
    checkHeldOnce(support, about);
    const axes = support.axes ? inclinedAxes(support.axes, about) : GLOBAL_AXES;
    if (set.reduced && axes) checkAgainstSet(support, axes, set, about);
  });
}

function checkHeldOnce(support: Support, about: EntryFindings): void {
  const fixed = new Set(support.fixed);
  if (fixed.size < support.fixed.length) {
    about.refuse('fixed', 'a displacement is listed twice under fixed. Name each once.');
  }
  for (const displacement of fixed) {
    if (support.stiffness?.[displacement] !== undefined) {
      about.refuse(
        `stiffness.${displacement}`,
        `${displacement} is both fixed and given a stiffness. Keep one of the two.`,
      );
    }
  }
  const sprung = DISPLACEMENTS.some((d) => support.stiffness?.[d] !== undefined);
  if (fixed.size === 0 && !sprung) {
    about.warn('', 'it holds nothing. Fix a displacement or give it a stiffness.');
  }
}

/** x, y, z of an inclined support as unit vectors, z made perpendicular to x; null where they give no axes. */
function inclinedAxes(
  { x, z }: { readonly x: Vector3; readonly z: Vector3 },
  about: EntryFindings,
): Axes | null {
  const lengths = { x: norm(x), z: norm(z) };
  for (const axis of ['x', 'z'] as const) {
    if (lengths[axis] <= FLAT_TOLERANCE) {
      about.refuse(`axes.${axis}`, `its ${axis} axis has no length. Give it a direction.`);
      return null;
    }
  }
  const ux = scale(x, 1 / lengths.x);
  const across = subtract(z, scale(ux, dot(z, ux)));
  if (norm(across) <= PARALLEL * lengths.z) {
    about.refuse('axes.z', 'its z axis points along its x axis. Give two different directions.');
    return null;
  }
  const uz = scale(across, 1 / norm(across));
  return [ux, cross(uz, ux), uz];
}

function checkAgainstSet(
  support: Support,
  axes: Axes,
  set: UnknownSet,
  about: EntryFindings,
): void {
  const places = DISPLACEMENTS.map((_, i) =>
    directionInSet(set, i < 3 ? 'translation' : 'rotation', axes[i % 3]!),
  );
  if (places.includes('mixed')) {
    about.refuse(
      'axes',
      `with the unknowns ${set.words}, its inclined axes would couple motion that exists with motion that does not. Line them up with the set, or choose all six unknowns.`,
    );
    return;
  }
  const outside = DISPLACEMENTS.filter(
    (d, i) =>
      places[i] === 'outside' &&
      (support.stiffness?.[d] !== undefined || support.damping?.[d] !== undefined),
  );
  const fixedOutside = support.fixed.filter((d) => places[DISPLACEMENTS.indexOf(d)] === 'outside');
  const ignored = [...new Set([...fixedOutside, ...outside])];
  if (ignored.length > 0) {
    about.warn(
      '',
      `what it does to ${ignored.join(', ')} is ignored, since the unknowns are only ${set.words}.`,
    );
  }
}
