import type { Preview } from '#src/lib/preview.ts';
import type { FrequencyScale } from '../state/frequencyScale.ts';
import { layOutPreview } from '../state/layOutPreview.ts';
import type { FrequencyMark } from '../state/layOutMarks.ts';

interface PreviewMarksProps {
  readonly preview: Preview;
  /** Marks of the last stored result. */
  readonly ghosts: readonly FrequencyMark[];
  readonly scale: FrequencyScale;
}

/** The frequencies of the changed frame over the ghosts of the stored ones: to look at, not to open. */
export function PreviewMarks({ preview, ghosts, scale }: PreviewMarksProps) {
  const marks = layOutPreview(preview.frequenciesHz, scale);
  return (
    <div className="absolute inset-x-0 top-0 h-11">
      {ghosts.map(({ x, modes }) => (
        <Stroke key={modes[0]?.number} x={x} ghost />
      ))}
      {marks.map(({ x, label }, i) => (
        <div key={i}>
          <Stroke x={x} />
          {label !== '' && (
            <span
              className="absolute top-0 -translate-x-1/2 whitespace-nowrap font-mono text-[11px] leading-4 tabular-nums"
              style={{ left: x }}
            >
              {label}
            </span>
          )}
        </div>
      ))}
    </div>
  );
}

/** An open stroke where a stored mark has a head; a ghost is short, pale and broken. */
function Stroke({ x, ghost = false }: { x: number; ghost?: boolean }) {
  return (
    <svg
      width="9"
      height="28"
      viewBox="0 0 9 28"
      aria-hidden="true"
      className={`absolute bottom-0 -translate-x-1/2 ${ghost ? 'text-ink-soft' : 'text-ink'}`}
      style={{ left: x }}
    >
      {ghost ? (
        <path d="M4.5 28V12" stroke="currentColor" strokeDasharray="2 3" fill="none" />
      ) : (
        <path d="M1 4.5 L4.5 1 L8 4.5 M4.5 1V28" stroke="currentColor" fill="none" />
      )}
    </svg>
  );
}
