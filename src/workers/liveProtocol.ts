import type { WireError } from '#shared/errors/AppError.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';

/** A question to the live worker: the frequencies of this frame. */
export interface LiveQuestion {
  readonly number: number;
  readonly document: FrameDocument;
  readonly stateId: string | null;
  readonly modes: number;
}

/** Frequencies as `LiveFrame` gives them; or why there are none. */
export type LiveAnswer =
  | {
      readonly kind: 'found';
      readonly number: number;
      readonly frequenciesHz: Float64Array;
      readonly errorsHz: Float64Array;
      readonly certified: boolean;
    }
  | { readonly kind: 'refused'; readonly number: number; readonly error: WireError };
