import { replaceEqualDeep } from '@tanstack/react-query';
import { useMemo } from 'react';
import { useLocation, useParams, useSearchParams } from 'react-router-dom';
import { useStore } from 'zustand';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { ModeSummary } from '#shared/schemas/solveResult.ts';
import { previewStore, type Preview } from '#src/lib/preview.ts';
import { useShownFrame, type ShownFrame } from '#src/hooks/useShownFrame.ts';
import { useShownSolves } from '#src/hooks/useShownSolves.ts';
import { useSolve } from '#src/hooks/useSolve.ts';
import { FrequencyLine } from './FrequencyLine.tsx';

/** The frequency line of what the project screen shows: draft or revision, in the chosen operating state. */
export function FrequencyLineHost() {
  const { projectId = '' } = useParams();
  const [search] = useSearchParams();
  const { pathname } = useLocation();
  const { shown } = useShownFrame(projectId);
  const { current, stale } = useShownSolves(projectId, shown);

  const { consistent } = current;
  const own = consistent?.status === 'done' ? consistent : null;
  const shownSolve = own ?? stale;
  const { data: solve } = useSolve(shownSolve?.id ?? null);
  const summary = shownSolve && solve?.summary ? solve.summary : null;

  const preview = useStore(previewStore, (state) => state.preview);
  const isOfDraft = useMemo(
    () => preview !== null && shown !== null && isSame(preview.document, shown.document),
    [preview, shown],
  );
  const shownPreview =
    preview && shown && belongsTo(preview, shown) && !(own && isOfDraft) ? preview : null;

  const remarks: string[] = [];
  if (shownPreview?.refusal) remarks.push(`preview: ${shownPreview.refusal}`);
  else if (shownPreview) remarks.push('preview, not stored: solve for the full result');
  else if (summary && !own) remarks.push('stale: the draft has changed since this was solved');
  if (consistent?.status === 'queued' || consistent?.status === 'running') remarks.push('solving');
  if (consistent?.status === 'failed') remarks.push('the last solve failed');

  const onModes = pathname.endsWith('/modes');
  const selected = onModes ? Number(search.get('mode') ?? 1) : null;
  const hrefFor = (mode: ModeSummary): string => {
    const next = new URLSearchParams(search);
    next.set('mode', String(mode.number));
    return `/projects/${projectId}/modes?${next.toString()}`;
  };

  return (
    <FrequencyLine
      summary={summary}
      preview={shownPreview?.refusal === null ? shownPreview : null}
      caption={shown ? captionOf(shown) : ''}
      remarks={remarks}
      selectedMode={selected}
      hrefFor={hrefFor}
    />
  );
}

/** A preview shows on the draft's sheet, in its state, until the stored draft is what it previews and is solved. */
const belongsTo = (preview: Preview, shown: ShownFrame): boolean =>
  preview.projectId === shown.projectId &&
  shown.revision === null &&
  preview.stateId === (shown.state?.id ?? null);

/** What comes from the server is another object with the same in it. */
const isSame = (a: FrameDocument, b: FrameDocument): boolean => replaceEqualDeep(a, b) === a;

const captionOf = (shown: ShownFrame): string =>
  [shown.label, shown.state?.name, 'consistent mass', 'supports as expected']
    .filter((part) => part !== undefined)
    .join(' · ');
