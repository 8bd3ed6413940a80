import { sectionOutline } from '#shared/frame/sectionOutline.ts';
import type { SectionPoint } from '#shared/frame/sections/section.ts';
import type { SectionShape } from '#shared/schemas/frameDocument.ts';

const BOX = 150;
const MARGIN = 26;

/** The section to scale with its axes, seen along the member from its start: y to the right, z up. */
export function SectionDrawing({ shape }: { shape: SectionShape }) {
  const { outer, holes, approximate } = sectionOutline(shape);
  const reach = Math.max(...outer.flatMap(([y, z]) => [Math.abs(y), Math.abs(z)]), 1e-6);
  const scale = (BOX / 2 - MARGIN) / reach;
  const path = [outer, ...holes].map((ring) => ringPath(ring, scale)).join(' ');
  const end = BOX / 2 - 12;
  return (
    <figure className="flex items-center gap-3">
      <svg
        viewBox={`${-BOX / 2} ${-BOX / 2} ${BOX} ${BOX}`}
        width={BOX}
        height={BOX}
        role="img"
        aria-label={approximate ? 'Section whose shape is not known' : 'Section to scale'}
      >
        <path
          d={path}
          fillRule="evenodd"
          fill="color-mix(in srgb, var(--ink) 16%, var(--sheet))"
          stroke="var(--ink)"
          strokeWidth="1.25"
          {...(approximate ? { strokeDasharray: '4 3' } : {})}
        />
        <g stroke="var(--focus)" strokeWidth="1" strokeDasharray="8 2 1 2">
          <path d={`M${-end} 0H${end}M0 ${end}V${-end}`} />
        </g>
        <g fill="var(--focus)" fontSize="12" fontStyle="italic">
          <text x={end + 2} y="4">
            y
          </text>
          <text x="-3" y={-end - 3}>
            z
          </text>
        </g>
      </svg>
      <figcaption className="text-sm text-ink-soft">
        {approximate
          ? 'A rectangle stands for the shape, which is not known.'
          : 'Seen along the member from its start.'}
      </figcaption>
    </figure>
  );
}

const ringPath = (ring: readonly SectionPoint[], scale: number): string =>
  `M${ring.map(([y, z]) => `${(y * scale).toFixed(2)} ${(-z * scale).toFixed(2)}`).join('L')}Z`;
