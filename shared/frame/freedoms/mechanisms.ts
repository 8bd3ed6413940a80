import { AppError } from '../../errors/AppError.ts';
import type { Issue } from '../../errors/AppError.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';
import type { FrameModel } from '../assembly/FrameModel.ts';
import { displacements } from './Combination.ts';
import { stiffnessFreeMotions } from './stiffnessFreeMotions.ts';

/** Size of a displacement, over the largest of its motion, under which a thing counts as at rest. */
const AT_REST = 1e-6;
/** Things named in one sentence; the rest are counted. */
const MOST_NAMED = 8;

/**
 * Refuses a frame with a motion that nothing resists and that is not a whole component moving rigidly.
 *   model  the frame with one element per member
 *   rigid  its rigid motions, over the same unknowns
 * Throws AppError `mechanism`: one issue per motion, naming the nodes, members and directions that move.
 */
export function refuseMechanisms(model: FrameModel, rigid: readonly Float64Array[]): void {
  const motions = isolated(stiffnessFreeMotions(model, rigid));
  if (motions.length === 0) return;
  const issues = motions.map((x) => describe(model, x));
  const more = issues.length > 1 ? ` (and ${issues.length - 1} more such motions)` : '';
  throw new AppError(
    'mechanism',
    `The frame is a mechanism: ${issues[0]!.message}${more} Support, brace or join what moves, or remove the ` +
      'joints that free it.',
    { issues },
  );
}

/**
 * The same motions by Gauss-Jordan elimination with complete pivoting: each unlike the others in one unknown,
 * so that mechanisms in different places are told apart. Each is scaled to a largest component of 1.
 */
function isolated(motions: readonly Float64Array[]): Float64Array[] {
  const rows = motions.map((x) => x.slice());
  for (let k = 0; k < rows.length; k++) {
    let row = k;
    let column = 0;
    for (let r = k; r < rows.length; r++) {
      rows[r]!.forEach((value, c) => {
        if (Math.abs(value) > Math.abs(rows[row]![column]!)) [row, column] = [r, c];
      });
    }
    [rows[k], rows[row]] = [rows[row]!, rows[k]!];
    const pivot = rows[k]![column]!;
    for (let c = 0; c < rows[k]!.length; c++) rows[k]![c]! /= pivot;
    rows.forEach((other, r) => {
      if (r === k) return;
      const factor = other[column]!;
      for (let c = 0; c < other.length; c++) other[c]! -= factor * rows[k]![c]!;
    });
  }
  return rows.map((x) => {
    const largest = x.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
    return x.map((value) => value / largest);
  });
}

interface Mover {
  readonly path: string;
  readonly text: string;
}

function describe(model: FrameModel, x: Float64Array): Issue {
  const { nodes, largest } = movingNodes(model, x);
  const members = movingMembers(model, x, largest, nodes.length > 0);
  const path = nodes[0]?.path ?? members[0]?.path ?? '';
  const parts = [named('node', nodes), named('member', members)].filter((part) => part !== '');
  const subject = parts.join('; with ');
  return { path, message: `${subject}: nothing resists this motion.` };
}

function named(noun: string, movers: readonly Mover[]): string {
  if (movers.length === 0) return '';
  const more = movers.length - MOST_NAMED;
  const list = movers.slice(0, MOST_NAMED).map((mover) => mover.text);
  if (more > 0) list.push(`${more} more`);
  return `${noun}${movers.length > 1 ? 's' : ''} ${list.join(', ')}`;
}

function movingNodes(model: FrameModel, x: Float64Array): { nodes: Mover[]; largest: number } {
  const d = new Float64Array(6);
  const all = model.nodes.map((motion) => {
    displacements(motion, x, d);
    const t: Vector3 = [d[0]!, d[1]!, d[2]!];
    const turn: Vector3 = [d[3]! * model.scale, d[4]! * model.scale, d[5]! * model.scale];
    return { t, turn };
  });
  const size = (v: Vector3) => Math.hypot(...v);
  const largest = Math.max(1, ...all.map(({ t, turn }) => Math.max(size(t), size(turn))));
  const nodes = all.flatMap(({ t, turn }, i) => {
    const { id } = model.document.nodes[i]!;
    const moves = size(t) > AT_REST * largest;
    if (!moves && size(turn) <= AT_REST * largest) return [];
    const text = moves
      ? `“${id}” moves along ${direction(t)}`
      : `“${id}” turns about ${direction(turn)}`;
    return [{ path: `nodes.${i}`, text }];
  });
  return { nodes, largest };
}

/** Members whose ends move; where nodes move too, those that only follow them are named without a direction. */
function movingMembers(
  model: FrameModel,
  x: Float64Array,
  largest: number,
  nodesMove: boolean,
): Mover[] {
  const d = new Float64Array(12);
  const moving = new Map<number, Mover>();
  for (const { part, motion } of model.segments) {
    displacements(motion, x, d);
    const lengths = Array.from(
      d.subarray(0, motion.rows),
      (value, i) => Math.abs(value) * (i % 6 >= 3 && motion.rows === 12 ? model.scale : 1),
    );
    const most = Math.max(...lengths);
    if (most <= AT_REST * largest || moving.has(part.index)) continue;
    const spins =
      motion.rows === 12 && lengths.every((value, i) => i % 6 === 3 || value <= AT_REST * largest);
    const label = `“${part.member.name ?? part.member.id}”`;
    const text = nodesMove
      ? label
      : `${label} ${spins ? 'spins about its own axis' : 'moves at its joints'}`;
    moving.set(part.index, { path: `members.${part.index}`, text });
  }
  return [...moving.values()];
}

/** "Z", or components where the direction is along no axis. */
function direction(v: Vector3): string {
  const size = Math.hypot(...v);
  const axis = v.findIndex((component) => Math.abs(component) > 0.999 * size);
  if (axis >= 0) return 'XYZ'[axis]!;
  const sign = v.find((component) => Math.abs(component) > 1e-3 * size)! < 0 ? -1 : 1;
  return `(${v.map((component) => ((sign * component) / size).toFixed(2).replace('-0.00', '0.00')).join(', ')})`;
}
