import type { BasisField } from '../weights/basis-field';
import type { BasisRows } from './prepared';

/** Collects rows of basis values, one place after the other. */
export class RowBuilder {
  private count = 0;
  private entries = 0;
  private offsets: Int32Array;
  private parts: Int32Array;
  private values: Float64Array;

  constructor(
    private readonly basis: 4 | 10,
    rows: number,
  ) {
    this.offsets = new Int32Array(rows + 1);
    this.parts = new Int32Array(8 * rows + 8);
    this.values = new Float64Array(basis * (8 * rows + 8));
  }

  /** Appends N at the place the field was last evaluated at. */
  pushValues(field: BasisField): void {
    const { basis } = this;
    const n = field.sample.count;
    this.reserve(n);
    this.parts.set(field.sample.parts.subarray(0, n), this.entries);
    this.values.set(field.values.subarray(0, n * basis), this.entries * basis);
    this.close(n);
  }

  /** Appends ∇N · (tx, ty, tz) at the place the field was last evaluated at, with gradients. */
  pushAlong(field: BasisField, tx: number, ty: number, tz: number): void {
    const { basis } = this;
    const n = field.sample.count;
    this.reserve(n);
    this.parts.set(field.sample.parts.subarray(0, n), this.entries);
    const { values } = this;
    for (let m = 0; m < n; m++) {
      const g = 3 * m * basis;
      const o = (this.entries + m) * basis;
      for (let a = 0; a < basis; a++) {
        values[o + a] =
          tx * field.gradients[g + a]! +
          ty * field.gradients[g + basis + a]! +
          tz * field.gradients[g + 2 * basis + a]!;
      }
    }
    this.close(n);
  }

  done(): BasisRows {
    return {
      count: this.count,
      basis: this.basis,
      offsets: this.offsets.slice(0, this.count + 1),
      parts: this.parts.slice(0, this.entries),
      values: this.values.slice(0, this.entries * this.basis),
    };
  }

  private close(n: number): void {
    this.entries += n;
    this.count++;
    this.offsets[this.count] = this.entries;
  }

  private reserve(n: number): void {
    if (this.entries + n <= this.parts.length) return;
    const size = 2 * (this.entries + n);
    const parts = new Int32Array(size);
    parts.set(this.parts);
    this.parts = parts;
    const values = new Float64Array(size * this.basis);
    values.set(this.values);
    this.values = values;
  }
}

/** out[3 · row + d] = Σ N_ia c[(part · 3 + d) · basis + a]: positions (or displacements) at the rows' places, m. */
export function evaluateRows(
  out: Float64Array | Float32Array,
  rows: BasisRows,
  coefficients: ArrayLike<number>,
): Float64Array | Float32Array {
  const { basis, offsets, parts, values } = rows;
  for (let r = 0; r < rows.count; r++) {
    let x = 0;
    let y = 0;
    let z = 0;
    for (let e = offsets[r]!; e < offsets[r + 1]!; e++) {
      const c = 3 * parts[e]! * basis;
      const v = e * basis;
      for (let a = 0; a < basis; a++) {
        const n = values[v + a]!;
        x += n * coefficients[c + a]!;
        y += n * coefficients[c + basis + a]!;
        z += n * coefficients[c + 2 * basis + a]!;
      }
    }
    out[3 * r] = x;
    out[3 * r + 1] = y;
    out[3 * r + 2] = z;
  }
  return out;
}
