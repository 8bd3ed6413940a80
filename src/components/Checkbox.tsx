import { Checkbox as RadixCheckbox } from 'radix-ui';
import { useId, type ReactNode } from 'react';

interface CheckboxProps {
  label: ReactNode;
  hint?: ReactNode;
  checked: boolean;
  onCheckedChange: (checked: boolean) => void;
  disabled?: boolean;
}

export function Checkbox({ label, hint, checked, onCheckedChange, disabled }: CheckboxProps) {
  const id = useId();
  return (
    <div className="flex items-start gap-2">
      <RadixCheckbox.Root
        id={id}
        checked={checked}
        disabled={disabled === true}
        onCheckedChange={(state) => onCheckedChange(state === true)}
        {...(hint === undefined ? {} : { 'aria-describedby': `${id}-hint` })}
        className="flex size-6 shrink-0 items-center justify-center rounded border border-pencil bg-sheet text-ink disabled:border-dashed"
      >
        <RadixCheckbox.Indicator>
          <svg viewBox="0 0 16 16" className="size-4" aria-hidden="true">
            <path d="m3 8.5 3.5 3.5L13 4.5" fill="none" stroke="currentColor" strokeWidth="2" />
          </svg>
        </RadixCheckbox.Indicator>
      </RadixCheckbox.Root>
      <div>
        <label htmlFor={id}>{label}</label>
        {hint !== undefined && (
          <p id={`${id}-hint`} className="text-sm text-ink-soft">
            {hint}
          </p>
        )}
      </div>
    </div>
  );
}
