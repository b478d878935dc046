import type { BasisField } from '../weights/basis-field';
import type { Ties } from './prepared';
import { RowBuilder } from './rows';

/** Where two bodies are held together, before the basis is known there. */
export interface TiePlaces {
  count: number;
  /** 3 · count, m */
  positions: Float64Array;
  /** count, m² */
  areas: Float64Array;
  bodyA: Int32Array;
  bodyB: Int32Array;
}

/** Rows of both bodies at every tie. Both are taken at one place, so a − b vanishes at rest whatever the gap was. */
export function tieRows(places: TiePlaces, field: BasisField): Ties {
  const a = new RowBuilder(field.basis, places.count);
  const b = new RowBuilder(field.basis, places.count);
  for (let t = 0; t < places.count; t++) {
    const x = places.positions[3 * t]!;
    const y = places.positions[3 * t + 1]!;
    const z = places.positions[3 * t + 2]!;
    field.evaluate(x, y, z, places.bodyA[t]!, false);
    a.pushValues(field);
    field.evaluate(x, y, z, places.bodyB[t]!, false);
    b.pushValues(field);
  }
  return { count: places.count, a: a.done(), b: b.done(), areas: places.areas, bodyA: places.bodyA, bodyB: places.bodyB };
}
