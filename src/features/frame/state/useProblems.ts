import { useDeferredValue, useMemo } from 'react';
import { checkDocument } from '#shared/frame/checkDocument.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { entryAt, type Problem } from './problems.ts';

/** What stands in the way of a solve and what one should know, kept true while the document is edited. */
export function useProblems(frame: FrameDocument): readonly Problem[] {
  const settled = useDeferredValue(frame);
  return useMemo(() => {
    const { errors, warnings } = checkDocument(settled, 'solve');
    const problem = (weight: Problem['weight']) => (issue: { path: string; message: string }) => ({
      ...issue,
      weight,
      entry: entryAt(settled, issue.path),
    });
    return [...errors.map(problem('error')), ...warnings.map(problem('warning'))];
  }, [settled]);
}
