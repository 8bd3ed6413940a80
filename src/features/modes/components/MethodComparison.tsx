import type { ModePairing } from '#shared/analysis/pairModes.ts';
import type { ModeSummary } from '#shared/schemas/solveResult.ts';
import { Notice } from '#src/components/Notice.tsx';
import { formatDifference, formatModeFrequency } from '../state/formatMode.ts';

interface MethodComparisonProps {
  readonly consistent: readonly ModeSummary[];
  readonly lumped: readonly ModeSummary[];
  readonly pairing: ModePairing;
  readonly selectedMode: number;
  readonly onChoose: (mode: number) => void;
}

/** Lumped beside consistent, mode by mode, paired by shape; what has no partner is listed too. */
export function MethodComparison(props: MethodComparisonProps) {
  const { consistent, lumped, pairing, selectedMode, onChoose } = props;
  return (
    <div className="flex flex-col gap-4">
      <Notice kind="caution" word="What agreement means">
        That lumped and consistent agree says only that the mesh is fine enough. It says nothing
        about supports, joints or the choice of beam theory, which move these values far more.
        Consistent mass comes from above the same continuous model, lumped usually from below, but
        that is no guarantee.
      </Notice>
      <div className="overflow-x-auto">
        <table className="w-full min-w-[40rem] text-left">
          <caption className="sr-only">
            Modes by consistent and lumped mass, paired by shape
          </caption>
          <thead className="text-sm text-ink-soft">
            <tr className="border-b border-ink">
              <Head>Consistent</Head>
              <Head right>Frequency</Head>
              <Head>Lumped</Head>
              <Head right>Frequency</Head>
              <Head right>Lumped lies</Head>
              <Head right>MAC</Head>
              <Head>Motion</Head>
            </tr>
          </thead>
          <tbody>
            {pairing.pairs.map((pair) => {
              const a = consistent[pair.a];
              const b = lumped[pair.b];
              if (!a || !b) return null;
              return (
                <tr
                  key={a.number}
                  aria-selected={a.number === selectedMode}
                  className="border-b border-rule aria-selected:bg-ground aria-selected:font-medium"
                >
                  <td className="py-1 pr-4">
                    <button
                      type="button"
                      className="link min-h-6 min-w-6 cursor-pointer"
                      onClick={() => onChoose(a.number)}
                    >
                      Mode {a.number}
                    </button>
                  </td>
                  <Value>{formatModeFrequency(a)}</Value>
                  <td className="py-1 pr-4">Mode {b.number}</td>
                  <Value>{formatModeFrequency(b)}</Value>
                  <Value>{differenceOf(a, b)}</Value>
                  <Value>{pair.mac.toFixed(3)}</Value>
                  <td className="py-1">
                    {a.name}
                    {pair.subspace && (
                      <span className="text-ink-soft"> (close modes, compared together)</span>
                    )}
                  </td>
                </tr>
              );
            })}
          </tbody>
        </table>
      </div>
      <Unpaired
        title="Consistent modes without a lumped partner"
        modes={pick(consistent, pairing.unpairedA)}
      />
      <Unpaired
        title="Lumped modes without a consistent partner"
        modes={pick(lumped, pairing.unpairedB)}
      />
    </div>
  );
}

const pick = (modes: readonly ModeSummary[], indices: readonly number[]): ModeSummary[] =>
  indices.flatMap((i) => modes[i] ?? []);

const differenceOf = (a: ModeSummary, b: ModeSummary): string =>
  a.frequencyHz > 0 ? formatDifference(b.frequencyHz / a.frequencyHz - 1) : '0.00 %';

function Unpaired({ title, modes }: { title: string; modes: readonly ModeSummary[] }) {
  if (modes.length === 0) return null;
  return (
    <div>
      <h3>{title}</h3>
      <ul className="mt-1">
        {modes.map((mode) => (
          <li key={mode.number}>
            Mode {mode.number}, <span className="num">{formatModeFrequency(mode)}</span>,{' '}
            {mode.name}
          </li>
        ))}
      </ul>
    </div>
  );
}

function Head({ children, right = false }: { children: string; right?: boolean }) {
  return (
    <th scope="col" className={`py-1 pr-4 font-normal ${right ? 'text-right' : ''}`}>
      {children}
    </th>
  );
}

const Value = ({ children }: { children: string }) => (
  <td className="num py-1 pr-4 text-right">{children}</td>
);
