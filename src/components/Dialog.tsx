import { Dialog as RadixDialog } from 'radix-ui';
import { X } from 'lucide-react';
import type { ReactNode } from 'react';

interface DialogProps {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: string;
  /** One sentence under the title; also read out. */
  description?: ReactNode;
  children: ReactNode;
  /** Wider, for tables and long text. */
  wide?: boolean;
}

/** A sheet in the middle of the screen; on small screens it comes from the lower edge. Escape backs out. */
export function Dialog({ open, onOpenChange, title, description, children, wide }: DialogProps) {
  return (
    <RadixDialog.Root open={open} onOpenChange={onOpenChange}>
      <RadixDialog.Portal>
        {/* Radix's own overlay locks scrolling by a style element, which the security policy refuses. */}
        <div aria-hidden="true" className="fixed inset-0 z-40 bg-black/40" />
        <RadixDialog.Content
          {...(description === undefined ? { 'aria-describedby': undefined } : {})}
          className={`fixed inset-x-0 bottom-0 z-50 max-h-[90dvh] overflow-y-auto border-t border-ink bg-sheet p-5 sm:inset-x-auto sm:top-1/2 sm:bottom-auto sm:left-1/2 sm:max-h-[85dvh] sm:w-[calc(100vw-3rem)] sm:-translate-x-1/2 sm:-translate-y-1/2 sm:rounded sm:border sm:p-6 ${wide ? 'sm:max-w-4xl' : 'sm:max-w-lg'}`}
        >
          <div className="mb-4 flex items-start justify-between gap-4">
            <div>
              <RadixDialog.Title className="text-lg font-semibold">{title}</RadixDialog.Title>
              {description !== undefined && (
                <RadixDialog.Description className="mt-1 text-ink-soft">
                  {description}
                </RadixDialog.Description>
              )}
            </div>
            <RadixDialog.Close
              aria-label="Close"
              className="flex size-8 shrink-0 items-center justify-center rounded border border-transparent hover:border-rule"
            >
              <X aria-hidden="true" className="size-4" />
            </RadixDialog.Close>
          </div>
          {children}
        </RadixDialog.Content>
      </RadixDialog.Portal>
    </RadixDialog.Root>
  );
}

/** The row of buttons at the foot of a dialog or form; the main one last. */
export function DialogButtons({ children }: { children: ReactNode }) {
  return <div className="mt-6 flex flex-wrap justify-end gap-2">{children}</div>;
}
