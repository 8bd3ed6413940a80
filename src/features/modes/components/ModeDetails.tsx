import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { EnergyShare, ModeSummary, SolveSummary } from '#shared/schemas/solveResult.ts';
import { HandCheckBlock } from './HandCheckBlock.tsx';
import { formatModeFrequency, formatShare } from '../state/formatMode.ts';
import { checksOf } from '../state/handCheckBounds.ts';
import { partName } from '../state/partName.ts';

interface ModeDetailsProps {
  readonly mode: ModeSummary;
  readonly summary: SolveSummary;
  readonly document: FrameDocument;
}

const AXES = ['X', 'Y', 'Z'] as const;
/** As many parts as a person reads; the rest is one line. */
const PARTS_SHOWN = 4;

/** What is known of one mode: how much of the frame's mass goes with it and where its energy sits. */
export function ModeDetails({ mode, summary, document }: ModeDetailsProps) {
  const { handChecks } = summary;
  const strain = [
    ...mode.strainShares.members.map((one) => named(one, partName(document, 'members', one.id))),
    ...mode.strainShares.joints.map((one) => named(one, `joint, ${one.id}`)),
    ...mode.strainShares.supports.map((one) =>
      named(one, `support, ${partName(document, 'nodes', one.id)}`),
    ),
    ...mode.strainShares.springs.map((one) => named(one, partName(document, 'springs', one.id))),
  ];
  const kinetic = [
    ...mode.kineticShares.members.map((one) => named(one, partName(document, 'members', one.id))),
    ...mode.kineticShares.masses.map((one) => named(one, partName(document, 'masses', one.id))),
  ];
  return (
    <section aria-label={`Mode ${mode.number}`} className="flex flex-col gap-3 text-sm">
      <p>
        <span className="text-ink-soft">Mode {mode.number}</span>
        <span className="num ml-2 text-base">{formatModeFrequency(mode)}</span>
        <span className="block text-base">{mode.name}</span>
      </p>
      <table>
        <caption className="text-left text-ink-soft">Effective mass, share of the whole</caption>
        <tbody>
          <tr>
            {AXES.map((axis, i) => (
              <td key={axis} className="pr-4">
                along {axis}{' '}
                <span className="num whitespace-nowrap">
                  {formatShare(share(mode.effectiveMass[i], summary.effectiveMass.total[i]))}
                </span>
              </td>
            ))}
          </tr>
        </tbody>
      </table>
      {checksOf(handChecks?.axes ?? [], mode).map((check) => (
        <HandCheckBlock key={check.axis} check={check} mode={mode} modes={summary.modes} />
      ))}
      {handChecks && handChecks.none !== null && (
        <p className="text-ink-soft">Hand checks: {handChecks.none}</p>
      )}
      {mode.kind !== 'rigid' && <Shares title="Strain energy sits in" shares={strain} />}
      <Shares title="Moving mass" shares={kinetic} />
      <p className="text-ink-soft">
        A shape is not an amplitude: how far it moves is not known here.
      </p>
    </section>
  );
}

interface NamedShare {
  readonly name: string;
  readonly share: number;
}

const named = ({ share: part }: EnergyShare, name: string): NamedShare => ({ name, share: part });

const share = (part: number | undefined, whole: number | undefined): number =>
  part !== undefined && whole !== undefined && whole > 0 ? part / whole : 0;

function Shares({ title, shares }: { title: string; shares: readonly NamedShare[] }) {
  const sorted = shares.toSorted((a, b) => b.share - a.share);
  const shown = sorted.slice(0, PARTS_SHOWN).filter((one) => one.share >= 0.01);
  const rest = 1 - shown.reduce((sum, one) => sum + one.share, 0);
  if (shown.length === 0) return null;
  return (
    <div>
      <p className="text-ink-soft">{title}</p>
      <ul>
        {shown.map((one) => (
          <li key={one.name} className="flex justify-between gap-4">
            <span className="truncate">{one.name}</span>
            <span className="num">{formatShare(one.share)}</span>
          </li>
        ))}
        {rest > 0.005 && (
          <li className="flex justify-between gap-4 text-ink-soft">
            <span>everything else</span>
            <span className="num">{formatShare(rest)}</span>
          </li>
        )}
      </ul>
    </div>
  );
}
