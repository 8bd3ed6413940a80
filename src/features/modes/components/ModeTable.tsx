import type { HandCheck, ModeSummary, SolveSummary } from '#shared/schemas/solveResult.ts';
import { formatCheck, formatModeFrequency, formatShare } from '../state/formatMode.ts';
import { checksOf } from '../state/handCheckBounds.ts';

interface ModeTableProps {
  readonly summary: SolveSummary;
  readonly selectedMode: number;
  readonly onChoose: (mode: number) => void;
}

const DIRECTIONS = ['along X', 'along Y', 'along Z'] as const;

/** Every mode in a row; the foot says how much of the mass the modes reach together. */
export function ModeTable({ summary, selectedMode, onChoose }: ModeTableProps) {
  const { effectiveMass, count } = summary;
  const ofWhole = (values: readonly number[], i: number): string => {
    const whole = effectiveMass.total[i] ?? 0;
    return whole > 0 ? formatShare((values[i] ?? 0) / whole) : 'none';
  };
  return (
    <div className="overflow-x-auto">
      <table className="w-full min-w-[44rem] text-left">
        <caption className="pb-2 text-left text-sm text-ink-soft">
          Natural frequencies by {summary.method} mass, with the share of the whole mass that goes
          with each mode. None-missed count: {countSentence(count)}
        </caption>
        <thead className="text-sm text-ink-soft">
          <tr className="border-b border-ink">
            <Head>Mode</Head>
            <Head right>Frequency</Head>
            <Head right>Speed</Head>
            <Head>Motion</Head>
            {DIRECTIONS.map((direction) => (
              <Head key={direction} right>
                {direction}
              </Head>
            ))}
            <Head right>Backward error</Head>
          </tr>
        </thead>
        <tbody>
          {summary.modes.map((mode) => (
            <ModeRow
              key={mode.number}
              mode={mode}
              checks={checksOf(summary.handChecks?.axes ?? [], mode)}
              selected={mode.number === selectedMode}
              ofWhole={ofWhole}
              onChoose={onChoose}
            />
          ))}
        </tbody>
        <tfoot className="text-sm">
          <FootRow label="These modes together" values={effectiveMass.sum} ofWhole={ofWhole} />
          <FootRow
            label="All modes would reach"
            values={effectiveMass.attainable}
            ofWhole={ofWhole}
          />
          <FootRow
            label="Stands on fixed supports"
            values={effectiveMass.onFixed}
            ofWhole={ofWhole}
          />
        </tfoot>
      </table>
    </div>
  );
}

function countSentence(count: SolveSummary['count']): string {
  const below = `${count.below} below ${count.shiftHz.toFixed(1)} Hz by the count, ${count.found} found`;
  return count.complete ? `complete (${below}).` : `incomplete, modes may be missing (${below}).`;
}

interface ModeRowProps {
  readonly mode: ModeSummary;
  readonly checks: readonly HandCheck[];
  readonly selected: boolean;
  readonly ofWhole: (values: readonly number[], i: number) => string;
  readonly onChoose: (mode: number) => void;
}

function ModeRow({ mode, checks, selected, ofWhole, onChoose }: ModeRowProps) {
  return (
    <tr
      aria-selected={selected}
      className="border-b border-rule aria-selected:bg-ground aria-selected:font-medium"
    >
      <td className="py-1 pr-4">
        <button
          type="button"
          className="link min-h-6 min-w-6 cursor-pointer text-left"
          onClick={() => onChoose(mode.number)}
        >
          Mode {mode.number}
        </button>
      </td>
      <td className="num py-1 pr-4 text-right">{formatModeFrequency(mode)}</td>
      <td className="num py-1 pr-4 text-right">{(mode.frequencyHz * 60).toFixed(0)} rpm</td>
      <td className="py-1 pr-4">
        {mode.name}
        {checks.map(({ axis, rayleigh }) => (
          <span key={axis} className="block text-sm text-ink-soft">
            hand check along {axis}: Rayleigh <span className="num">{formatCheck(rayleigh)}</span>
          </span>
        ))}
      </td>
      {DIRECTIONS.map((direction, i) => (
        <td key={direction} className="num py-1 pr-4 text-right">
          {ofWhole(mode.effectiveMass, i)}
        </td>
      ))}
      <td className="num py-1 text-right">{mode.backwardError.toExponential(0)}</td>
    </tr>
  );
}

function Head({ children, right = false }: { children: string; right?: boolean }) {
  return (
    <th scope="col" className={`py-1 pr-4 font-normal ${right ? 'text-right' : ''}`}>
      {children}
    </th>
  );
}

interface FootRowProps {
  readonly label: string;
  readonly values: readonly number[];
  readonly ofWhole: (values: readonly number[], i: number) => string;
}

function FootRow({ label, values, ofWhole }: FootRowProps) {
  return (
    <tr className="border-b border-rule text-ink-soft">
      <th scope="row" colSpan={4} className="py-1 pr-4 font-normal">
        {label}
      </th>
      {DIRECTIONS.map((direction, i) => (
        <td key={direction} className="num py-1 pr-4 text-right">
          {ofWhole(values, i)}
        </td>
      ))}
      <td />
    </tr>
  );
}
