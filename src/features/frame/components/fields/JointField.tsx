import { DISPLACEMENTS, type Displacement, type Joint } from '#shared/schemas/frameDocument.ts';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import { Select } from '#src/components/Select.tsx';
import { orNothing, withField } from '../../state/withField.ts';
import { above0, isRotation } from './checks.ts';

interface JointFieldProps {
  readonly label: string;
  readonly value: Joint | undefined;
  readonly unknowns: readonly Displacement[];
  readonly onCommit: (joint: Joint | undefined) => void;
  readonly disabled: boolean;
  readonly error?: string | undefined;
}

const CHOICES = [
  { value: 'rigid', label: 'rigid' },
  { value: 'free', label: 'free' },
  { value: 'stiff', label: 'stiffness' },
] as const;
type Choice = (typeof CHOICES)[number]['value'];

/** First stiffness of a joint that is made to give: soft against most members, so that it is seen. */
const FIRST_STIFFNESS = { translation: 1e7, rotation: 1e5 } as const;

const choiceOf = (value: number | undefined): Choice =>
  value === undefined ? 'rigid' : value === 0 ? 'free' : 'stiff';

/** A joint: each displacement rigid, free, or with a stiffness. */
export function JointField({ label, value, unknowns, onCommit, disabled, error }: JointFieldProps) {
  const set = (displacement: Displacement, stiffness: number | undefined) =>
    onCommit(orNothing(withField(value ?? {}, displacement, stiffness)));
  const choose = (displacement: Displacement, choice: Choice) => {
    if (choice === 'rigid') set(displacement, undefined);
    else if (choice === 'free') set(displacement, 0);
    else {
      set(displacement, FIRST_STIFFNESS[isRotation(displacement) ? 'rotation' : 'translation']);
    }
  };
  const shown = DISPLACEMENTS.filter((one) => unknowns.includes(one) || value?.[one] !== undefined);
  return (
    <fieldset className="space-y-1">
      <legend className="text-sm font-medium">{label}</legend>
      {shown.map((displacement) => (
        <div key={displacement} className="grid grid-cols-[2rem_1fr_1fr] items-center gap-2">
          <span className="num">{displacement}</span>
          <Select
            labelHidden
            label={`${label}: ${displacement}`}
            options={CHOICES}
            value={choiceOf(value?.[displacement])}
            onValueChange={(choice) => choose(displacement, choice)}
            disabled={disabled}
          />
          {choiceOf(value?.[displacement]) === 'stiff' && (
            <QuantityInput
              labelHidden
              label={`${label}: stiffness of ${displacement}`}
              kind={isRotation(displacement) ? 'rotationalStiffness' : 'stiffness'}
              value={value?.[displacement] ?? null}
              check={above0}
              onCommit={(stiffness) => set(displacement, stiffness)}
              disabled={disabled}
            />
          )}
        </div>
      ))}
      {error !== undefined && <p className="text-sm text-signal-text">▲ {error}</p>}
    </fieldset>
  );
}
