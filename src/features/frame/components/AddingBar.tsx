import { useForm } from 'react-hook-form';
import type { FrameDocument, Vector3 } from '#shared/schemas/frameDocument.ts';
import { Button } from '#src/components/Button.tsx';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import type { WorkPlane } from '#src/viewer/camera/projection.ts';
import { labelOf } from '../state/lists.ts';
import type { Adding } from '../state/useAdding.ts';

interface AddingBarProps {
  readonly frame: FrameDocument;
  readonly adding: Adding;
}

const PLANES = [
  { axis: 2, name: 'level Z' },
  { axis: 1, name: 'upright, Y' },
  { axis: 0, name: 'upright, X' },
] as const satisfies readonly { axis: WorkPlane['axis']; name: string }[];

/** What adding is about, on which plane and grid new points go, and the same without a pointer. */
export function AddingBar({ frame, adding }: AddingBarProps) {
  const { what, from, plane, step } = adding;
  if (!what) return null;
  const ask =
    what === 'member'
      ? from
        ? `Member from ${from.node === null ? 'there' : labelOf(frame, 'nodes', from.node)}: press its other end.`
        : 'Press the member’s first end: a node, or a grid point for a new one.'
      : what === 'node'
        ? 'Press a grid point for the new node.'
        : `Press the node ${what === 'support' ? 'to support' : 'the mass hangs on'}.`;
  return (
    <div
      role="group"
      aria-label={`Adding a ${what}`}
      className="absolute inset-x-2 top-2 z-10 flex flex-wrap items-end gap-x-4 gap-y-2 border border-ink bg-sheet px-3 py-2 text-sm md:right-auto md:max-w-[calc(100%-1rem)]"
    >
      <p aria-live="polite" className="min-w-56 self-center font-medium">
        {ask}
      </p>
      {(what === 'member' || what === 'node') && (
        <>
          <label className="block">
            <span className="block text-ink-soft">New points on</span>
            <select
              className="control"
              value={plane.axis}
              onChange={(event) => {
                const axis = PLANES.find((one) => String(one.axis) === event.target.value)?.axis;
                if (axis !== undefined) adding.setPlane({ ...plane, axis });
              }}
            >
              {PLANES.map(({ axis, name }) => (
                <option key={axis} value={axis}>
                  {name}
                </option>
              ))}
            </select>
          </label>
          <QuantityInput
            className="w-24"
            label="at"
            kind="length"
            value={plane.at}
            onCommit={(at) => adding.setPlane({ ...plane, at })}
          />
          <QuantityInput
            className="w-24"
            label="Grid"
            kind="length"
            value={step}
            check={(value) => (value > 0 ? null : 'Above 0')}
            onCommit={adding.setStep}
          />
        </>
      )}
      {what === 'member' && <ByNodes frame={frame} onJoin={adding.join} />}
      {what === 'node' && <AtCoordinates onPlace={adding.place} />}
      {(what === 'support' || what === 'mass') && <OnNode frame={frame} onChoose={adding.hang} />}
      <Button onClick={adding.stop}>
        Done <kbd className="num text-ink-soft">Esc</kbd>
      </Button>
    </div>
  );
}

function ByNodes({
  frame,
  onJoin,
}: {
  frame: FrameDocument;
  onJoin: (start: string, end: string) => void;
}) {
  const form = useForm({ defaultValues: { start: '', end: '' } });
  const { errors } = form.formState;
  const exists = (id: string) => frame.nodes.some((node) => node.id === id) || 'No such node.';
  return (
    <form
      className="flex flex-wrap items-end gap-2"
      onSubmit={(event) => {
        void form.handleSubmit(({ start, end }) => {
          onJoin(start, end);
          form.reset({ start: end, end: '' });
        })(event);
      }}
    >
      <NodeInput
        label="or from node"
        error={errors.start?.message}
        frame={frame}
        {...form.register('start', { validate: exists })}
      />
      <NodeInput
        label="to node"
        error={errors.end?.message}
        frame={frame}
        {...form.register('end', {
          validate: (end, { start }) =>
            end === start ? 'The two ends are one node.' : exists(end),
        })}
      />
      <Button type="submit">Add</Button>
    </form>
  );
}

function OnNode({ frame, onChoose }: { frame: FrameDocument; onChoose: (node: string) => void }) {
  const form = useForm({ defaultValues: { node: '' } });
  return (
    <form
      className="flex items-end gap-2"
      onSubmit={(event) => {
        void form.handleSubmit(({ node }) => onChoose(node))(event);
      }}
    >
      <NodeInput
        label="or its id"
        frame={frame}
        error={form.formState.errors.node?.message}
        {...form.register('node', {
          validate: (id) => frame.nodes.some((node) => node.id === id) || 'No such node.',
        })}
      />
      <Button type="submit">Add</Button>
    </form>
  );
}

function AtCoordinates({ onPlace }: { onPlace: (at: Vector3) => void }) {
  return (
    <Button look="quiet" onClick={() => onPlace([0, 0, 0])}>
      or at the origin, then type its place
    </Button>
  );
}

interface NodeInputProps extends React.ComponentProps<'input'> {
  readonly label: string;
  readonly error: string | undefined;
  readonly frame: FrameDocument;
}

function NodeInput({ label, error, frame, ...input }: NodeInputProps) {
  const list = `nodes-${input.name ?? ''}`;
  return (
    <label className="block w-28">
      <span className="block text-ink-soft">{label}</span>
      <input
        type="text"
        autoComplete="off"
        list={list}
        aria-invalid={error ? true : undefined}
        className="control"
        {...input}
      />
      <datalist id={list}>
        {frame.nodes.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </datalist>
      {error && (
        <span role="alert" className="block text-signal-text">
          ▲ {error}
        </span>
      )}
    </label>
  );
}
