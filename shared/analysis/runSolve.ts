import { AppError, type WireError } from '../errors/AppError.ts';
import { checkDocument } from '../frame/checkDocument.ts';
import { canonicalJson } from '../frame/canonicalJson.ts';
import type { SolveSummary } from '../schemas/solveResult.ts';
import { encodeShapes } from './shapesFile.ts';
import { solveFrame, type SolveHooks, type SolveRequest } from './solveFrame.ts';

/** What a solver thread answers: what is stored of a result, or why there is none. */
export type SolveReply =
  | {
      readonly kind: 'done';
      /** The summary without its timing as canonical JSON: a string goes between threads faster than what it tells. */
      readonly summary: string;
      readonly timing: SolveSummary['timing'];
      readonly complete: boolean;
      /** Lowest frequency above the rigid-body modes [Hz]. */
      readonly firstFrequencyHz: number | null;
      /** As `encodeShapes` writes it; its buffer may be transferred. */
      readonly shapes: Uint8Array<ArrayBuffer>;
    }
  | { readonly kind: 'failed'; readonly error: WireError };

/**
 * Answers one request inside a worker thread: checks, solves, encodes. Errors thrown on purpose come back as a
 * reply, since an Error loses its code on the way between threads; any other error is thrown on.
 */
export function runSolve(request: SolveRequest, hooks: Omit<SolveHooks, 'warnings'>): SolveReply {
  try {
    const { document, errors, warnings } = checkDocument(request.document);
    if (document === null) {
      throw new AppError('invalid-document', 'The frame cannot be solved as it is.', {
        issues: errors,
      });
    }
    const { summary, shapes } = solveFrame({ ...request, document }, { ...hooks, warnings });
    const { timing, ...certain } = summary;
    const elastic = certain.modes.find(({ kind }) => kind !== 'rigid');
    return {
      kind: 'done',
      summary: canonicalJson(certain),
      timing,
      complete: certain.complete,
      firstFrequencyHz: elastic?.frequencyHz ?? null,
      shapes: encodeShapes(shapes),
    };
  } catch (error) {
    if (error instanceof AppError) return { kind: 'failed', error: error.toWire() };
    throw error;
  }
}
