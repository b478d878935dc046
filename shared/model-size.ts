import { figures, lengthUnitFor, toLength } from './units';
import type { Model } from './wire/models';

/** Edge lengths of a model's box in metres, x y z. */
export const sizeOf = (model: Pick<Model, 'bounds' | 'unit'>): [number, number, number] =>
  [0, 1, 2].map((d) => (model.bounds.max[d]! - model.bounds.min[d]!) * model.unit) as [number, number, number];

/** "260 × 260 × 118 mm", with a question mark until a person confirmed the unit. */
export function sizeText(model: Pick<Model, 'bounds' | 'unit' | 'unitConfirmed'>): string {
  const size = sizeOf(model);
  const unit = lengthUnitFor(Math.max(...size));
  return `${size.map((metres) => figures(toLength(metres, unit))).join(' × ')} ${unit}${model.unitConfirmed ? '' : ' ?'}`;
}
