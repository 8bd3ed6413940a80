import { Popover } from 'radix-ui';
import { Link } from 'react-router-dom';
import type { ModeSummary } from '#shared/schemas/solveResult.ts';
import { TARGET_PX, type FrequencyMark } from '../state/layOutMarks.ts';

interface FrequencyMarksProps {
  readonly marks: readonly FrequencyMark[];
  readonly selectedMode: number | null;
  readonly describe: (mode: ModeSummary) => string;
  readonly hrefFor: (mode: ModeSummary) => string;
}

/** The marks over the axis: a link for one mode, a small list for several that share a place. */
export function FrequencyMarks({ marks, selectedMode, describe, hrefFor }: FrequencyMarksProps) {
  return (
    <ol aria-label="Natural frequencies" className="absolute inset-x-0 top-0 h-11">
      {marks.map((mark) => {
        const selected = mark.modes.some((mode) => mode.number === selectedMode);
        const [only] = mark.modes;
        if (!only) return null;
        const inside = <MarkFigure mark={mark} selected={selected} />;
        const className =
          'absolute bottom-0 top-0 -translate-x-1/2 flex flex-col items-center justify-end rounded-xs ' +
          'text-ink hover:text-signal-text focus-visible:outline-2 focus-visible:outline-focus';
        const style = { width: TARGET_PX };
        return (
          <li key={only.number} className="absolute inset-y-0" style={{ left: mark.x }}>
            {mark.modes.length === 1 ? (
              <Link
                to={hrefFor(only)}
                className={className}
                style={style}
                aria-label={describe(only)}
                aria-current={selected ? 'true' : undefined}
                title={describe(only)}
              >
                {inside}
              </Link>
            ) : (
              <Popover.Root>
                <Popover.Trigger
                  className={className}
                  style={style}
                  aria-label={`${mark.modes.length} modes near ${describe(only)}`}
                  title={mark.modes.map(describe).join('\n')}
                >
                  {inside}
                </Popover.Trigger>
                <Popover.Portal>
                  <Popover.Content
                    side="top"
                    collisionPadding={8}
                    className="z-30 max-h-72 overflow-auto border border-ink bg-sheet p-1 text-sm text-ink"
                  >
                    <ul>
                      {mark.modes.map((mode) => (
                        <li key={mode.number}>
                          <Popover.Close asChild>
                            <Link
                              to={hrefFor(mode)}
                              aria-current={mode.number === selectedMode ? 'true' : undefined}
                              className="block px-2 py-1 hover:bg-ground focus-visible:outline-2 focus-visible:outline-focus"
                            >
                              {describe(mode)}
                            </Link>
                          </Popover.Close>
                        </li>
                      ))}
                    </ul>
                  </Popover.Content>
                </Popover.Portal>
              </Popover.Root>
            )}
          </li>
        );
      })}
    </ol>
  );
}

/**
 * Hollow head: only the expected supports are computed. A second head says that several modes share the mark; a
 * frame around the head marks the mode that is open.
 */
function MarkFigure({ mark, selected }: { mark: FrequencyMark; selected: boolean }) {
  return (
    <>
      <span
        className={`whitespace-nowrap font-mono text-[11px] leading-4 tabular-nums ${selected ? 'font-semibold' : ''}`}
      >
        {mark.label}
      </span>
      <svg width="20" height="26" viewBox="0 0 20 26" aria-hidden="true" className="shrink-0">
        <g fill="none" stroke="currentColor" strokeWidth="1.25">
          <path d="M10 12.5V26" strokeWidth={selected ? 3 : 1.25} />
          {mark.modes.length > 1 && <path d="M5 6 L10 1 L15 6" />}
          <path d="M10 3.5 L14.5 8 L10 12.5 L5.5 8 Z" strokeWidth={selected ? 2.25 : 1.25} />
          {selected && <path d="M2 4V1h4M18 4V1h-4M2 12v3h4M18 12v3h-4" />}
        </g>
      </svg>
    </>
  );
}
