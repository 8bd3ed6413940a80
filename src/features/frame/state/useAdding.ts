import { useCallback, useState } from 'react';
import type { FrameDocument, Vector3 } from '#shared/schemas/frameDocument.ts';
import type { WorkPlane } from '#src/viewer/camera/projection.ts';
import type { Pointing } from '#src/viewer/overlay/drawSheet.ts';
import type { PointedAt } from '#src/viewer/pointUnder.ts';
import { apply, type FrameCommand } from './command.ts';
import type { FrameEditing } from './FrameEditing.ts';
import { newEntry, newMember, newNode } from './newEntry.ts';

export type AddingWhat = 'node' | 'member' | 'support' | 'mass';

/** Adding things in the view, one press after the other, until it is stopped. */
export interface Adding {
  readonly what: AddingWhat | null;
  /** First end of the member being drawn. */
  readonly from: PointedAt | null;
  readonly plane: WorkPlane;
  /** Grid step, m. */
  readonly step: number;
  /** For the view: null while nothing is being added. */
  readonly pointing: Pointing | null;
  readonly start: (what: AddingWhat) => void;
  readonly stop: () => void;
  readonly setPlane: (plane: WorkPlane) => void;
  readonly setStep: (step: number) => void;
  /** A press in the view. */
  readonly point: (at: PointedAt) => void;
  readonly place: (at: Vector3) => void;
  readonly join: (start: string, end: string) => void;
  readonly hang: (node: string) => void;
}

const FIRST_STEP = 0.1;

export function useAdding(
  frame: FrameDocument,
  run: FrameEditing['run'],
  choose: FrameEditing['choose'],
): Adding {
  const [what, setWhat] = useState<AddingWhat | null>(null);
  const [from, setFrom] = useState<PointedAt | null>(null);
  const [plane, setPlane] = useState<WorkPlane>({ axis: 2, at: 0 });
  const [step, setStep] = useState(FIRST_STEP);

  const start = useCallback(
    (next: AddingWhat) => {
      choose([]);
      setFrom(null);
      setWhat(next);
    },
    [choose],
  );
  const stop = () => {
    setWhat(null);
    setFrom(null);
  };

  const place = (at: Vector3) => {
    const { id, command } = newNode(frame, at);
    if (run(command, 'add node')) choose([{ list: 'nodes', id }]);
  };

  const hang = (node: string) => {
    const list = what === 'support' ? 'supports' : 'masses';
    const entry = newEntry(frame, list, node);
    if (typeof entry === 'string') return;
    if (run(entry.command, `add ${what ?? list}`)) {
      stop();
      choose([{ list, id: entry.id }]);
    }
  };

  const join = (start: string, end: string) => {
    const { id, command } = newMember(frame, start, end);
    if (run(command, 'add member')) choose([{ list: 'members', id }]);
  };

  /** Ends that are no nodes yet come into being together with the member: one step back takes all away. */
  const joinPoints = (a: PointedAt, b: PointedAt) => {
    const commands: FrameCommand[] = [];
    let grown = frame;
    const nodeAt = ({ node, at }: PointedAt): string => {
      if (node !== null) return node;
      const fresh = newNode(grown, at);
      commands.push(fresh.command);
      grown = apply(grown, fresh.command).frame;
      return fresh.id;
    };
    const start = nodeAt(a);
    const end = nodeAt(b);
    commands.push(newMember(grown, start, end).command);
    if (run({ kind: 'batch', commands }, 'add member')) setFrom({ at: b.at, node: end });
  };

  const point = (at: PointedAt) => {
    if (what === 'node') {
      if (at.node === null) place(at.at);
    } else if (what === 'member') {
      if (!from) setFrom(at);
      else if (from.at.some((part, axis) => part !== at.at[axis])) joinPoints(from, at);
    } else if (at.node !== null) hang(at.node);
  };

  return {
    what,
    from,
    plane,
    step,
    pointing: what ? { plane, step, from: from?.at ?? null } : null,
    start,
    stop,
    setPlane,
    setStep,
    point,
    place,
    join,
    hang,
  };
}
