import { useMemo } from 'react';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { outlineOf } from './outline.ts';

/** Space around the drawing, as a share of its larger side. */
const MARGIN = 0.12;

/** The frame as a line drawing that follows the form. */
export function FrameOutline({ document }: { document: FrameDocument }) {
  const outline = useMemo(() => outlineOf(document), [document]);
  const [left, top, width, height] = outline.box;
  const size = Math.max(width, height, 1e-3);
  const margin = size * MARGIN;
  const foot = size * 0.025;
  return (
    <figure>
      <svg
        viewBox={`${left - margin} ${top - margin} ${width + 2 * margin} ${height + 2 * margin}`}
        role="img"
        aria-label={`Outline: ${countsOf(document)}`}
        className="max-h-[50dvh] w-full border border-rule bg-sheet text-ink"
        fill="none"
        stroke="currentColor"
      >
        {outline.lines.map(([[x1, y1], [x2, y2]], index) => (
          <line
            key={index}
            {...{ x1, y1, x2, y2 }}
            strokeWidth="2"
            strokeLinecap="round"
            vectorEffect="non-scaling-stroke"
          />
        ))}
        {outline.supports.map(([x, y], index) => (
          <path
            key={index}
            d={`M${x - foot} ${y + 1.6 * foot}H${x + foot}M${x} ${y}V${y + 1.6 * foot}`}
            strokeWidth="1.5"
            vectorEffect="non-scaling-stroke"
          />
        ))}
        {outline.masses.map(([[x1, y1], [x2, y2]], index) => (
          <g key={index} className="text-pencil" vectorEffect="non-scaling-stroke">
            <line
              {...{ x1, y1, x2, y2 }}
              strokeWidth="1"
              strokeDasharray="4 3"
              vectorEffect="non-scaling-stroke"
            />
            <circle
              cx={x2}
              cy={y2}
              r={1.4 * foot}
              fill="var(--sheet)"
              stroke="var(--ink)"
              strokeWidth="1.5"
              vectorEffect="non-scaling-stroke"
            />
          </g>
        ))}
      </svg>
      <figcaption className="mt-2 text-sm text-ink-soft">{countsOf(document)}</figcaption>
    </figure>
  );
}

const plural = (count: number, one: string): string => `${count} ${one}${count === 1 ? '' : 's'}`;

const countsOf = ({ nodes, members, supports, masses }: FrameDocument): string =>
  [
    plural(nodes.length, 'node'),
    plural(members.length, 'member'),
    plural(supports.length, 'support'),
    masses.length === 1 ? '1 mass' : `${masses.length} masses`,
  ].join(', ');
