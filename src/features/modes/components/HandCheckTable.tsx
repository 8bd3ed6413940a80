import type { HandCheck, ModeSummary, SolveSummary } from '#shared/schemas/solveResult.ts';
import { NoticeMark } from '#src/components/Notice.tsx';
import { useUnits } from '#src/hooks/useUnits.ts';
import {
  formatCheck,
  formatDeflection,
  formatModeFrequency,
  formatShare,
} from '../state/formatMode.ts';
import { outsideBounds } from '../state/handCheckBounds.ts';

type Checks = NonNullable<SolveSummary['handChecks']>;

interface HandCheckTableProps {
  readonly checks: Checks;
  readonly modes: readonly ModeSummary[];
}

/** The hand checks of all axes, each beside the mode with the most effective mass along it. */
export function HandCheckTable({ checks, modes }: HandCheckTableProps) {
  if (checks.none !== null) return <p className="text-ink-soft">Hand checks: {checks.none}</p>;
  return (
    <section aria-labelledby="hand-checks-heading">
      <h3 id="hand-checks-heading">Hand checks, 1 g along each axis</h3>
      {/* Scrolls sideways on a phone; nothing in it takes the focus, so it does itself. */}
      <div
        className="overflow-x-auto"
        role="group"
        aria-labelledby="hand-checks-heading"
        tabIndex={0}
      >
        <table className="mt-1 w-full min-w-[40rem] text-left">
          <thead className="text-sm text-ink-soft">
            <tr className="border-b border-ink">
              {['Axis', 'Mode', 'Dunkerley', 'g/δ', 'g/δ, nodes only', 'Rayleigh'].map(
                (title, i) => (
                  <th
                    key={title}
                    scope="col"
                    className={`py-1 pr-4 font-normal ${i > 1 ? 'text-right' : ''}`}
                  >
                    {title}
                  </th>
                ),
              )}
            </tr>
          </thead>
          <tbody>
            {checks.axes.map((check) => (
              <AxisRow key={check.axis} check={check} modes={modes} />
            ))}
          </tbody>
        </table>
      </div>
      <p className="mt-2 max-w-prose text-sm text-ink-soft">
        Rayleigh bounds the lowest frequency from above. g/δ is exact for one degree of freedom and
        reads low where the mass is spread. Dunkerley comes from below where everything moves along
        the axis alone; in a frame whose motions are coupled it may lie above. Each speaks of the
        mode with the most effective mass along its axis.
      </p>
    </section>
  );
}

function AxisRow({ check, modes }: { check: HandCheck; modes: readonly ModeSummary[] }) {
  const { system } = useUnits();
  const mode = modes.find(({ number }) => number === check.mode);
  const cell = 'py-1 pr-4 align-top';
  return (
    <tr className="border-b border-rule">
      <th scope="row" className={`${cell} font-normal`}>
        {check.axis}
      </th>
      <td className={cell}>
        {mode ? (
          <>
            Mode {mode.number}, <span className="num">{formatModeFrequency(mode)}</span>
            <span className="block text-sm text-ink-soft">
              holds {formatShare(check.share)} of the mass that moves along {check.axis}
            </span>
          </>
        ) : (
          <span className="text-ink-soft">no mode found moves along {check.axis}</span>
        )}
        {outsideBounds(check, modes) && (
          <span className="flex items-center gap-1 text-sm text-caution">
            <NoticeMark kind="caution" className="size-3.5" />
            outside its bounds: look for the reason
          </span>
        )}
      </td>
      <td className={`${cell} num text-right`}>
        {check.dunkerley === null ? (
          <span className="font-sans text-ink-soft">too many masses</span>
        ) : (
          formatCheck(check.dunkerley)
        )}
      </td>
      {[
        [check.fromDeflectionAtMasses, check.deflectionAtMasses] as const,
        [check.fromDeflectionAtNodes, check.deflectionAtNodes] as const,
      ].map(([hz, deflection], i) => (
        <td key={i} className={`${cell} num text-right`}>
          {hz === null ? (
            <span className="font-sans text-ink-soft">no node moves</span>
          ) : (
            formatCheck(hz)
          )}
          <span className="block text-sm text-ink-soft">
            {formatDeflection(deflection, system)}
          </span>
        </td>
      ))}
      <td className={`${cell} num text-right`}>{formatCheck(check.rayleigh)}</td>
    </tr>
  );
}
