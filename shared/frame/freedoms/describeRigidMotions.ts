import type { Vector3 } from '../../schemas/frameDocument.ts';
import type { ModelWarning } from '../../schemas/solveResult.ts';
import type { FrameModel } from '../assembly/FrameModel.ts';
import { directions, inWords } from './directions.ts';
import type { FreeMotion } from './rigidMotions.ts';
import type { Row } from './rowSpace.ts';

/** Nodes, and members, named of one part; the rest are counted. */
const MOST_NAMED = 4;
/** Parts described; the rest are counted. */
const MOST_PARTS = 20;
/** Size of a rotation, over its motion, under which the motion is a translation. */
const STRAIGHT = 1e-6;

/**
 * One sentence for the frame, or for every separate part of it, that moves rigidly: what it is, how it moves.
 *   motions  those of `rigidMotions(model)`
 */
export function describeRigidMotions(
  model: FrameModel,
  motions: readonly FreeMotion[],
): ModelWarning[] {
  if (motions.length === 0) return [];
  const free = new Map<number, Row[]>();
  for (const { component, six } of motions) {
    free.set(component, [...(free.get(component) ?? []), six]);
  }
  const whole = carryingComponents(model).size === 1;
  const held = new Set(model.holds.map(({ group }) => model.componentOf[group]!));
  const described = [...free].slice(0, MOST_PARTS).map(([component, rows]) => {
    const motion = `it ${movement(rows)}, which gives ${modesInWords(rows.length)}`;
    return whole
      ? wholeFrame(held.has(component), motion)
      : separatePart(model, component, held.has(component), motion);
  });
  const more = free.size - described.length;
  if (more > 0) {
    const parts = more === 1 ? 'One more part moves' : `${more} more parts move`;
    described.push({ path: 'supports', message: `${parts} freely as well.` });
  }
  return described;
}

function wholeFrame(held: boolean, motion: string): ModelWarning {
  const message = held
    ? `The supports do not hold the frame in every direction: ${motion}. Support those directions as well, unless it is meant to float.`
    : `The frame stands on nothing that holds it: ${motion}. Give it supports, unless it is meant to float.`;
  return { path: 'supports', message };
}

function separatePart(
  model: FrameModel,
  component: number,
  held: boolean,
  motion: string,
): ModelWarning {
  const { nodes, members } = model.document;
  const within = (node: string) =>
    model.componentOf[model.groupOf[model.nodeIndex.get(node)!]!] === component;
  const ids = nodes.flatMap(({ id }) => (within(id) ? [id] : []));
  const names = members.flatMap(({ id, name, start }) => (within(start) ? [name ?? id] : []));
  const subject = `${ids.length > 1 ? 'Nodes' : 'Node'} ${named(ids)}`;
  const carried = names.length > 0 ? ` (member${names.length > 1 ? 's' : ''} ${named(names)})` : '';
  const verb = ids.length > 1 ? 'stand' : 'stands';
  const how = held ? 'that part is not held in every direction' : 'nothing holds that part';
  return {
    path: `nodes.${model.nodeIndex.get(ids[0]!)!}`,
    message:
      `${subject}${carried} ${verb} apart from the rest, and ${how}: ${motion}. ` +
      'Hold it, or join it to the rest, unless it is meant to float.',
  };
}

/** Components with anything that has mass or stiffness between nodes: a node alone is none. */
function carryingComponents({ document, componentOf, groupOf, nodeIndex }: FrameModel) {
  const nodes = [
    ...document.members.map(({ start }) => start),
    ...document.springs.map(({ start }) => start),
    ...document.masses.map(({ node }) => node),
  ];
  return new Set(nodes.map((node) => componentOf[groupOf[nodeIndex.get(node)!]!]!));
}

/**
 * "moves along X and turns about Y and Z": the translations among the motions, and the axes of all the others.
 * A motion with any rotation in it is a turn about an axis somewhere (or a screw), whose direction is that rotation's.
 */
function movement(rows: readonly Row[]): string {
  const turns = rows.map((row): Vector3 => [row[3]!, row[4]!, row[5]!]);
  const along = directions(translations(rows));
  const about = directions(turns);
  const parts = [along && `moves along ${along}`, about && `turns about ${about}`];
  return parts.filter((part) => part !== '').join(' and ');
}

/** The combinations of the motions that turn nothing. */
function translations(rows: readonly Row[]): Vector3[] {
  const left = rows.map((row) => Float64Array.from(row));
  for (let k = 0; k < 3 && left.length > 0; k++) {
    let [row, axis] = [0, 3];
    left.forEach((motion, r) => {
      for (let c = 3; c < 6; c++) {
        if (Math.abs(motion[c]!) > Math.abs(left[row]![axis]!)) [row, axis] = [r, c];
      }
    });
    const pivot = left[row]!;
    if (Math.abs(pivot[axis]!) <= STRAIGHT * Math.hypot(...pivot)) break;
    left.splice(row, 1);
    for (const other of left) {
      const share = other[axis]! / pivot[axis]!;
      for (let c = 0; c < 6; c++) other[c]! -= share * pivot[c]!;
    }
  }
  return left.map((motion): Vector3 => [motion[0]!, motion[1]!, motion[2]!]);
}

function modesInWords(count: number): string {
  return count === 1 ? 'one mode of 0 Hz' : `${count} modes of 0 Hz`;
}

function named(names: readonly string[]): string {
  const more = names.length - MOST_NAMED;
  const list = names.slice(0, MOST_NAMED).map((name) => `“${name}”`);
  return inWords(more > 0 ? [...list, `${more} more`] : list);
}
