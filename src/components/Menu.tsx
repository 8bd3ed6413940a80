import { DropdownMenu } from 'radix-ui';
import type { ReactNode } from 'react';

/** A button that opens a list of things to do. `trigger` is one button element. */
export function Menu({ trigger, children }: { trigger: ReactNode; children: ReactNode }) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger asChild>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="end"
          sideOffset={4}
          className="z-50 min-w-48 rounded border border-ink bg-sheet py-1"
        >
          {children}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}

const ITEM =
  'flex min-h-8 cursor-pointer items-center justify-between gap-6 px-3 py-1 no-underline outline-none data-[highlighted]:bg-ink data-[highlighted]:text-sheet data-[disabled]:cursor-default data-[disabled]:text-ink-soft';

interface MenuItemProps {
  children: ReactNode;
  onSelect?: () => void;
  /** Draws its child (a link) as the item. */
  asChild?: boolean;
  disabled?: boolean;
}

export function MenuItem({ children, onSelect, asChild = false, disabled = false }: MenuItemProps) {
  return (
    <DropdownMenu.Item
      asChild={asChild}
      disabled={disabled}
      {...(onSelect ? { onSelect } : {})}
      className={ITEM}
    >
      {children}
    </DropdownMenu.Item>
  );
}

export function MenuHeading({ children }: { children: ReactNode }) {
  return (
    <DropdownMenu.Label className="px-3 py-1 text-sm text-ink-soft">{children}</DropdownMenu.Label>
  );
}

export function MenuRule() {
  return <DropdownMenu.Separator className="my-1 border-t border-rule" />;
}
