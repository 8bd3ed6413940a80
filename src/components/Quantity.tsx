import type { QuantityKind } from '#shared/units/quantities.ts';
import { useUnits } from '#src/hooks/useUnits.ts';

interface QuantityProps {
  /** SI */
  value: number;
  kind: QuantityKind;
}

/** A number with its unit, in the person's units. */
export function Quantity({ value, kind }: QuantityProps) {
  return <span className="num whitespace-nowrap">{useUnits().quantity(value, kind)}</span>;
}
