import { useLocation, useParams, useSearchParams } from 'react-router-dom';
import type { ModeSummary } from '#shared/schemas/solveResult.ts';
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

  const remarks: string[] = [];
  if (summary && !own) remarks.push('stale: the draft has changed since this was solved');
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
      caption={shown ? captionOf(shown) : ''}
      remarks={remarks}
      selectedMode={selected}
      hrefFor={hrefFor}
    />
  );
}

const captionOf = (shown: ShownFrame): string =>
  [shown.label, shown.state?.name, 'consistent mass', 'supports as expected']
    .filter((part) => part !== undefined)
    .join(' · ');
