import { Switch as RadixSwitch } from 'radix-ui';
import { useId, type ReactNode } from 'react';

interface SwitchProps {
  label: ReactNode;
  checked: boolean;
  onCheckedChange: (checked: boolean) => void;
  disabled?: boolean;
  /** The label is there for assistive technology only (in table cells, where the column says it). */
  labelHidden?: boolean;
}

/** On and off, at once. The word beside the track says which, so that the place of the knob is not alone. */
export function Switch({ label, checked, onCheckedChange, disabled, labelHidden }: SwitchProps) {
  const id = useId();
  return (
    <span className="inline-flex items-center gap-2">
      <RadixSwitch.Root
        id={id}
        checked={checked}
        disabled={disabled === true}
        onCheckedChange={onCheckedChange}
        className="relative h-6 w-11 shrink-0 rounded border border-pencil bg-sheet data-[state=checked]:border-ink data-[state=checked]:bg-ink disabled:border-dashed"
      >
        <RadixSwitch.Thumb className="block h-4 w-4 translate-x-1 bg-ink transition-transform data-[state=checked]:translate-x-[1.45rem] data-[state=checked]:bg-sheet" />
      </RadixSwitch.Root>
      <span aria-hidden="true" className="w-6 text-sm text-ink-soft">
        {checked ? 'on' : 'off'}
      </span>
      <label htmlFor={id} className={labelHidden ? 'sr-only' : undefined}>
        {label}
      </label>
    </span>
  );
}
