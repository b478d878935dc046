import type { BasisField } from '../weights/basis-field';
import type { FinePoints } from './fine-points';
import { momentBlock, monomialValues, MONOMIALS, shiftMatrix } from './monomials';
import type { BlockPairs, BodyMatrices } from './prepared';

/**
 * ∫ N Nᵀ dV and the stabilisation form of one body, from its fine points. With x = Σ N c,
 * Σ_i w_i |p_i c_i − x|² = Σ_i w_i |p_i c_i|² − |x|² because Σ w = 1: the block-diagonal
 * ∫ w_i p_i p_iᵀ minus the mass.
 *
 * A neighbour's polynomials are a shift of the part's own, p_j = T_ij p_i, so a pair needs only
 * ∫ w_i w_j m dV for the monomials m of twice the degree (35 numbers instead of 100 products):
 * the block is their matrix times T_ijᵀ.
 *
 * `stabilisationShare` scales the stabilisation form (1 for solids, see sheetStabilisation).
 */
export function bodyMatrices(
  fine: FinePoints,
  body: number,
  firstPart: number,
  partCount: number,
  field: BasisField,
  stabilisationShare: number,
): BodyMatrices {
  const { basis, parts } = field;
  const width = MONOMIALS[basis];
  const pairOf = new Int32Array(partCount * partCount).fill(-1);
  const rows: number[] = [];
  const columns: number[] = [];
  let moments = new Float64Array(64 * width);
  const own = new Float64Array(partCount * width);
  const monomials = new Float64Array(width);
  for (let k = 0; k < fine.count; k++) {
    const x = fine.positions[3 * k]!;
    const y = fine.positions[3 * k + 1]!;
    const z = fine.positions[3 * k + 2]!;
    const n = field.evaluateWeights(x, y, z, body);
    const { parts: active, weights } = field.sample;
    const volume = fine.volumes[k]!;
    for (let m = 0; m < n; m++) {
      const part = active[m]!;
      const i = part - firstPart;
      const inverse = 1 / parts.scales[part]!;
      const wi = volume * weights[m]!;
      monomialValues(
        monomials,
        basis,
        (x - parts.centres[3 * part]!) * inverse,
        (y - parts.centres[3 * part + 1]!) * inverse,
        (z - parts.centres[3 * part + 2]!) * inverse,
      );
      for (let q = 0; q < width; q++) own[i * width + q]! += wi * monomials[q]!;
      for (let l = m; l < n; l++) {
        const slot = i * partCount + active[l]! - firstPart;
        let pair = pairOf[slot]!;
        if (pair < 0) {
          pair = rows.length;
          pairOf[slot] = pair;
          rows.push(part);
          columns.push(active[l]!);
          if ((pair + 1) * width > moments.length) {
            const bigger = new Float64Array(2 * moments.length);
            bigger.set(moments);
            moments = bigger;
          }
        }
        const w = wi * weights[l]!;
        const o = pair * width;
        for (let q = 0; q < width; q++) moments[o + q]! += w * monomials[q]!;
      }
    }
  }

  const order = rows.map((_, p) => p).sort((a, b) => rows[a]! - rows[b]! || columns[a]! - columns[b]!);
  const size = basis * basis;
  const mass: BlockPairs = {
    rows: Int32Array.from(order, (p) => rows[p]!),
    columns: Int32Array.from(order, (p) => columns[p]!),
    values: new Float64Array(order.length * size),
  };
  const shift = new Float64Array(size);
  order.forEach((p, n) => {
    shiftMatrix(shift, parts, rows[p]!, columns[p]!);
    momentBlock(mass.values, n * size, basis, moments, p * width, shift);
  });
  const stabilisation: BlockPairs = {
    rows: mass.rows.slice(),
    columns: mass.columns.slice(),
    values: mass.values.map((v) => -v),
  };
  const block = new Float64Array(size);
  for (let p = 0; p < order.length; p++) {
    const part = mass.rows[p]!;
    if (part !== mass.columns[p]) continue;
    shiftMatrix(shift, parts, part, part);
    momentBlock(block, 0, basis, own, (part - firstPart) * width, shift);
    for (let q = 0; q < size; q++) stabilisation.values[p * size + q]! += block[q]!;
  }
  for (let n = 0; n < stabilisation.values.length; n++) stabilisation.values[n]! *= stabilisationShare;
  return { mass, stabilisation };
}
