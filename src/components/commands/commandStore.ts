import { createContext } from 'react';

/** One thing a person can do on this screen, by name or by key. */
export interface Command {
  readonly id: string;
  readonly title: string;
  /** Heading it stands under: "Frame", "Go to". */
  readonly group: string;
  /** As shown: "Ctrl+Z", "F", "?". The screen that registers it listens for it. */
  readonly keys?: string;
  readonly run: () => void;
}

export class CommandStore {
  private readonly sets = new Map<symbol, readonly Command[]>();
  private readonly watchers = new Set<() => void>();
  private all: readonly Command[] = [];

  readonly watch = (watcher: () => void): (() => void) => {
    this.watchers.add(watcher);
    return () => this.watchers.delete(watcher);
  };

  readonly read = (): readonly Command[] => this.all;

  /** Puts a set in place of its earlier self; an empty one leaves. */
  put(owner: symbol, commands: readonly Command[]): void {
    if (commands.length === 0) this.sets.delete(owner);
    else this.sets.set(owner, commands);
    this.all = [...this.sets.values()].flat();
    for (const watcher of this.watchers) watcher();
  }
}

export const CommandContext = createContext<CommandStore | null>(null);
