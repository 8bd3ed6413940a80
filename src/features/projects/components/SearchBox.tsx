import { useEffect, useRef, useState } from 'react';

/** Long enough that a word typed at once asks once. */
const PAUSE_MS = 250;

interface SearchBoxProps {
  value: string;
  onChange: (value: string) => void;
}

/** Looks as one types, after a pause; Escape clears it. */
export function SearchBox({ value, onChange }: SearchBoxProps) {
  const [text, setText] = useState(value);
  const [known, setKnown] = useState(value);
  const report = useRef(onChange);
  useEffect(() => {
    report.current = onChange;
  });
  // The address may change by itself (back, "show every project"): the box follows.
  if (known !== value) {
    setKnown(value);
    setText(value);
  }
  useEffect(() => {
    if (text.trim() === value) return;
    const timer = setTimeout(() => report.current(text.trim()), PAUSE_MS);
    return () => clearTimeout(timer);
  }, [text, value]);
  return (
    <search className="block max-w-md">
      <input
        type="search"
        aria-label="Search projects and machines"
        placeholder="Search projects and machines"
        maxLength={120}
        value={text}
        onChange={(event) => setText(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === 'Escape') setText('');
        }}
        className="control"
      />
    </search>
  );
}
