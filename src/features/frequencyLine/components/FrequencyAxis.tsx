import type { FrequencyScale } from '../state/frequencyScale.ts';

const RPM_PER_HZ = 60;

const short = new Intl.NumberFormat('en', { maximumSignificantDigits: 3 });

/** The ruled axis with Hz over it and the same speed in rpm under it. */
export function FrequencyAxis({ scale }: { readonly scale: FrequencyScale }) {
  return (
    <svg
      width={scale.width}
      height="38"
      className="absolute left-0 top-11 block overflow-visible"
      aria-hidden="true"
    >
      <line x1="0" y1="0.5" x2={scale.width} y2="0.5" stroke="var(--ink)" strokeWidth="1.25" />
      {scale.ticksHz.map((hz) => {
        const x = scale.toX(hz);
        const anchor = x < 24 ? 'start' : x > scale.width - 24 ? 'end' : 'middle';
        return (
          <g key={hz} fontFamily="var(--font-mono)" textAnchor={anchor}>
            <line x1={x} y1="0" x2={x} y2="5" stroke="var(--ink)" />
            <text x={x} y="17" fontSize="11" fill="var(--ink)">
              {short.format(hz)}
            </text>
            <text x={x} y="31" fontSize="10" fill="var(--ink-soft)">
              {short.format(hz * RPM_PER_HZ)}
            </text>
          </g>
        );
      })}
    </svg>
  );
}
