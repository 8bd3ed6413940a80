import { clsx } from 'clsx';
import { Slot } from 'radix-ui';
import type { ComponentProps } from 'react';

export interface ButtonProps extends ComponentProps<'button'> {
  /** `primary`: the one thing to do here. `signal`: it takes something away. */
  look?: 'primary' | 'plain' | 'quiet' | 'signal';
  /** Draws its child (a link) as a button. */
  asChild?: boolean;
  /** Work is under way: keeps its place and its name, takes no second press. */
  busy?: boolean;
}

const LOOKS = {
  primary: 'border-ink bg-ink text-sheet hover:bg-ink-soft hover:border-ink-soft',
  plain: 'border-pencil bg-sheet text-ink hover:border-ink',
  quiet: 'border-transparent bg-transparent text-ink hover:border-rule hover:bg-sheet',
  signal: 'border-signal bg-signal text-on-signal hover:border-ink',
} as const;

export function Button({
  look = 'plain',
  asChild = false,
  busy = false,
  className,
  disabled,
  ...rest
}: ButtonProps) {
  const Tag = asChild ? Slot.Root : 'button';
  return (
    <Tag
      {...(asChild ? {} : { type: 'button' as const, disabled: disabled === true || busy })}
      {...(busy ? { 'aria-busy': true } : {})}
      {...rest}
      className={clsx(
        'inline-flex min-h-8 min-w-8 cursor-pointer items-center justify-center gap-2 rounded border px-3 py-1 text-center leading-tight font-medium no-underline',
        'disabled:cursor-not-allowed disabled:border-dashed disabled:border-pencil disabled:bg-transparent disabled:text-ink-soft',
        LOOKS[look],
        className,
      )}
    />
  );
}
