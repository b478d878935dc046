import type { BasisField } from '../weights/basis-field';
import type { FinePoints } from './fine-points';
import type { BlockPairs, BodyMatrices } from './prepared';

/**
 * ∫ N Nᵀ dV and the stabilisation form of one body, from its fine points. With x = Σ N c,
 * Σ_i w_i |p_i c_i − x|² = Σ_i w_i |p_i c_i|² − |x|² because Σ w = 1: the block-diagonal
 * ∫ w_i p_i p_iᵀ minus the mass.
 */
export function bodyMatrices(fine: FinePoints, body: number, firstPart: number, partCount: number, field: BasisField): BodyMatrices {
  const { basis } = field;
  const size = basis * basis;
  const pairOf = new Int32Array(partCount * partCount).fill(-1);
  const rows: number[] = [];
  const columns: number[] = [];
  let values = new Float64Array(64 * size);
  const diagonal = new Float64Array(partCount * size);
  for (let k = 0; k < fine.count; k++) {
    const n = field.evaluate(fine.positions[3 * k]!, fine.positions[3 * k + 1]!, fine.positions[3 * k + 2]!, body, false);
    const { parts, weights } = field.sample;
    const v = fine.volumes[k]!;
    for (let m = 0; m < n; m++) {
      const i = parts[m]! - firstPart;
      accumulate(diagonal, i * size, basis, v * weights[m]!, field.polynomials, m * basis, field.polynomials, m * basis);
      for (let l = m; l < n; l++) {
        const j = parts[l]! - firstPart;
        let pair = pairOf[i * partCount + j]!;
        if (pair < 0) {
          pair = rows.length;
          pairOf[i * partCount + j] = pair;
          rows.push(parts[m]!);
          columns.push(parts[l]!);
          if ((pair + 1) * size > values.length) {
            const bigger = new Float64Array(2 * values.length);
            bigger.set(values);
            values = bigger;
          }
        }
        accumulate(values, pair * size, basis, v, field.values, m * basis, field.values, l * basis);
      }
    }
  }
  const mass = sortPairs(rows, columns, values, size);
  const stabilisation: BlockPairs = { rows: mass.rows.slice(), columns: mass.columns.slice(), values: mass.values.map((x) => -x) };
  for (let p = 0; p < mass.rows.length; p++) {
    if (mass.rows[p] !== mass.columns[p]) continue;
    const from = (mass.rows[p]! - firstPart) * size;
    for (let q = 0; q < size; q++) stabilisation.values[p * size + q]! += diagonal[from + q]!;
  }
  return { mass, stabilisation };
}

function accumulate(
  out: Float64Array,
  o: number,
  basis: number,
  scale: number,
  left: Float64Array,
  l: number,
  right: Float64Array,
  r: number,
): void {
  for (let a = 0; a < basis; a++) {
    const s = scale * left[l + a]!;
    const row = o + a * basis;
    for (let b = 0; b < basis; b++) out[row + b]! += s * right[r + b]!;
  }
}

/** Pairs in order of row, then column. */
function sortPairs(rows: readonly number[], columns: readonly number[], values: Float64Array, size: number): BlockPairs {
  const order = rows.map((_, p) => p).sort((a, b) => rows[a]! - rows[b]! || columns[a]! - columns[b]!);
  const sorted = new Float64Array(order.length * size);
  order.forEach((from, to) => sorted.set(values.subarray(from * size, (from + 1) * size), to * size));
  return { rows: Int32Array.from(order, (p) => rows[p]!), columns: Int32Array.from(order, (p) => columns[p]!), values: sorted };
}
