import { Popover as RadixPopover } from 'radix-ui';
import type { ReactNode } from 'react';

interface PopoverProps {
  trigger: ReactNode;
  /** Names the popover for assistive technology. */
  label: string;
  children: ReactNode;
}

/** Opens beside its button. Escape or a click elsewhere closes it. */
export function Popover({ trigger, label, children }: PopoverProps) {
  return (
    <RadixPopover.Root>
      <RadixPopover.Trigger asChild>{trigger}</RadixPopover.Trigger>
      <RadixPopover.Portal>
        <RadixPopover.Content
          aria-label={label}
          align="start"
          sideOffset={4}
          collisionPadding={8}
          className="z-50 max-h-[var(--radix-popover-content-available-height)] max-w-[calc(100vw-1rem)] overflow-auto rounded border border-ink bg-sheet p-4"
        >
          {children}
        </RadixPopover.Content>
      </RadixPopover.Portal>
    </RadixPopover.Root>
  );
}
