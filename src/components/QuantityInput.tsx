import type { KeyboardEvent } from 'react';
import { useQuantityText, type QuantityTextOptions } from '#src/hooks/useQuantityText.ts';
import { useUnits } from '#src/hooks/useUnits.ts';
import { Field, type FieldProps } from './Field.tsx';

type QuantityInputProps = QuantityTextOptions &
  Omit<FieldProps, 'children' | 'aside' | 'label'> & {
    label: string;
    disabled?: boolean;
    /** The label is there for assistive technology only (in table cells, where the column says it). */
    labelHidden?: boolean;
  };

/**
 * A number with its unit, typed as one would say it (`2*450 mm + 1/2 in`); what it understood stands beside
 * the label. Enter or leaving the field takes it over, Escape takes it back.
 */
export function QuantityInput({
  label,
  hint,
  error,
  className,
  disabled = false,
  labelHidden = false,
  ...options
}: QuantityInputProps) {
  const units = useUnits();
  const typed = useQuantityText(options);
  const problem = typed.error ?? error;
  const input = {
    type: 'text',
    inputMode: 'text',
    autoComplete: 'off',
    spellCheck: false,
    disabled,
    value: typed.text,
    onChange: (event: { target: { value: string } }) => typed.change(event.target.value),
    onBlur: typed.commit,
    onKeyDown: (event: KeyboardEvent) => {
      if (event.key === 'Enter') typed.commit();
      if (event.key === 'Escape' && typed.restore()) event.stopPropagation();
    },
  } as const;

  if (labelHidden) {
    return (
      <>
        <input
          {...input}
          aria-label={label}
          aria-invalid={problem ? true : undefined}
          className="control num text-right"
        />
        <span aria-live="polite" className="block text-right text-sm">
          {problem ? (
            <span className="text-signal-text">▲ {problem}</span>
          ) : (
            typed.understood !== null && <span className="text-ink-soft">= {typed.understood}</span>
          )}
        </span>
      </>
    );
  }
  return (
    <Field
      label={label}
      hint={hint}
      error={problem}
      aside={
        <span aria-live="polite" className="num">
          {typed.understood === null ? units.symbol(options.kind) : `= ${typed.understood}`}
        </span>
      }
      {...(className === undefined ? {} : { className })}
    >
      {(control) => <input {...input} {...control} className="control num" />}
    </Field>
  );
}
