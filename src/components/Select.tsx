import type { ComponentProps } from 'react';
import { Field, type FieldProps } from './Field.tsx';

export interface SelectOption<Value extends string = string> {
  value: Value;
  label: string;
  disabled?: boolean;
}

type SelectProps<Value extends string> = Omit<
  ComponentProps<'select'>,
  'children' | 'className' | 'id' | 'value' | 'onChange'
> &
  Omit<FieldProps, 'children'> & {
    options: readonly SelectOption<Value>[];
    value: Value;
    onValueChange: (value: Value) => void;
    /** The label is there for assistive technology only (in table cells, where the column says it). */
    labelHidden?: boolean;
  };

/** The browser's own list box: it works by touch, keyboard and every assistive technology as people know it. */
export function Select<Value extends string>({
  label,
  hint,
  error,
  aside,
  className,
  options,
  value,
  onValueChange,
  labelHidden = false,
  ...select
}: SelectProps<Value>) {
  const choose = (chosen: string) => {
    const option = options.find((one) => one.value === chosen);
    if (option) onValueChange(option.value);
  };
  const list = options.map((option) => (
    <option key={option.value} value={option.value} disabled={option.disabled === true}>
      {option.label}
    </option>
  ));
  if (labelHidden) {
    return (
      <select
        {...select}
        aria-label={typeof label === 'string' ? label : undefined}
        value={value}
        onChange={(event) => choose(event.target.value)}
        className="control"
      >
        {list}
      </select>
    );
  }
  return (
    <Field
      label={label}
      hint={hint}
      error={error}
      aside={aside}
      {...(className === undefined ? {} : { className })}
    >
      {(control) => (
        <select
          {...select}
          {...control}
          value={value}
          onChange={(event) => choose(event.target.value)}
          className="control"
        >
          {list}
        </select>
      )}
    </Field>
  );
}
