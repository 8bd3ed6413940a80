import type { ReactNode } from 'react';
import type { ModeSummary, SolveSummary } from '#shared/schemas/solveResult.ts';
import { IncompleteMark } from '#src/components/IncompleteMark.tsx';
import { whyEmpty, type ComparedMethod } from '../state/comparedMethod.ts';
import { formatDifference, formatModeFrequency } from '../state/formatMode.ts';

interface MethodComparisonProps {
  readonly consistent: Pick<SolveSummary, 'modes' | 'complete'>;
  /** In the order of the columns. */
  readonly others: readonly ComparedMethod[];
  /** The beam theory whose values mesh-free gives. */
  readonly theory: string;
  readonly selectedMode: number;
  readonly onChoose: (mode: number) => void;
}

const TITLES = { consistent: 'Consistent', lumped: 'Lumped', 'mesh-free': 'Mesh-free' } as const;

/** Consistent, lumped and mesh-free side by side, paired by shape; what has no partner is listed too. */
export function MethodComparison(props: MethodComparisonProps) {
  const { consistent, others, theory, selectedMode, onChoose } = props;
  return (
    <div className="flex flex-col gap-4">
      <table className="w-full max-w-4xl text-left max-sm:text-sm">
        <caption className="pb-2 text-left text-sm text-ink-soft">
          Natural frequencies by method, paired by shape. Under each: how far it lies from
          consistent, and the MAC of both shapes.
        </caption>
        <thead className="text-sm text-ink-soft">
          <tr className="border-b border-ink">
            <th scope="col" className="py-1 pr-2 align-bottom font-normal">
              Mode
            </th>
            <Head title={TITLES.consistent} complete={consistent.complete} />
            {others.map(({ method, solved }) => (
              <Head
                key={method}
                title={TITLES[method]}
                note={method === 'mesh-free' ? theory : undefined}
                complete={solved?.summary.complete ?? true}
              />
            ))}
          </tr>
        </thead>
        <tbody>
          {consistent.modes.map((mode, index) => (
            <tr
              key={mode.number}
              aria-selected={mode.number === selectedMode}
              className="border-b border-rule align-top aria-selected:bg-ground aria-selected:font-medium"
            >
              <th scope="row" className="py-1 pr-2 font-normal">
                <button
                  type="button"
                  className="link min-h-6 min-w-6 cursor-pointer"
                  onClick={() => onChoose(mode.number)}
                >
                  Mode {mode.number}
                </button>
                <span className="block text-sm text-ink-soft">{mode.name}</span>
              </th>
              <Cell>
                <span className="num">{formatModeFrequency(mode)}</span>
              </Cell>
              {others.map((other) => (
                <Cell key={other.method}>
                  <Partner mode={mode} index={index} other={other} />
                </Cell>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      {others.map((other) => (
        <Remainder key={other.method} other={other} />
      ))}
    </div>
  );
}

interface PartnerProps {
  readonly mode: ModeSummary;
  /** 0-based place of the mode in its solve. */
  readonly index: number;
  readonly other: ComparedMethod;
}

function Partner({ mode, index, other }: PartnerProps) {
  const pair = other.pairing?.pairs.find(({ a }) => a === index);
  const partner = pair && other.solved?.summary.modes[pair.b];
  if (!partner) {
    return <span className="text-sm text-ink-soft">{other.solved ? 'no such shape' : '–'}</span>;
  }
  return (
    <>
      <span className="num">{formatModeFrequency(partner)}</span>
      <span className="num block text-xs text-ink-soft">{differenceOf(mode, partner)}</span>
      <span className="block text-xs text-ink-soft">
        MAC <span className="num">{pair.mac.toFixed(3)}</span>
        {partner.number !== mode.number && `, its mode ${partner.number}`}
        {pair.subspace && ', close modes together'}
      </span>
    </>
  );
}

const differenceOf = (a: ModeSummary, b: ModeSummary): string =>
  a.frequencyHz > 0 ? formatDifference(b.frequencyHz / a.frequencyHz - 1) : '0.00 %';

/** What a column cannot say in its rows: why it is empty, or which of its modes have no partner. */
function Remainder({ other }: { other: ComparedMethod }) {
  const title = TITLES[other.method];
  const empty = whyEmpty(other);
  if (empty !== null) {
    return (
      <p>
        {title}: {empty}.
      </p>
    );
  }
  const modes = other.pairing?.unpairedB.flatMap((i) => other.solved?.summary.modes[i] ?? []) ?? [];
  if (modes.length === 0) return null;
  return (
    <div>
      <h3>{title} modes without a consistent partner</h3>
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

interface HeadProps {
  readonly title: string;
  readonly note?: string | undefined;
  readonly complete: boolean;
}

function Head({ title, note, complete }: HeadProps) {
  return (
    <th scope="col" className="py-1 pl-2 text-right align-bottom font-normal">
      {title}
      {note !== undefined && <span className="block">{note}</span>}
      {!complete && (
        <span className="block">
          <IncompleteMark />
        </span>
      )}
    </th>
  );
}

const Cell = ({ children }: { children: ReactNode }) => (
  <td className="py-1 pl-2 text-right">{children}</td>
);
