import { clsx } from 'clsx';
import type { ComponentProps } from 'react';
import { Field, type FieldProps } from './Field.tsx';

type TextInputProps = Omit<ComponentProps<'input'>, 'children' | 'className' | 'id'> &
  Omit<FieldProps, 'children'>;

export function TextInput({ label, hint, error, aside, className, ...input }: TextInputProps) {
  return (
    <Field
      label={label}
      hint={hint}
      error={error}
      aside={aside}
      {...(className === undefined ? {} : { className })}
    >
      {(control) => <input type="text" {...input} {...control} className="control" />}
    </Field>
  );
}

type TextAreaProps = Omit<ComponentProps<'textarea'>, 'children' | 'className' | 'id'> &
  Omit<FieldProps, 'children'>;

export function TextArea({ label, hint, error, aside, className, ...area }: TextAreaProps) {
  return (
    <Field
      label={label}
      hint={hint}
      error={error}
      aside={aside}
      {...(className === undefined ? {} : { className })}
    >
      {(control) => (
        <textarea rows={4} {...area} {...control} className={clsx('control', 'resize-y')} />
      )}
    </Field>
  );
}
