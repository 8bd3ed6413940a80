import { useEffect, useRef } from 'react';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { previewStore } from '#src/lib/preview.ts';
import { LiveSolver } from '#src/workers/LiveSolver.ts';

/** As many as a solve finds where nobody asks for another number. */
const MODES = 12;
/** Members beyond which a step takes longer than a hand moves. */
const MOST_MEMBERS = 2_000;

/**
 * Keeps the preview in step with the frame on the screen. The worker starts with the editor and solves the frame as it
 * is, so that it is warm at the first change.
 */
export function useLivePreview(
  projectId: string,
  frame: FrameDocument,
  stateId: string | null,
): void {
  const solver = useRef<LiveSolver | null>(null);

  useEffect(() => {
    const live = new LiveSolver((answer, { document, stateId: state }) => {
      const found = answer.kind === 'found';
      previewStore.setState({
        preview: {
          projectId,
          document,
          stateId: state,
          frequenciesHz: found ? [...answer.frequenciesHz] : [],
          refusal: found ? null : answer.error.message,
        },
      });
    });
    solver.current = live;
    return () => {
      live.close();
      previewStore.setState({ preview: null });
    };
  }, [projectId]);

  useEffect(() => {
    if (frame.members.length > MOST_MEMBERS) return;
    solver.current?.ask({ document: frame, stateId, modes: MODES });
  }, [projectId, frame, stateId]);
}
