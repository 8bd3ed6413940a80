import { Dialog } from '#src/components/Dialog.tsx';
import type { Command } from './commandStore.ts';

const EVERYWHERE = [
  { keys: 'Ctrl+K', title: 'Open the commands' },
  { keys: '?', title: 'Show this sheet' },
  { keys: 'Esc', title: 'Back out of what is open' },
  { keys: '← ↑ → ↓', title: 'Move between the cells of a table' },
  { keys: 'Ctrl+Home, Ctrl+End', title: 'First and last cell of a table' },
  { keys: 'Enter', title: 'Into a cell’s control; Esc leads back' },
] as const;

interface KeyboardSheetProps {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  commands: readonly Command[];
}

/** What the keyboard does, everywhere and on this screen. */
export function KeyboardSheet({ open, onOpenChange, commands }: KeyboardSheetProps) {
  const here = commands.filter((command) => command.keys !== undefined);
  return (
    <Dialog open={open} onOpenChange={onOpenChange} title="Keyboard">
      <KeyList heading="Everywhere" entries={EVERYWHERE} />
      {here.length > 0 && <KeyList heading="On this screen" entries={here} />}
    </Dialog>
  );
}

function KeyList({
  heading,
  entries,
}: {
  heading: string;
  entries: readonly { keys?: string; title: string }[];
}) {
  return (
    <section className="mb-4">
      <h3 className="mb-1">{heading}</h3>
      <dl className="grid grid-cols-[auto_1fr] gap-x-6 gap-y-1">
        {entries.map((entry) => (
          <div key={entry.title} className="contents">
            <dt>
              <kbd className="num">{entry.keys}</kbd>
            </dt>
            <dd className="text-ink-soft">{entry.title}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
