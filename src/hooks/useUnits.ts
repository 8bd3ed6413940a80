import { useMemo } from 'react';
import { displayUnit, toDisplay, type UnitSystem } from '#shared/units/displayUnits.ts';
import { formatNumber, formatQuantity } from '#shared/units/formatQuantity.ts';
import type { QuantityKind } from '#shared/units/quantities.ts';
import { useSession } from './useSession.ts';

export interface Units {
  readonly system: UnitSystem;
  /** "912.7 mm" of an SI value. */
  readonly quantity: (valueSi: number, kind: QuantityKind) => string;
  /** "912.7", where the unit stands elsewhere. */
  readonly number: (valueSi: number, kind: QuantityKind) => string;
  /** "mm" */
  readonly symbol: (kind: QuantityKind) => string;
}

const UNTIL_KNOWN: UnitSystem = 'mm-kg-N';

/** Numbers in the units the person has chosen. */
export function useUnits(): Units {
  const system = useSession().data?.person?.units ?? UNTIL_KNOWN;
  return useMemo(
    () => ({
      system,
      quantity: (valueSi, kind) => formatQuantity(valueSi, kind, system),
      number: (valueSi, kind) =>
        formatNumber(toDisplay(valueSi, kind, system), displayUnit(kind, system).digits),
      symbol: (kind) => displayUnit(kind, system).symbol,
    }),
    [system],
  );
}
