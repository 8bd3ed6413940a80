import { AppError } from '../errors/AppError.ts';
import { buildModel } from '../frame/assembly/buildModel.ts';
import type { FrameModel } from '../frame/assembly/FrameModel.ts';
import { refuseMechanisms } from '../frame/freedoms/mechanisms.ts';
import { rigidMotions } from '../frame/freedoms/rigidMotions.ts';
import { massProperties } from './massProperties.ts';
import type { MassProperties } from './massProperties.ts';

/**
 * A frame none of whose pivots is smaller, over its diagonal, resists every motion: a mechanism leaves a pivot
 * of rounding, some 1e-14. Below it the motions themselves are looked for.
 */
export const CERTAIN_PIVOT = 1e-9;

/** Mass and centre of a model. Throws AppError `unsolvable` where there is no mass. */
export function massOrRefuse(model: FrameModel): MassProperties {
  const properties = massProperties(model);
  if (properties.totalMass > 0) return properties;
  const message = 'The model has no mass, so nothing can vibrate. Add a member or a mass.';
  throw new AppError('unsolvable', message, { issues: [{ path: '', message }] });
}

/**
 * Throws AppError `mechanism` for a motion that nothing resists. Dividing a member adds none, so one element per
 * member shows them all.
 */
export function refuseMechanismsOf(model: FrameModel): void {
  const undivided = model.parts.every((part) => part.divisions === 1)
    ? model
    : buildModel(model.document, { massKind: model.massKind, divisionsOf: () => 1 });
  refuseMechanisms(
    undivided,
    rigidMotions(undivided).map(({ x }) => x),
  );
}
