import { createStore, type StoreApi } from 'zustand/vanilla';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { apply, type FrameCommand } from './command.ts';

/** How many steps back the history reaches. */
const HISTORY_LENGTH = 200;

/** One step of the history: what people call it, and the command that takes it back (or again). */
interface HistoryEntry {
  readonly label: string;
  readonly command: Extract<FrameCommand, { kind: 'set' }>;
  /** Changes of one drag or one typed edit carry the same group and make one step. */
  readonly group: string | null;
}

export interface FrameState {
  readonly frame: FrameDocument;
  readonly past: readonly HistoryEntry[];
  readonly future: readonly HistoryEntry[];
  /** Applies a command and remembers how to take it back. Throws what `apply` throws, changing nothing. */
  readonly run: (command: FrameCommand, label: string, group?: string) => void;
  /** Closes the open group: the next change is a step of its own. */
  readonly closeGroup: () => void;
  /** Takes the open group back without leaving a trace (Escape during a drag). */
  readonly cancelGroup: (group: string) => void;
  readonly undo: () => void;
  readonly redo: () => void;
  /** Takes a document from the server as the new beginning; the history ends here. */
  readonly load: (document: FrameDocument) => void;
}

export type FrameStore = StoreApi<FrameState>;

/** The one place that holds the document being edited. */
export function createFrameStore(document: FrameDocument): FrameStore {
  return createStore<FrameState>()((set, get) => ({
    frame: document,
    past: [],
    future: [],
    run(command, label, group) {
      const { frame, past } = get();
      const applied = apply(frame, command);
      if (Object.keys(applied.inverse.fields).length === 0) return;
      const last = past.at(-1);
      const joins = group !== undefined && last?.group === group;
      const fields = joins
        ? { ...applied.inverse.fields, ...last.command.fields }
        : applied.inverse.fields;
      const entry = { label, command: { kind: 'set' as const, fields }, group: group ?? null };
      const before = joins ? past.slice(0, -1) : past.slice(-(HISTORY_LENGTH - 1));
      set({ frame: applied.frame, past: [...before, entry], future: [] });
    },
    closeGroup() {
      const { past } = get();
      const last = past.at(-1);
      if (last && last.group !== null) set({ past: past.with(-1, { ...last, group: null }) });
    },
    cancelGroup(group) {
      const { frame, past } = get();
      const last = past.at(-1);
      if (last?.group !== group) return;
      set({ frame: apply(frame, last.command).frame, past: past.slice(0, -1) });
    },
    undo() {
      const { frame, past, future } = get();
      const last = past.at(-1);
      if (!last) return;
      const { frame: before, inverse } = apply(frame, last.command);
      set({
        frame: before,
        past: past.slice(0, -1),
        future: [...future, { label: last.label, command: inverse, group: null }],
      });
    },
    redo() {
      const { frame, past, future } = get();
      const next = future.at(-1);
      if (!next) return;
      const { frame: after, inverse } = apply(frame, next.command);
      set({
        frame: after,
        past: [...past, { label: next.label, command: inverse, group: null }],
        future: future.slice(0, -1),
      });
    },
    load(loaded) {
      set({ frame: loaded, past: [], future: [] });
    },
  }));
}
