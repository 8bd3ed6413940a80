import { X } from 'lucide-react';
import { Toast } from 'radix-ui';
import { useSyncExternalStore } from 'react';
import { dismissToast, readToasts, watchToasts } from '#src/lib/toast.ts';

/** Long enough to read twice; hovering or focusing a message holds it. */
const SHOWN_MS = 6_000;

/** Shows what `toast(…)` says; F8 moves the focus there. */
export function Toaster() {
  const messages = useSyncExternalStore(watchToasts, readToasts);
  return (
    <Toast.Provider duration={SHOWN_MS} label="Message">
      {messages.map((message) => (
        <Toast.Root
          key={message.id}
          onOpenChange={(open) => {
            if (!open) dismissToast(message.id);
          }}
          className="flex items-center justify-between gap-3 rounded border border-ink bg-sheet py-2 pr-2 pl-4"
        >
          <Toast.Description>{message.text}</Toast.Description>
          <Toast.Close
            aria-label="Dismiss"
            className="flex size-8 shrink-0 items-center justify-center rounded border border-transparent hover:border-rule"
          >
            <X aria-hidden="true" className="size-4" />
          </Toast.Close>
        </Toast.Root>
      ))}
      <Toast.Viewport className="fixed bottom-14 left-1/2 z-50 flex w-[min(26rem,calc(100vw-2rem))] -translate-x-1/2 flex-col gap-2" />
    </Toast.Provider>
  );
}
