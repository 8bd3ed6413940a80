import type { OperatingState, PointMass, SupportCondition } from '#shared/schemas/frameDocument.ts';
import { Checkbox } from '#src/components/Checkbox.tsx';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import { Select } from '#src/components/Select.tsx';
import { orNothing, withField } from '../../state/withField.ts';
import { above0 } from '../fields/checks.ts';
import { FieldGrid, FormPart, VectorField } from '../fields/fields.tsx';
import { IdField, ReferenceField, TextField } from '../fields/textFields.tsx';
import type { EntryFormProps } from './EntryFormProps.ts';

const CONDITIONS = [
  { value: 'soft', label: 'soft' },
  { value: 'expected', label: 'as expected' },
  { value: 'stiff', label: 'stiff' },
] as const satisfies readonly { value: SupportCondition; label: string }[];
const FOR_ALL = [...CONDITIONS, { value: 'each', label: 'each by itself' }] as const;

export function StateForm(props: EntryFormProps<'states'>) {
  const { frame, entry, onChange, problem, disabled } = props;
  return (
    <div className="space-y-2">
      <FieldGrid>
        <IdField
          value={entry.id}
          onCommit={(id) => onChange({ ...entry, id })}
          disabled={disabled}
          error={problem('id')}
        />
        <TextField
          label="Name"
          value={entry.name}
          onCommit={(name) => onChange({ ...entry, name })}
          disabled={disabled}
          error={problem('name')}
        />
      </FieldGrid>
      <Supports {...props} />
      {frame.masses.length === 0 ? (
        <p className="text-sm text-ink-soft">
          The frame has no masses yet that this state could move, change or leave out.
        </p>
      ) : (
        frame.masses.map((mass) => <MassInState key={mass.id} mass={mass} {...props} />)
      )}
    </div>
  );
}

function Supports({ frame, entry, onChange, problem, disabled }: EntryFormProps<'states'>) {
  const byNode = typeof entry.supports === 'string' ? null : entry.supports;
  const conditionOf = (node: string) => byNode?.[node] ?? 'expected';
  return (
    <>
      <Select
        label="Supports"
        options={FOR_ALL}
        value={typeof entry.supports === 'string' ? entry.supports : 'each'}
        disabled={disabled}
        error={problem('supports')}
        onValueChange={(choice) => {
          const all = typeof entry.supports === 'string' ? entry.supports : 'expected';
          onChange({
            ...entry,
            supports:
              choice === 'each'
                ? Object.fromEntries(frame.supports.map(({ node }) => [node, all]))
                : choice,
          });
        }}
      />
      {byNode && (
        <FieldGrid>
          {frame.supports.map(({ node }) => (
            <Select
              key={node}
              label={`At node ${node}`}
              options={CONDITIONS}
              value={conditionOf(node)}
              disabled={disabled}
              onValueChange={(condition) =>
                onChange({ ...entry, supports: { ...byNode, [node]: condition } })
              }
            />
          ))}
        </FieldGrid>
      )}
    </>
  );
}

type MassChange = OperatingState['masses'][string];

/** What a state says of one mass: left out, another mass, another node, another offset. */
function MassInState({
  mass,
  frame,
  entry,
  onChange,
  problem,
  disabled,
}: EntryFormProps<'states'> & { mass: PointMass }) {
  const change = entry.masses[mass.id] ?? {};
  const set = (next: MassChange) =>
    onChange({ ...entry, masses: withField(entry.masses, mass.id, orNothing(next)) });
  const words = [
    change.present === false ? 'left out' : '',
    change.mass === undefined ? '' : 'other mass',
    change.node === undefined ? '' : 'other node',
    change.offset === undefined ? '' : 'other place',
  ].filter(Boolean);
  const error = problem(`masses.${mass.id}`);
  return (
    <FormPart
      title={mass.name || mass.id}
      said={words.length === 0 ? 'as in the frame' : words.join(', ')}
    >
      <Checkbox
        label="Present in this state"
        checked={change.present !== false}
        disabled={disabled}
        onCheckedChange={(present) =>
          set(withField(change, 'present', present ? undefined : false))
        }
      />
      {change.present !== false && (
        <>
          <FieldGrid>
            <QuantityInput
              label="Mass"
              hint="Empty: as in the frame."
              kind="mass"
              value={change.mass ?? null}
              check={above0}
              onCommit={(value) => set({ ...change, mass: value })}
              onClear={() => set(withField(change, 'mass', undefined))}
              disabled={disabled}
            />
            <ReferenceField
              label="Hangs on node"
              frame={frame}
              list="nodes"
              value={change.node ?? mass.node}
              onCommit={(node) =>
                set(withField(change, 'node', node === mass.node ? undefined : node))
              }
              disabled={disabled}
            />
          </FieldGrid>
          <VectorField
            label="From the node to its centre of gravity"
            value={change.offset ?? mass.offset}
            onCommit={(offset) => set({ ...change, offset })}
            disabled={disabled}
          />
        </>
      )}
      {error !== undefined && <p className="text-sm text-signal-text">▲ {error}</p>}
    </FormPart>
  );
}
