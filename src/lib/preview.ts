import { createStore } from 'zustand/vanilla';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';

/** Frequencies worked out in this browser while the draft is being changed; nothing of it is stored. */
export interface Preview {
  readonly projectId: string;
  /** The very document that was solved. */
  readonly document: FrameDocument;
  readonly stateId: string | null;
  /** Ascending, rigid-body modes as 0 [Hz]. */
  readonly frequenciesHz: readonly number[];
  /** Why the frame as it is has no frequencies; null where it has. */
  readonly refusal: string | null;
}

/** What the editor previews and the frequency line shows. */
export const previewStore = createStore<{ readonly preview: Preview | null }>(() => ({
  preview: null,
}));
