import type { BasisRows } from '../quadrature/prepared';

/** out[0..2] = Σ N c: the place that row `r` of the basis has under the coefficients c. */
export function evaluateRow(out: Float64Array | number[], rows: BasisRows, r: number, c: Float64Array): void {
  const { basis, offsets, parts, values } = rows;
  let x = 0;
  let y = 0;
  let z = 0;
  for (let e = offsets[r]!; e < offsets[r + 1]!; e++) {
    const from = parts[e]! * 3 * basis;
    const v = e * basis;
    for (let a = 0; a < basis; a++) {
      const N = values[v + a]!;
      x += N * c[from + a]!;
      y += N * c[from + basis + a]!;
      z += N * c[from + 2 * basis + a]!;
    }
  }
  out[0] = x;
  out[1] = y;
  out[2] = z;
}

/** r += N (fx, fy, fz) on row `row`. */
export function scatterRow(r: Float64Array, rows: BasisRows, row: number, fx: number, fy: number, fz: number): void {
  const { basis, offsets, parts, values } = rows;
  for (let e = offsets[row]!; e < offsets[row + 1]!; e++) {
    const to = parts[e]! * 3 * basis;
    const v = e * basis;
    for (let a = 0; a < basis; a++) {
      const N = values[v + a]!;
      r[to + a]! += N * fx;
      r[to + basis + a]! += N * fy;
      r[to + 2 * basis + a]! += N * fz;
    }
  }
}

/** The given rows as rows of their own, in the given order. */
export function pickRows(rows: BasisRows, chosen: ArrayLike<number>): BasisRows {
  const { basis } = rows;
  const offsets = new Int32Array(chosen.length + 1);
  for (let k = 0; k < chosen.length; k++) {
    offsets[k + 1] = offsets[k]! + rows.offsets[chosen[k]! + 1]! - rows.offsets[chosen[k]!]!;
  }
  const parts = new Int32Array(offsets[chosen.length]!);
  const values = new Float64Array(parts.length * basis);
  for (let k = 0; k < chosen.length; k++) {
    const from = rows.offsets[chosen[k]!]!;
    const to = rows.offsets[chosen[k]! + 1]!;
    parts.set(rows.parts.subarray(from, to), offsets[k]!);
    values.set(rows.values.subarray(from * basis, to * basis), offsets[k]! * basis);
  }
  return { count: chosen.length, basis, offsets, parts, values };
}

/** Rows a − b, for places of two bodies that share no part. */
export function subtractRows(a: BasisRows, b: BasisRows): BasisRows {
  const { basis } = a;
  const offsets = new Int32Array(a.count + 1);
  for (let k = 0; k < a.count; k++) {
    offsets[k + 1] = offsets[k]! + (a.offsets[k + 1]! - a.offsets[k]!) + (b.offsets[k + 1]! - b.offsets[k]!);
  }
  const parts = new Int32Array(offsets[a.count]!);
  const values = new Float64Array(parts.length * basis);
  for (let k = 0; k < a.count; k++) {
    let to = offsets[k]!;
    for (let e = a.offsets[k]!; e < a.offsets[k + 1]!; e++, to++) {
      parts[to] = a.parts[e]!;
      for (let f = 0; f < basis; f++) values[to * basis + f] = a.values[e * basis + f]!;
    }
    for (let e = b.offsets[k]!; e < b.offsets[k + 1]!; e++, to++) {
      parts[to] = b.parts[e]!;
      for (let f = 0; f < basis; f++) values[to * basis + f] = -b.values[e * basis + f]!;
    }
  }
  return { count: a.count, basis, offsets, parts, values };
}
