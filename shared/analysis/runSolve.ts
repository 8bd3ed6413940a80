import { AppError, type WireError } from '../errors/AppError.ts';
import { checkDocument } from '../frame/checkDocument.ts';
import type { SolveSummary } from '../schemas/solveResult.ts';
import { encodeShapes } from './shapesFile.ts';
import { solveFrame, type SolveHooks, type SolveRequest } from './solveFrame.ts';

/** What a solver thread answers: the summary and the file of shapes, or why there are none. */
export type SolveReply =
  | {
      readonly kind: 'done';
      readonly summary: SolveSummary;
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
    return { kind: 'done', summary, shapes: encodeShapes(shapes) };
  } catch (error) {
    if (error instanceof AppError) return { kind: 'failed', error: error.toWire() };
    throw error;
  }
}
