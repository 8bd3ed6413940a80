import { useEffect, useRef, useState } from 'react';
import type { QuantityKind } from '#shared/units/quantities.ts';
import { useUnits } from './useUnits.ts';

const loadReader = () => import('#src/lib/quantityExpression.ts');

/** Fetches the reader of quantities early, so that fields work on when the connection goes. */
export function usePreloadedQuantities(): void {
  useEffect(() => {
    // A failure shows when a field is typed in, and is tried again then.
    loadReader().catch(() => undefined);
  }, []);
}

const NOT_LOADED = {
  ok: false,
  message: 'Units can’t be read without a connection the first time: connect, then type again.',
} as const;

export interface QuantityTextOptions {
  kind: QuantityKind;
  /** SI; `null`: nothing entered. */
  value: number | null;
  /** A valid entry, when the person has finished it (Enter, or leaving the field). SI. */
  onCommit: (valueSi: number) => void;
  /** Given: the field may be left empty, which calls this. */
  onClear?: (() => void) | undefined;
  /** What else is wrong with a value ("Must be greater than zero."), or null. */
  check?: ((valueSi: number) => string | null) | undefined;
  /** Commits every valid reading while it is typed: for forms that draw what they make. */
  live?: boolean | undefined;
  /** False from the first keystroke until the text is understood, so that a form can hold back. */
  onValidChange?: ((valid: boolean) => void) | undefined;
}

export interface QuantityText {
  text: string;
  /** What the text means so far, in the person's units; null while it is not being edited or is wrong. */
  understood: string | null;
  error: string | null;
  change: (text: string) => void;
  commit: () => void;
  /** Back to the value; true when there was something to take back. */
  restore: () => boolean;
}

/** Text being typed into a quantity field, what it means, and when it becomes a value. */
export function useQuantityText(options: QuantityTextOptions): QuantityText {
  const { kind, value, onCommit, onClear, check, live, onValidChange } = options;
  const units = useUnits();
  const [draft, setDraft] = useState<string | null>(null);
  // The same as `draft`, for answers that come later: a reading of an older text is dropped.
  const latest = useRef<string | null>(null);
  const [understood, setUnderstood] = useState<string | null>(null);
  const [error, setError] = useState<string | null>(null);

  usePreloadedQuantities();

  const judge = (message: string | null) => {
    onValidChange?.(message === null);
    setError(message);
  };

  const read = async (text: string) => {
    const reader = await loadReader().catch(() => null);
    if (reader === null) return NOT_LOADED;
    const reading = reader.readQuantity(text, kind, units.system);
    if (!reading.ok) return reading;
    const objection = check?.(reading.value) ?? null;
    return objection === null ? reading : { ok: false as const, message: objection };
  };

  const edit = (text: string | null) => {
    latest.current = text;
    setDraft(text);
  };

  const settle = () => {
    edit(null);
    setUnderstood(null);
    judge(null);
  };

  const mayBeEmpty = (text: string) => onClear !== undefined && text.trim() === '';

  const change = (text: string) => {
    edit(text);
    onValidChange?.(false);
    if (mayBeEmpty(text)) {
      setUnderstood(null);
      judge(null);
      return;
    }
    void read(text).then((reading) => {
      if (latest.current !== text) return;
      setUnderstood(reading.ok ? units.quantity(reading.value, kind) : null);
      if (!reading.ok) return;
      judge(null);
      if (live) onCommit(reading.value);
    });
  };

  const commit = () => {
    const text = latest.current;
    if (text === null) return;
    if (mayBeEmpty(text)) {
      settle();
      onClear?.();
      return;
    }
    void read(text).then((reading) => {
      // Taken back, or taken over by Enter already, while the reader was on its way.
      if (latest.current !== text) return;
      if (!reading.ok) {
        setUnderstood(null);
        judge(reading.message);
        return;
      }
      settle();
      onCommit(reading.value);
    });
  };

  const restore = () => {
    const edited = latest.current !== null;
    settle();
    return edited;
  };

  const text = draft ?? (value === null ? '' : units.number(value, kind));
  return { text, understood, error, change, commit, restore };
}
