import { Toaster as Sonner } from 'sonner';

/** Short messages at the foot of the screen; say them with `toast(…)` from sonner. */
export function Toaster() {
  return (
    <Sonner
      position="bottom-center"
      gap={8}
      toastOptions={{
        unstyled: true,
        classNames: {
          toast:
            'flex w-[min(26rem,calc(100vw-2rem))] items-center justify-between gap-3 rounded border border-ink bg-sheet px-4 py-3 text-ink',
          actionButton: 'min-h-8 cursor-pointer border border-pencil px-3 font-medium',
          description: 'text-ink-soft',
        },
      }}
    />
  );
}
