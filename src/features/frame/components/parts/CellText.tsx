import { useState } from 'react';
import { DOCUMENT_LIMITS } from '#shared/schemas/frameDocument.ts';

interface CellTextProps {
  readonly label: string;
  readonly value: string;
  readonly readOnly: boolean;
  readonly onCommit: (value: string) => void;
}

/** Text in a table cell: Enter or leaving it takes it over, Escape takes it back. */
export function CellText({ label, value, readOnly, onCommit }: CellTextProps) {
  const [typed, setTyped] = useState<string | null>(null);
  if (readOnly) return value || '–';
  const commit = () => {
    if (typed !== null && typed !== value) onCommit(typed);
    setTyped(null);
  };
  return (
    <input
      type="text"
      aria-label={label}
      autoComplete="off"
      className="control min-w-28"
      maxLength={DOCUMENT_LIMITS.name}
      value={typed ?? value}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => {
        if (event.key === 'Enter') commit();
        if (event.key === 'Escape') setTyped(null);
      }}
    />
  );
}
