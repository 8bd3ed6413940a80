import type { MemberPart } from './FrameModel.ts';

/** Divisions of a beam set to "auto" before a highest frequency is known: the document's own default. */
const DEFAULT_DIVISIONS = 4;
/** Above this a finer mesh of one member no longer moves a frame's frequencies noticeably. */
const MOST_AUTO_DIVISIONS = 40;
/**
 * Wave number times element length at the highest frequency. Lumped bending errs by up to φ²/24 where an end
 * is free, so 0.5 keeps either mass kind within about 1 %, consistent bending (φ⁴/1440) within 0.005 %.
 */
const PHASE_PER_ELEMENT = 0.5;

/**
 * Number of elements of a beam: `override` when given, else the member's own figure. "auto" takes as
 * many as resolve the member's shortest bending, stretching and twisting wave at `highestHz`; without
 * it, 4.
 */
export function divisionsOf(
  { member, properties, axes }: MemberPart,
  override: number | undefined,
  highestHz: number | undefined,
): number {
  if (override !== undefined) return override;
  if (member.divisions !== 'auto') return member.divisions;
  if (highestHz === undefined) return DEFAULT_DIVISIONS;
  const { E, G, rho, A, Iy, Iz, Iyz, J, massPerLength } = properties;
  const omega = 2 * Math.PI * highestHz;
  const perLength = rho * A + massPerLength;
  const weakest = (Iy + Iz) / 2 - Math.hypot((Iy - Iz) / 2, Iyz);
  const waveNumbers = [
    (((perLength / E) * omega * omega) / weakest) ** 0.25,
    omega * Math.sqrt(perLength / (E * A)),
    omega * Math.sqrt((rho * (Iy + Iz)) / (G * J)),
  ];
  const wanted = Math.ceil((Math.max(...waveNumbers) * axes.length) / PHASE_PER_ELEMENT);
  return Math.min(Math.max(wanted, 1), MOST_AUTO_DIVISIONS);
}
