import type { HandCheck, ModeSummary } from '#shared/schemas/solveResult.ts';
import { Notice } from '#src/components/Notice.tsx';
import { useUnits } from '#src/hooks/useUnits.ts';
import {
  formatCheck,
  formatDeflection,
  formatDifference,
  formatShare,
} from '../state/formatMode.ts';
import { outsideBounds } from '../state/handCheckBounds.ts';

interface HandCheckBlockProps {
  readonly check: HandCheck;
  readonly mode: ModeSummary;
  /** All modes of the solve, to tell whether this is the lowest. */
  readonly modes: readonly ModeSummary[];
}

/** What a person works out by hand for the axis that this mode moves along, and how far each lies from it. */
export function HandCheckBlock({ check, mode, modes }: HandCheckBlockProps) {
  const { system } = useUnits();
  const { axis } = check;
  const rows = [
    { what: 'Rayleigh', worth: 'from above', hz: check.rayleigh, none: '' },
    {
      what: 'g/δ',
      worth: `largest deflection, ${formatDeflection(check.deflectionAtMasses, system)}, masses’ centres included`,
      hz: check.fromDeflectionAtMasses,
      none: '',
    },
    {
      what: 'g/δ, nodes only',
      worth: formatDeflection(check.deflectionAtNodes, system),
      hz: check.fromDeflectionAtNodes,
      none: 'no node moves',
    },
    {
      what: 'Dunkerley',
      worth: `from below if all moved along ${axis} alone`,
      hz: check.dunkerley,
      none: 'too many masses',
    },
  ];
  return (
    <div>
      <h3 className="text-sm font-normal text-ink-soft">Hand check, 1 g along {axis}</h3>
      <dl>
        {rows.map(({ what, worth, hz, none }) => (
          <div key={what} className="grid grid-cols-[1fr_auto] gap-x-3">
            <dt>
              {what}
              <span className="block text-ink-soft">{worth}</span>
            </dt>
            <dd className="text-right">
              {hz === null ? (
                <span className="text-ink-soft">{none}</span>
              ) : (
                <>
                  <span className="num">{formatCheck(hz)}</span>
                  <span className="num block text-ink-soft">
                    {formatDifference(hz / mode.frequencyHz - 1)}
                  </span>
                </>
              )}
            </dd>
          </div>
        ))}
      </dl>
      {check.share < 0.5 && (
        <p className="mt-1 text-ink-soft">
          This mode holds only {formatShare(check.share)} of the mass that moves along {axis}: the
          check speaks of the axis, not of this mode alone.
        </p>
      )}
      {outsideBounds(check, modes) && (
        <Notice kind="caution" className="mt-1">
          Outside its bounds: the lowest frequency lies above Rayleigh’s. Look for the reason.
        </Notice>
      )}
    </div>
  );
}
