import type { ReactNode } from 'react';
import { DISPLACEMENTS, type Displacement, type Vector3 } from '#shared/schemas/frameDocument.ts';
import type { QuantityKind } from '#shared/units/quantities.ts';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import { orNothing, withField } from '../../state/withField.ts';
import { isRotation } from './checks.ts';

/** Rows of narrow fields. */
export function FieldGrid({ children, columns = 2 }: { children: ReactNode; columns?: 2 | 3 }) {
  return (
    <div className={columns === 3 ? 'grid grid-cols-3 gap-2' : 'grid grid-cols-2 gap-x-3 gap-y-2'}>
      {children}
    </div>
  );
}

/** A part of a form that most entries leave alone: closed until it is wanted. */
export function FormPart({
  title,
  said,
  children,
}: {
  title: string;
  /** What stands in it now, in a word or two. */
  said?: string;
  children: ReactNode;
}) {
  return (
    <details className="border-t border-rule pt-2">
      <summary className="flex min-h-7 cursor-pointer items-baseline gap-2">
        <span className="font-medium">{title}</span>
        {said !== undefined && <span className="text-sm text-ink-soft">{said}</span>}
      </summary>
      <div className="space-y-2 pt-1 pb-2">{children}</div>
    </details>
  );
}

interface VectorFieldProps {
  readonly label: string;
  readonly kind?: QuantityKind;
  readonly value: Vector3;
  readonly onCommit: (value: Vector3) => void;
  readonly disabled: boolean;
  readonly error?: string | undefined;
}

/** Three numbers along X, Y, Z. */
export function VectorField({
  label,
  kind = 'length',
  value,
  onCommit,
  disabled,
  error,
}: VectorFieldProps) {
  return (
    <fieldset>
      <legend className="text-sm text-ink-soft">{label}</legend>
      <FieldGrid columns={3}>
        {(['X', 'Y', 'Z'] as const).map((letter, axis) => (
          <QuantityInput
            key={letter}
            label={letter}
            kind={kind}
            value={value[axis] ?? 0}
            disabled={disabled}
            onCommit={(next) => onCommit(value.with(axis, next) as Vector3)}
            {...(axis === 0 ? { error } : {})}
          />
        ))}
      </FieldGrid>
    </fieldset>
  );
}

type PerDisplacement = { [D in Displacement]?: number | undefined };

interface SixFieldProps<Values extends PerDisplacement> {
  readonly label: string;
  readonly translation: QuantityKind;
  readonly rotation: QuantityKind;
  readonly value: Values | undefined;
  readonly onCommit: (value: Values | undefined) => void;
  readonly unknowns: readonly Displacement[];
  readonly check: (value: number) => string | null;
  readonly disabled: boolean;
  readonly error?: string | undefined;
}

/** One number per displacement, each left empty where there is none. */
export function SixField<Values extends PerDisplacement>({
  label,
  translation,
  rotation,
  value,
  onCommit,
  unknowns,
  check,
  disabled,
  error,
}: SixFieldProps<Values>) {
  const set = (displacement: Displacement, next: number | undefined) => {
    const before: PerDisplacement = value ?? {};
    onCommit(orNothing(withField(before, displacement, next)) as Values | undefined);
  };
  return (
    <fieldset>
      <legend className="text-sm text-ink-soft">{label}</legend>
      <FieldGrid>
        {DISPLACEMENTS.filter((one) => unknowns.includes(one) || value?.[one] !== undefined).map(
          (displacement) => (
            <QuantityInput
              key={displacement}
              label={displacement}
              kind={isRotation(displacement) ? rotation : translation}
              value={value?.[displacement] ?? null}
              disabled={disabled}
              check={check}
              onCommit={(next) => set(displacement, next)}
              onClear={() => set(displacement, undefined)}
            />
          ),
        )}
      </FieldGrid>
      {error !== undefined && <p className="mt-1 text-sm text-signal-text">▲ {error}</p>}
    </fieldset>
  );
}
