import { Command as Cmdk } from 'cmdk';
import { useEffect, useState } from 'react';
import { Dialog } from '#src/components/Dialog.tsx';
import { KeyboardSheet } from './KeyboardSheet.tsx';
import { useAllCommands } from './useCommands.ts';

const isTypedInto = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement &&
  (target.isContentEditable || target.matches('input, select, textarea'));

/** Everything the present screen can do, by name (Ctrl+K or ⌘K), and the sheet of keys (?). */
export function CommandPalette() {
  const [open, setOpen] = useState<'palette' | 'keys' | null>(null);
  const commands = useAllCommands();
  const groups = [...new Set(commands.map((command) => command.group))];

  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (event.key.toLowerCase() === 'k' && (event.ctrlKey || event.metaKey)) {
        event.preventDefault();
        setOpen((now) => (now === 'palette' ? null : 'palette'));
      } else if (event.key === '?' && !isTypedInto(event.target)) {
        event.preventDefault();
        setOpen('keys');
      }
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, []);

  return (
    <>
      <Dialog
        open={open === 'palette'}
        onOpenChange={(next) => setOpen(next ? 'palette' : null)}
        title="Commands"
      >
        <Cmdk label="Commands" loop>
          <Cmdk.Input autoFocus placeholder="What do you want to do?" className="control" />
          <Cmdk.List className="mt-3 max-h-[50dvh] overflow-y-auto">
            <Cmdk.Empty className="py-4 text-ink-soft">
              No command of that name on this screen.
            </Cmdk.Empty>
            {groups.map((group) => (
              <Cmdk.Group
                key={group}
                heading={group}
                className="mb-2 [&_[cmdk-group-heading]]:py-1 [&_[cmdk-group-heading]]:text-sm [&_[cmdk-group-heading]]:text-ink-soft"
              >
                {commands
                  .filter((command) => command.group === group)
                  .map((command) => (
                    <Cmdk.Item
                      key={command.id}
                      value={`${group} ${command.title}`}
                      onSelect={() => {
                        setOpen(null);
                        command.run();
                      }}
                      className="flex min-h-8 cursor-pointer items-center justify-between gap-4 px-2 data-[selected=true]:bg-ink data-[selected=true]:text-sheet"
                    >
                      {command.title}
                      {command.keys !== undefined && <kbd className="num">{command.keys}</kbd>}
                    </Cmdk.Item>
                  ))}
              </Cmdk.Group>
            ))}
          </Cmdk.List>
        </Cmdk>
      </Dialog>
      <KeyboardSheet
        open={open === 'keys'}
        onOpenChange={(next) => setOpen(next ? 'keys' : null)}
        commands={commands}
      />
    </>
  );
}
