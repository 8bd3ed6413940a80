import { createStore, type StoreApi } from 'zustand/vanilla';
import { checkDocument } from '#shared/frame/checkDocument.ts';
import {
  staleDraftDetails,
  type DraftResponse,
  type StaleDraftDetails,
} from '#shared/schemas/project.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { ApiError } from '#src/lib/api.ts';
import { messageOf } from '#src/lib/messageOf.ts';
import type { FrameStore } from './frameStore.ts';

/** Where the draft on screen stands against the one on the server. */
export type SaveStatus =
  | { readonly kind: 'saved' }
  | { readonly kind: 'changed' }
  | { readonly kind: 'saving' }
  | { readonly kind: 'offline' }
  /** The server would refuse it; what is wrong stands beside the fields. */
  | { readonly kind: 'faulty'; readonly faults: number }
  | { readonly kind: 'refused'; readonly message: string }
  /** Somebody else changed the draft meanwhile. */
  | { readonly kind: 'conflict'; readonly theirs: StaleDraftDetails };

export interface Saved {
  readonly version: number;
  readonly fingerprint: string;
  readonly updatedAt: string;
}

export interface AutosaveParts {
  readonly store: FrameStore;
  readonly draft: Pick<DraftResponse, 'version' | 'document'>;
  readonly write: (version: number, document: FrameDocument) => Promise<Saved>;
  readonly read: () => Promise<DraftResponse>;
  /** Called with every document the server has taken. */
  readonly onSaved: (saved: Saved, document: FrameDocument) => void;
}

export interface Autosave {
  readonly status: StoreApi<SaveStatus>;
  /** Version of the draft that the changes on screen are made on. */
  readonly version: () => number;
  /** Writes what is unsaved; true when the server then has what is on screen. */
  readonly flush: () => Promise<boolean>;
  /** Takes a newer draft from the server when nothing here is unsaved. */
  readonly offer: (draft: DraftResponse) => void;
  readonly takeTheirs: () => Promise<void>;
  readonly keepMine: () => Promise<boolean>;
  readonly start: () => () => void;
}

/** Pause after the last change before the draft is written. */
const QUIET_MS = 900;
const OFFLINE_RETRY_MS = 5_000;

/** Writes the draft while it is edited: one write at a time, each on the version the last one gave. */
export function createAutosave({ store, draft, write, read, onSaved }: AutosaveParts): Autosave {
  const status = createStore<SaveStatus>()(() => ({ kind: 'saved' }));
  const say = (next: SaveStatus) => status.setState(next, true);
  let version = draft.version;
  let savedFrame = draft.document;
  let underWay: Promise<boolean> | null = null;
  let timer: ReturnType<typeof setTimeout> | undefined;

  const isDirty = () => store.getState().frame !== savedFrame;
  const schedule = (wait: number) => {
    clearTimeout(timer);
    timer = setTimeout(() => void flush(), wait);
  };

  const writeOnce = async (): Promise<boolean> => {
    const document = store.getState().frame;
    const { errors } = checkDocument(document, 'draft');
    if (errors.length > 0) {
      say({ kind: 'faulty', faults: errors.length });
      return false;
    }
    say({ kind: 'saving' });
    try {
      const saved = await write(version, document);
      version = saved.version;
      savedFrame = document;
      onSaved(saved, document);
      say({ kind: isDirty() ? 'changed' : 'saved' });
      return true;
    } catch (error) {
      say(failureOf(error));
      if (status.getState().kind === 'offline') schedule(OFFLINE_RETRY_MS);
      return false;
    }
  };

  const flush = async (): Promise<boolean> => {
    clearTimeout(timer);
    while (underWay) await underWay;
    if (status.getState().kind === 'conflict') return false;
    if (!isDirty()) return true;
    underWay = writeOnce();
    const written = await underWay;
    underWay = null;
    return written && isDirty() ? flush() : written;
  };

  const load = (fresh: DraftResponse) => {
    version = fresh.version;
    savedFrame = fresh.document;
    store.getState().load(fresh.document);
    say({ kind: 'saved' });
  };

  return {
    status,
    version: () => version,
    flush,
    offer: (fresh) => {
      if (fresh.version > version && !isDirty() && underWay === null) load(fresh);
    },
    takeTheirs: async () => load(await read()),
    keepMine: async () => {
      version = (await read()).version;
      say({ kind: 'changed' });
      return flush();
    },
    start: () => {
      const now = () => void flush();
      const leave = () => {
        if (document.visibilityState === 'hidden') now();
      };
      const stop = store.subscribe(({ frame }, before) => {
        if (frame === before.frame || status.getState().kind === 'conflict') return;
        if (!isDirty()) {
          clearTimeout(timer);
          say({ kind: 'saved' });
          return;
        }
        say({ kind: 'changed' });
        schedule(QUIET_MS);
      });
      window.addEventListener('online', now);
      window.addEventListener('blur', now);
      document.addEventListener('visibilitychange', leave);
      return () => {
        stop();
        clearTimeout(timer);
        window.removeEventListener('online', now);
        window.removeEventListener('blur', now);
        document.removeEventListener('visibilitychange', leave);
      };
    },
  };
}

function failureOf(error: unknown): SaveStatus {
  if (error instanceof ApiError) {
    if (error.status === 0) return { kind: 'offline' };
    const theirs = staleDraftDetails.safeParse(error.problem.details);
    if (error.status === 412 && theirs.success) return { kind: 'conflict', theirs: theirs.data };
  }
  return { kind: 'refused', message: messageOf(error) };
}
