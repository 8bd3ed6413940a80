import { DISPLACEMENTS, type Displacement, type Support } from '#shared/schemas/frameDocument.ts';
import { Checkbox } from '#src/components/Checkbox.tsx';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import { Select } from '#src/components/Select.tsx';
import { useUnits } from '#src/hooks/useUnits.ts';
import { orNothing, withField } from '../../state/withField.ts';
import { above0, isRotation, not0Below } from '../fields/checks.ts';
import { FieldGrid, FormPart, SixField, VectorField } from '../fields/fields.tsx';
import { ReferenceField, TextField } from '../fields/textFields.tsx';
import type { EntryFormProps } from './EntryFormProps.ts';

const CHOICES = [
  { value: 'free', label: 'free' },
  { value: 'fixed', label: 'fixed' },
  { value: 'sprung', label: 'sprung' },
] as const;
type Choice = (typeof CHOICES)[number]['value'];

/** First stiffness of a displacement that is made sprung: the order of a rubber machine foot. */
const FIRST_STIFFNESS = { translation: 1e6, rotation: 1e4 } as const;

export function SupportForm(props: EntryFormProps<'supports'>) {
  const { frame, entry, onChange, problem, disabled } = props;
  return (
    <div className="space-y-2">
      <ReferenceField
        label="Under node"
        frame={frame}
        list="nodes"
        value={entry.node}
        onCommit={(node) => onChange({ ...entry, node })}
        disabled={disabled}
        error={problem('node')}
      />
      <Displacements {...props} />
      <FieldGrid>
        {(['soft', 'stiff'] as const).map((end) => (
          <QuantityInput
            key={end}
            label={end === 'soft' ? 'Soft: times' : 'Stiff: times'}
            kind="ratio"
            value={entry.bracket[end]}
            check={above0}
            onCommit={(factor) =>
              onChange({ ...entry, bracket: { ...entry.bracket, [end]: factor } })
            }
            disabled={disabled}
            error={problem(`bracket.${end}`) ?? (end === 'soft' ? problem('bracket') : undefined)}
          />
        ))}
      </FieldGrid>
      <FormPart title="Damping" said={entry.damping ? 'stated' : 'none'}>
        <SixField
          label="Per displacement"
          translation="damping"
          rotation="rotationalDamping"
          value={entry.damping}
          unknowns={frame.unknowns}
          check={not0Below}
          disabled={disabled}
          error={problem('damping')}
          onCommit={(damping) => onChange(withField(entry, 'damping', damping))}
        />
      </FormPart>
      <Axes {...props} />
      <TextField
        long
        label="Where the figures come from"
        value={entry.basis ?? ''}
        onCommit={(basis) => onChange(withField(entry, 'basis', basis || undefined))}
        disabled={disabled}
        error={problem('basis')}
      />
    </div>
  );
}

function Displacements({ frame, entry, onChange, problem, disabled }: EntryFormProps<'supports'>) {
  const units = useUnits();
  const shown = DISPLACEMENTS.filter(
    (one) =>
      frame.unknowns.includes(one) ||
      entry.fixed.includes(one) ||
      entry.stiffness?.[one] !== undefined,
  );
  const error = problem('fixed') ?? problem('stiffness');
  return (
    <fieldset className="space-y-1">
      <legend className="mb-1 text-sm font-medium">What it holds</legend>
      {shown.map((displacement) => {
        const kind = isRotation(displacement) ? 'rotationalStiffness' : 'stiffness';
        return (
          <div
            key={displacement}
            className="grid grid-cols-[2rem_1fr_1fr_3.5rem] items-center gap-2"
          >
            <span className="num">{displacement}</span>
            <Select
              labelHidden
              label={`Displacement ${displacement}`}
              options={CHOICES}
              value={choiceOf(entry, displacement)}
              onValueChange={(choice) => onChange(chosen(entry, displacement, choice))}
              disabled={disabled}
            />
            {choiceOf(entry, displacement) === 'sprung' && (
              <>
                <QuantityInput
                  labelHidden
                  label={`Stiffness of ${displacement}`}
                  kind={kind}
                  value={entry.stiffness?.[displacement] ?? null}
                  check={above0}
                  onCommit={(stiffness) =>
                    onChange({
                      ...entry,
                      stiffness: { ...entry.stiffness, [displacement]: stiffness },
                    })
                  }
                  disabled={disabled}
                />
                <span className="num text-sm text-ink-soft">{units.symbol(kind)}</span>
              </>
            )}
          </div>
        );
      })}
      {error !== undefined && <p className="text-sm text-signal-text">▲ {error}</p>}
    </fieldset>
  );
}

function choiceOf(support: Support, displacement: Displacement): Choice {
  if (support.stiffness?.[displacement] !== undefined) return 'sprung';
  return support.fixed.includes(displacement) ? 'fixed' : 'free';
}

function chosen(support: Support, displacement: Displacement, choice: Choice): Support {
  const fixed = DISPLACEMENTS.filter((one) =>
    one === displacement ? choice === 'fixed' : support.fixed.includes(one),
  );
  const first = FIRST_STIFFNESS[isRotation(displacement) ? 'rotation' : 'translation'];
  const stiffness = withField(
    support.stiffness ?? {},
    displacement,
    choice === 'sprung' ? (support.stiffness?.[displacement] ?? first) : undefined,
  );
  return withField({ ...support, fixed }, 'stiffness', orNothing(stiffness));
}

function Axes({ entry, onChange, problem, disabled }: EntryFormProps<'supports'>) {
  const { axes } = entry;
  return (
    <FormPart title="Inclined axes" said={axes ? 'stated' : 'global X Y Z'}>
      <Checkbox
        label="The support has axes of its own"
        checked={axes !== undefined}
        disabled={disabled}
        onCheckedChange={(own) =>
          onChange(withField(entry, 'axes', own ? { x: [1, 0, 0], z: [0, 0, 1] } : undefined))
        }
      />
      {axes &&
        (['x', 'z'] as const).map((axis) => (
          <VectorField
            key={axis}
            label={
              axis === 'x' ? 'Direction of its x' : 'Direction of its z (made perpendicular to x)'
            }
            kind="ratio"
            value={axes[axis]}
            disabled={disabled}
            error={problem(`axes.${axis}`) ?? (axis === 'x' ? problem('axes') : undefined)}
            onCommit={(value) => onChange({ ...entry, axes: { ...axes, [axis]: value } })}
          />
        ))}
    </FormPart>
  );
}
