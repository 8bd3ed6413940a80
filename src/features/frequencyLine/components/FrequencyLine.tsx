import { useState } from 'react';
import type { ModeSummary, SolveSummary } from '#shared/schemas/solveResult.ts';
import { formatFrequency } from '#shared/units/formatFrequency.ts';
import { IncompleteMark } from '#src/components/IncompleteMark.tsx';
import { useElementWidth } from '#src/hooks/useElementWidth.ts';
import type { Preview } from '#src/lib/preview.ts';
import { frequencyScale, type ScaleKind } from '../state/frequencyScale.ts';
import { formatPreviewed } from '../state/layOutPreview.ts';
import { layOutMarks } from '../state/layOutMarks.ts';
import { FrequencyAxis } from './FrequencyAxis.tsx';
import { FrequencyMarks } from './FrequencyMarks.tsx';
import { PreviewMarks } from './PreviewMarks.tsx';

export interface FrequencyLineProps {
  readonly summary: SolveSummary | null;
  /** Frequencies of the frame while it is being changed: they take the marks' place, which stay as ghosts. */
  readonly preview: Preview | null;
  /** What the line shows, in words: "Draft, tank full, consistent mass". */
  readonly caption: string;
  /** Everything that limits what the line says: stale, solving, failed. */
  readonly remarks: readonly string[];
  readonly selectedMode: number | null;
  readonly hrefFor: (mode: ModeSummary) => string;
}

/** Space at both ends, so that the first and last labels do not run off the sheet. */
const SIDE_PX = 36;

/** More than four digits no support condition of a machine warrants on a line. */
const DIGITS = 4;

const formatHz = (mode: ModeSummary): string => formatFrequency(mode.frequencyHz, DIGITS);

/**
 * The frequency line along the foot of every project screen: natural frequencies on a scale of Hz with the
 * same speed in rpm under it. A mark opens its mode.
 */
export function FrequencyLine(props: FrequencyLineProps) {
  const { summary, preview, caption, remarks, selectedMode, hrefFor } = props;
  const [kind, setKind] = useState<ScaleKind>('log');
  const [frame, width] = useElementWidth<HTMLDivElement>();
  const modes = summary?.modes ?? [];
  const scale = frequencyScale(
    kind,
    [...modes.map((mode) => mode.frequencyHz), ...(preview?.frequenciesHz ?? [])],
    Math.max(0, width - 2 * SIDE_PX),
  );
  const marks = width > 0 ? layOutMarks(modes, scale, formatHz) : [];
  const rigid = summary?.rigidBodyModes ?? 0;
  const incomplete = summary?.complete === false;
  const describe = (mode: ModeSummary): string =>
    `Mode ${mode.number}, ${formatHz(mode)}, ${mode.name}${incomplete ? ' (of an incomplete solve)' : ''}`;

  return (
    <section aria-label="Frequency line" className="border-t border-ink bg-sheet pb-1">
      <div className="flex flex-wrap items-baseline gap-x-4 gap-y-0.5 px-4 pt-1 text-xs text-ink-soft">
        <span className="text-ink">{caption}</span>
        {rigid > 0 && <span>{rigid} rigid-body modes at 0 Hz</span>}
        {incomplete && (
          <span className="text-signal-text">
            <IncompleteMark />: modes may be missing
          </span>
        )}
        {remarks.map((remark) => (
          <span key={remark} className="text-caution">
            <span aria-hidden="true">△ </span>
            {remark}
          </span>
        ))}
        {preview && (
          <span role="status" className="sr-only">
            Preview: natural frequencies{' '}
            {preview.frequenciesHz
              .filter((hz) => hz > 0)
              .map(formatPreviewed)
              .join(', ')}
          </span>
        )}
        <span className="ml-auto flex items-baseline gap-2">
          <span>Hz over rpm</span>
          <button
            type="button"
            className="min-h-6 min-w-6 px-1 underline decoration-rule underline-offset-2 hover:text-ink focus-visible:outline-2 focus-visible:outline-focus"
            onClick={() => setKind(kind === 'log' ? 'linear' : 'log')}
          >
            {kind === 'log' ? 'Log scale' : 'Linear scale'}
            <span className="sr-only">, switch to {kind === 'log' ? 'linear' : 'log'}</span>
          </button>
        </span>
      </div>
      <div ref={frame} className="relative h-[84px] overflow-hidden">
        {(modes.length > 0 || preview) && width > 0 && (
          <div className="absolute inset-y-0" style={{ left: SIDE_PX, width: scale.width }}>
            <FrequencyAxis scale={scale} />
            {preview ? (
              <PreviewMarks preview={preview} ghosts={marks} scale={scale} />
            ) : (
              <FrequencyMarks
                marks={marks}
                selectedMode={selectedMode}
                describe={describe}
                hrefFor={hrefFor}
              />
            )}
          </div>
        )}
        {modes.length === 0 && !preview && (
          <p className="px-4 pt-6 text-sm text-ink-soft">
            No natural frequencies yet. Solve the frame, and they appear here.
          </p>
        )}
      </div>
    </section>
  );
}
