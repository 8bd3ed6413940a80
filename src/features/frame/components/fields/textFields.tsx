import { useState } from 'react';
import { TextArea, TextInput } from '#src/components/TextInput.tsx';
import { Select } from '#src/components/Select.tsx';
import type { DocumentList } from '#shared/frame/documentDiff.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { DOCUMENT_LIMITS } from '#shared/schemas/frameDocument.ts';

interface TextFieldProps {
  readonly label: string;
  readonly value: string;
  readonly onCommit: (value: string) => void;
  readonly disabled: boolean;
  readonly hint?: string;
  readonly error?: string | undefined;
  readonly check?: (value: string) => string | null;
  readonly long?: boolean;
}

/** Text that is taken over with Enter or on leaving the field; Escape takes it back. */
export function TextField({
  label,
  value,
  onCommit,
  disabled,
  hint,
  error,
  check,
  long = false,
}: TextFieldProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const objection = typed === null ? null : (check?.(typed) ?? null);
  const commit = () => {
    if (typed === null || objection !== null) return;
    setTyped(null);
    if (typed !== value) onCommit(typed);
  };
  const shared = {
    label,
    hint,
    error: objection ?? error,
    value: typed ?? value,
    disabled,
    maxLength: long ? DOCUMENT_LIMITS.text : DOCUMENT_LIMITS.name,
    onChange: (event: { target: { value: string } }) => setTyped(event.target.value),
    onBlur: commit,
  };
  if (long) return <TextArea {...shared} rows={2} />;
  return (
    <TextInput
      {...shared}
      autoComplete="off"
      onKeyDown={(event) => {
        if (event.key === 'Enter') commit();
        if (event.key === 'Escape' && typed !== null) {
          event.stopPropagation();
          setTyped(null);
        }
      }}
    />
  );
}

const ID_FORM = /^[A-Za-z0-9][A-Za-z0-9 ._-]*$/;

/** An id: what the document's other entries refer to. Renaming keeps the references. */
export function IdField({
  value,
  onCommit,
  disabled,
  error,
}: Pick<TextFieldProps, 'value' | 'onCommit' | 'disabled' | 'error'>) {
  return (
    <TextField
      label="Id"
      value={value}
      onCommit={onCommit}
      disabled={disabled}
      error={error}
      check={(typed) => {
        if (typed.length > DOCUMENT_LIMITS.id) return `At most ${DOCUMENT_LIMITS.id} characters.`;
        return ID_FORM.test(typed)
          ? null
          : 'Letters, digits, spaces, . _ and -, beginning with a letter or digit.';
      }}
    />
  );
}

interface ReferenceFieldProps {
  readonly label: string;
  readonly frame: FrameDocument;
  readonly list: Extract<DocumentList, 'nodes' | 'sections' | 'materials'>;
  readonly value: string;
  readonly onCommit: (id: string) => void;
  readonly disabled: boolean;
  readonly error?: string | undefined;
  readonly labelHidden?: boolean;
}

/** Above this many entries a list box is no help: the id is typed, with suggestions. */
const MOST_OPTIONS = 300;

/** Chooses another entry of the document by its id and name. */
export function ReferenceField({
  label,
  frame,
  list,
  value,
  onCommit,
  disabled,
  error,
  labelHidden = false,
}: ReferenceFieldProps) {
  const entries: readonly { id: string; name?: string | undefined }[] = frame[list];
  if (entries.length > MOST_OPTIONS && !labelHidden) {
    return (
      <TextField
        label={label}
        value={value}
        onCommit={onCommit}
        disabled={disabled}
        error={error}
        check={(typed) =>
          entries.some(({ id }) => id === typed) ? null : 'There is no entry of this id.'
        }
      />
    );
  }
  const options = entries.map(({ id, name }) => ({
    value: id,
    label: name === undefined || name === '' || name === id ? id : `${name} (${id})`,
  }));
  if (!entries.some(({ id }) => id === value)) {
    options.unshift({ value, label: value === '' ? 'choose' : `${value} (missing)` });
  }
  return (
    <Select
      label={label}
      options={options}
      value={value}
      onValueChange={onCommit}
      disabled={disabled}
      error={error}
      labelHidden={labelHidden}
    />
  );
}
